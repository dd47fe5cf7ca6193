import { describe, expect, it } from 'vitest'
import { defaultRecipe, figureRecipeSchema } from '../../../core/figure/recipe.ts'
import { automaticTitle, galaxyCount, numeral } from '../../../core/figure/words.ts'
import { galaxiesFromPoints } from '../../../core/figure/galaxy.ts'

/** Paths and messages of what is wrong. */
function problems(input: unknown): string[] {
  const parsed = figureRecipeSchema.safeParse(input)
  return parsed.success ? [] : parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`)
}

describe('a recipe', () => {
  it('is whole with nothing but its view', () => {
    const recipe = figureRecipeSchema.parse({ view: 'sky' })
    expect(recipe.sky.projection).toBe('hammer')
    expect(recipe.labels).toEqual({ count: 24, hosts: true })
    expect(figureRecipeSchema.parse(JSON.parse(JSON.stringify(recipe)))).toEqual(recipe)
  })

  it('is refused with the field named', () => {
    expect(problems({ view: 'globe' })[0]).toMatch(/^view:/)
    expect(problems({ view: 'sky', widthMm: 39.9 })).toEqual(['widthMm: The width must be at least 40 mm.'])
    expect(problems({ view: 'sky', dpi: 1201 })).toEqual(['dpi: The resolution must be at most 1200 dpi.'])
    expect(problems({ view: 'sky', sky: { projection: 'mercator' } })[0]).toMatch(/^sky\.projection:/)
    expect(problems({ view: 'plane', plane: { radius: 0 } })).toEqual(['plane.radius: The radius must be at least 0.01 Mpc.'])
    expect(problems({ view: 'sky', color: 'class' })[0]).toMatch(/color/)
    expect(problems({ view: 'sky', widthMm: Number.NaN })[0]).toMatch(/^widthMm:/)
    expect(problems({ view: 'sky', version: 2 })[0]).toMatch(/^version:/)
    expect(problems(null)).toHaveLength(1)
  })

  it('starts in the supergalactic frame', () => {
    expect(automaticTitle(defaultRecipe('sky'))).toBe('The sky, supergalactic frame')
    expect(automaticTitle(defaultRecipe('plane'))).toBe('The SGX–SGY plane')
  })
})

describe('words', () => {
  it('numbers have a true minus and no negative zero', () => {
    expect(numeral(-30)).toBe('\u221230')
    expect(numeral(-0.04, 1)).toBe('0.0')
    expect(numeral(2.5, 1)).toBe('2.5')
  })

  it('counts say what is left out', () => {
    expect(galaxyCount(1)).toBe('1 galaxy')
    expect(galaxyCount(12345)).toBe('12\u2009345 galaxies')
    expect(galaxyCount(388, 412)).toBe('388 of 412 galaxies')
  })
})

describe('columns of the points route', () => {
  const columns = {
    revision: 3, id: [7], slug: ['a'], name: ['A'], class: ['spiral' as const], ra: [10], dec: [-5], distance: [null], distanceLo: [null], distanceHi: [null],
    sgx: [null], sgy: [null], sgz: [null], absV: [-20], host: [null], relation: ['field' as const],
  }

  it('become galaxies', () => {
    expect(galaxiesFromPoints(columns)).toEqual([
      { id: 7, slug: 'a', name: 'A', class: 'spiral', ra: 10, dec: -5, distance: null, distanceLo: null, distanceHi: null, sgx: null, sgy: null, sgz: null, absV: -20, host: null, relation: 'field' },
    ])
  })

  it('are refused when one is short', () => {
    expect(() => galaxiesFromPoints({ ...columns, absV: [] })).toThrow(RangeError)
  })
})
