import { describe, expect, it } from 'vitest'
import { defaultRecipe } from '../../core/figure/recipe.ts'
import type { Hit } from '../../core/figure/scene.ts'
import { nextHit } from '../../src/components/maps/walk.ts'
import { MAP_KEYS, readRecipe, writeRecipe } from '../../src/features/atlas/map-state.ts'
import { decimalsOf } from '../../src/lib/published.ts'

const at = (id: number, x: number, y: number): Hit => ({ id, slug: `g${id}`, x, y, radius: 1 })

describe('the walk by arrow keys', () => {
  const hits = [at(1, 0, 0), at(2, 10, 1), at(3, 5, 4.5), at(4, -5, 0), at(5, 0, 8)]

  it.each([
    ['ArrowRight', 2],
    ['ArrowLeft', 4],
    ['ArrowDown', 5],
    ['ArrowUp', null],
  ] as const)('goes %s to what is near and ahead', (direction, id) => {
    expect(nextHit(hits, at(1, 0, 0), direction)?.id ?? null).toBe(id)
  })

  it('does not leave the galaxy for another at the very same place', () => {
    expect(nextHit([at(1, 0, 0), at(2, 0, 0)], at(1, 0, 0), 'ArrowRight')).toBeNull()
  })
})

describe('a map in the address', () => {
  function roundTrip(recipe: ReturnType<typeof defaultRecipe>): ReturnType<typeof defaultRecipe> {
    const own = new URLSearchParams()
    for (const [key, value] of Object.entries(writeRecipe(recipe))) if (value !== null) own.set(key, value)
    for (const key of own.keys()) expect(MAP_KEYS[recipe.view]).toContain(key)
    return readRecipe(recipe.view, own)
  }

  it.each(['sky', 'plane'] as const)('is empty for the usual %s', (view) => {
    expect(Object.values(writeRecipe(defaultRecipe(view))).every((value) => value === null)).toBe(true)
    expect(roundTrip(defaultRecipe(view))).toEqual(defaultRecipe(view))
  })

  it('comes back as it was written', () => {
    const sky = defaultRecipe('sky')
    const turned = { ...sky, colour: 'one-ink' as const, labels: { ...sky.labels, count: 90 }, sky: { ...sky.sky, frame: 'galactic' as const, projection: 'aitoff' as const, centreLon: 45, supergalacticPlane: false } }
    expect(roundTrip(turned)).toEqual(turned)
    const plane = defaultRecipe('plane')
    const near = { ...plane, units: 'Mly' as const, size: 'fixed' as const, plane: { ...plane.plane, radius: 0.5, rings: false, zoneOfAvoidance: false } }
    // A plane's own zone is the one that is written; the sky's follows the same parameter and is not drawn.
    expect(roundTrip(near)).toEqual({ ...near, sky: { ...near.sky, zoneOfAvoidance: false } })
  })

  it('takes what cannot be read, or is out of bounds, as usual', () => {
    expect(readRecipe('sky', new URLSearchParams('frame=sideways&projection=globe&middle=far&size=big'))).toEqual(defaultRecipe('sky'))
    expect(readRecipe('plane', new URLSearchParams('radius=-3'))).toEqual(defaultRecipe('plane'))
  })
})

it.each([
  [[27.78, 0.05], 2],
  [[27.5, null], 1],
  [[3, 0.125], 3],
  [[-5], 0],
  [[null], 0],
])('published numbers %j keep %i decimals', (values, decimals) => {
  expect(decimalsOf(...values)).toBe(decimals)
})
