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
 *
 * Its own numbers are a walk through one table of normals, from a place and by a stride that the slug gives: a generator for every galaxy
 * would take five times as long. In one draw two galaxies meet the same entry only where their walks cross, once in some hundred draws at
 * most.
 */
export function drawnDistances(galaxy: Drawn, policy: Policy['host']): Float64Array {
  return drawInto(new Float64Array(policy.draws), galaxy, policy)
}

function drawInto(distances: Float64Array, galaxy: Drawn, policy: Policy['host']): Float64Array {
  const { table, scale } = numbersOf(policy)
  const walk = hashOf(galaxy.slug)
  let place = walk & (TABLE - 1)
  const stride = ((walk >>> TABLE_BITS) << 1) | 1
  // exp(a + b) with the constants multiplied out: the loop is run for every galaxy of the catalogue.
  const middle = RELATIVE_PER_MAG * (galaxy.modulus - 25)
  const systematic = RELATIVE_PER_MAG * (galaxy.systematic ?? 0)
  const statistical = RELATIVE_PER_MAG * (galaxy.statistical ?? policy.unknownError)
  for (let i = 0; i < distances.length; i++) {
    distances[i] = Math.exp(middle + systematic * (scale[i] ?? 0) + statistical * (table[place] ?? 0))
    place = (place + stride) & (TABLE - 1)
  }
  return distances
}

/** 16 MB of 2,000 draws each; more than one galaxy can have possible hosts. */
const MOST_KEPT = 1024

/** Draws of galaxies that are asked for again and again, the latest kept. What it gives is shared: not to be written to. */
export function drawsKept(policy: Policy['host'], most = MOST_KEPT): (galaxy: Neighbour) => Float64Array {
  const kept = new Map<Neighbour, Float64Array>()
  return (galaxy) => {
    const known = kept.get(galaxy)
    if (known) {
      // A map keeps the order in which its entries were made: the first is the one longest not asked for.
      kept.delete(galaxy)
      kept.set(galaxy, known)
      return known
    }
    const draws = drawInto(kept.size < most ? new Float64Array(policy.draws) : longestUnasked(kept), galaxy, policy)
    kept.set(galaxy, draws)
    return draws
  }
}

/** Takes the list that was not asked for the longest out, to be filled anew: there are hundreds of thousands to make. */
function longestUnasked(kept: Map<Neighbour, Float64Array>): Float64Array {
  for (const [galaxy, draws] of kept) {
    kept.delete(galaxy)
    return draws
  }
  throw new RangeError('no draws are kept')
}

const TABLE_BITS = 18
/** Entries of the table: a power of 2, so that every odd stride passes all of them before it comes back. */
const TABLE = 2 ** TABLE_BITS

interface Numbers {
  seed: number
  draws: number
  table: Float64Array
  /** The common scale error of each draw, in standard deviations. */
  scale: Float64Array
}

let last: Numbers | null = null

/** The numbers of a seed; the last ones are kept, since all galaxies ask for the same. */
function numbersOf({ seed, draws }: Policy['host']): Numbers {
  if (last?.seed !== seed || last.draws !== draws) {
    const table = last?.seed === seed ? last.table : normals(seed, TABLE_STREAM, TABLE)
    last = { seed, draws, table, scale: normals(seed, SCALE_STREAM, draws) }
  }
  return last
}

const TABLE_STREAM = 1
const SCALE_STREAM = 2

/** FNV-1a with a last stir (the finaliser of MurmurHash3, Appleby 2011), since slugs of one system differ in their last letters only. */
function hashOf(slug: string): number {
  let hash = 0x811c9dc5
  for (let i = 0; i < slug.length; i++) hash = Math.imul(hash ^ slug.charCodeAt(i), 0x01000193)
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b)
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35)
  return (hash ^ (hash >>> 16)) >>> 0
}
