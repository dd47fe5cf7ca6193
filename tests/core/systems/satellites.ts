import type { Vector } from '../../../core/astro/vector.ts'
import type { Random } from '../../../core/random.ts'

/** Satellites in directions at random, their radii uniform up to a largest one. */
export function isotropic(draw: Random, n: number, radius: number): Vector[] {
  return Array.from({ length: n }, () => {
    const z = 2 * draw.uniform() - 1
    const across = Math.sqrt(1 - z * z)
    const turn = 2 * Math.PI * draw.uniform()
    const r = radius * draw.uniform()
    return [r * across * Math.cos(turn), r * across * Math.sin(turn), r * z]
  })
}
