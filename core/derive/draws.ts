/** Distances drawn from the errors of their moduli: what membership probabilities and the shape of systems are computed from. */
import { RELATIVE_PER_MAG } from '../astro/distance.ts'
import { normals } from '../random.ts'
import type { Policy } from '../scale/policy.ts'
import type { Neighbour } from './neighbourhood.ts'

type Drawn = Pick<Neighbour, 'slug' | 'modulus' | 'statistical' | 'systematic'>

/**
 * Distances of a galaxy, Mpc, one a draw.
 *
 * The systematic part moves by one number a draw, the same for all galaxies, since a wrong scale moves them all alike. What is a galaxy's own
 * is seeded by the policy and its slug: so a draw of one galaxy is the same whatever it is compared with, and a result does not depend on
 * what else is computed. (The database's numbers would not do: a galaxy that is only foreseen gets another number when it is made.)
 */
export function drawnDistances(galaxy: Drawn, policy: Policy['host']): Float64Array {
  const scale = scaleDraws(policy)
  const own = normals(policy.seed, streamOf(galaxy.slug), policy.draws)
  const statistical = galaxy.statistical ?? policy.unknownError
  const systematic = galaxy.systematic ?? 0
  const middle = galaxy.modulus - 25
  for (let i = 0; i < own.length; i++) own[i] = Math.exp(RELATIVE_PER_MAG * (middle + systematic * (scale[i] ?? 0) + statistical * (own[i] ?? 0)))
  return own
}

/** Draws of galaxies that are asked for again and again, the latest kept. What it gives is shared: not to be written to. */
export function drawsKept(policy: Policy['host'], most = 4096): (galaxy: Neighbour) => Float64Array {
  const kept = new Map<Neighbour, Float64Array>()
  return (galaxy) => {
    const known = kept.get(galaxy)
    const draws = known ?? drawnDistances(galaxy, policy)
    // A map keeps the order in which its entries were made: the first is the one longest not asked for.
    if (known) kept.delete(galaxy)
    else if (kept.size >= most) {
      const oldest = kept.keys().next()
      if (!oldest.done) kept.delete(oldest.value)
    }
    kept.set(galaxy, draws)
    return draws
  }
}

let lastScale: { seed: number; draws: Float64Array } | null = null

/** The common scale error of each draw, in standard deviations; the last list is kept, since all galaxies ask for the same. */
function scaleDraws({ seed, draws }: Policy['host']): Float64Array {
  if (lastScale?.seed !== seed || lastScale.draws.length !== draws) {
    lastScale = { seed, draws: normals(seed, streamOf(''), draws) }
  }
  return lastScale.draws
}

/** A stream of its own for every slug: FNV-1a. */
function streamOf(slug: string): number {
  let hash = 0x811c9dc5
  for (let i = 0; i < slug.length; i++) hash = Math.imul(hash ^ slug.charCodeAt(i), 0x01000193)
  return hash >>> 0
}
