/** A host with its satellites, and all that is computed of them together. */
import { length, type Vector } from '../astro/vector.ts'
import type { Policy } from '../scale/policy.ts'
import { FEWEST_SATELLITES, flatteningOf, type Flattening } from './flattening.ts'
import { flatteningDraws, type FlatteningDraws, type Placed } from './flattening-draws.ts'
import { dispersionOf, type Dispersion } from './gapper.ts'
import { isotropyOf, type Isotropy } from './isotropy.ts'
import { luminosityFunction, type LuminosityFunction } from './luminosity-function.ts'
import { stretchOf, type Stretch } from './stretch.ts'

/** What is computed of a galaxy as host or satellite; null where something is unknown. */
export interface SystemGalaxy {
  slug: string
  /** Supergalactic, Mpc. */
  position: Vector | null
  /** Distance modulus with the two parts of its error, mag. */
  modulus: number | null
  statistical: number | null
  systematic: number | null
  /** Absolute V magnitude, mag. */
  absV: number | null
  /** km/s, Galactic standard of rest. */
  vGsr: number | null
}

export interface Shape extends Flattening {
  drawn: FlatteningDraws
  isotropy: Isotropy
  stretch: Stretch
}

export interface SystemScience {
  dispersion: Dispersion | null
  luminosity: LuminosityFunction
  /** How many satellites have a place beside the host, and how many a shape needs. */
  placed: number
  needed: number
  /** Lengths in kpc. Null with too few satellites, or a host without a distance. */
  shape: Shape | null
}

const KPC_PER_MPC = 1000

/** All of it, for one policy: its draws, seed and the error that stands in for an unknown one. */
export function systemOf(host: SystemGalaxy, satellites: readonly SystemGalaxy[], policy: Policy['host']): SystemScience {
  const centre = placeOf(host)
  const around = centre ? satellites.flatMap((satellite) => placeOf(satellite) ?? []) : []
  return {
    dispersion: dispersionOf(satellites.flatMap((s) => s.vGsr ?? [])), luminosity: luminosityFunction(satellites), placed: around.length, needed: FEWEST_SATELLITES,
    shape: centre && shapeOf(centre, around, policy),
  }
}

function shapeOf(host: Placed, satellites: readonly Placed[], policy: Policy['host']): Shape | null {
  const offsets = offsetsOf(host.position, satellites)
  const flattening = flatteningOf(offsets)
  const drawn = flattening && flatteningDraws(host, satellites, flattening.axes[2], policy)
  const isotropy = flattening && isotropyOf(offsets, flattening.minorToMajor, { reshuffles: policy.draws, seed: policy.seed })
  if (!flattening || !drawn || !isotropy) return null
  const stretch = stretchOf(host, satellites, flattening.axes[0], flattening.extent, policy.unknownError)
  return { ...flattening, drawn, isotropy, stretch }
}

/** Offsets from a host, kpc; places in Mpc. */
export function offsetsOf(host: Vector, satellites: readonly { position: Vector }[]): Vector[] {
  return satellites.map(({ position: [x, y, z] }) => [KPC_PER_MPC * (x - host[0]), KPC_PER_MPC * (y - host[1]), KPC_PER_MPC * (z - host[2])])
}

function placeOf({ slug, position, modulus, statistical, systematic }: SystemGalaxy): Placed | null {
  return position && modulus !== null && length(position) > 0 ? { slug, position, modulus, statistical, systematic } : null
}
