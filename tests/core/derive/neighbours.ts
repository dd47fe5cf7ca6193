/** Invented neighbourhoods for tests. */
import fc from 'fast-check'
import { distanceOf, modulusOf } from '../../../core/astro/distance.ts'
import { neighbourhoodOf, type Neighbour, type Neighbourhood } from '../../../core/derive/neighbourhood.ts'
import { random } from '../../../core/random.ts'

/** A galaxy at supergalactic x, y, z (Mpc), of a stellar mass (Msun). */
export function neighbour(id: number, at: readonly [number, number, number], mass: number, more: Partial<Neighbour> = {}): Neighbour {
  const [x, y, z] = at
  return { id, slug: `g-${id}`, name: `G ${id}`, x, y, z, mass, modulus: modulusOf(Math.hypot(x, y, z)), statistical: 0.08, systematic: 0.06, vGsr: null, vError: null, ...more }
}

/** Galaxies in a box of 2 Mpc about 4 Mpc away, a fifth of them without mass; clustered, so that there are satellites. */
export function crowd(seed: number, size: number): Neighbour[] {
  const draw = random(seed)
  const centres = Array.from({ length: Math.max(1, Math.round(size / 20)) }, () => [3 + 2 * draw.uniform(), 2 * draw.uniform(), 2 * draw.uniform()] as const)
  return Array.from({ length: size }, (_, i) => {
    const centre = draw.pick(centres)
    const spread = draw.uniform() < 0.3 ? 1 : 0.15
    const at = centre.map((c) => c + spread * draw.normal()) as [number, number, number]
    return neighbour(i + 1, at, draw.uniform() < 0.2 ? 0 : 10 ** (6 + 5 * draw.uniform()), { vGsr: 100 * draw.normal(), vError: draw.uniform() < 0.2 ? null : 5 * draw.uniform() })
  })
}

export const anyCrowd: fc.Arbitrary<Neighbourhood> = fc.tuple(fc.nat(1e6), fc.integer({ min: 1, max: 60 })).map(([seed, size]) => neighbourhoodOf(crowd(seed, size)))

/** The galaxy at another distance in the same direction. */
export function moved(g: Neighbour, modulus: number): Neighbour {
  const factor = distanceOf(modulus) / Math.hypot(g.x, g.y, g.z)
  return { ...g, modulus, x: g.x * factor, y: g.y * factor, z: g.z * factor }
}
