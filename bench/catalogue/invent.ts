/** A large invented catalogue for the benches: hosts with companions about them and a field in between, ten measurements a galaxy. */
import { distanceOf, modulusOf } from '../../core/astro/distance.ts'
import { rotation } from '../../core/astro/frames.ts'
import { directionOf } from '../../core/astro/sphere.ts'
import { length, turn, type Vector } from '../../core/astro/vector.ts'
import type { GalaxyClass } from '../../core/classes.ts'
import type { MethodKey } from '../../core/methods.ts'
import type { QuantityKey } from '../../core/quantities.ts'
import { random, type Random } from '../../core/random.ts'

export interface InventedGalaxy {
  designation: string
  class: GalaxyClass
  ra: number
  dec: number
  measurements: InventedMeasurement[]
}

export interface InventedMeasurement {
  quantity: QuantityKey
  value: number
  error: number
  method: MethodKey | null
  anchor: string | null
  anchorValueAssumed: number | null
  /** Index of the source. */
  source: number
}

export const SOURCES = 400
/** Edge of the volume, Mpc. */
const EDGE = 11
/** One galaxy in so many is a host. */
const PER_HOST = 60
/** Of the galaxies that are not hosts, as many live near one. */
const NEAR_A_HOST = 0.6

const toEquatorial = rotation('supergalactic', 'equatorial')

/** @param count - galaxies; the same seed and count give the same catalogue */
export function* invent(count: number, seed = 1): Generator<InventedGalaxy> {
  const draw = random(seed)
  const hosts: { at: Vector; absV: number }[] = []
  for (let i = 0; i < count; i++) {
    const isHost = i % PER_HOST === 0
    const host = isHost || hosts.length === 0 || draw.uniform() > NEAR_A_HOST ? null : draw.pick(hosts)
    const at = host ? about(draw, host.at) : inTheField(draw)
    const absV = isHost ? -19.5 - 2 * draw.uniform() : -17 + 11 * draw.uniform()
    if (isHost) hosts.push({ at, absV })
    const { lon, lat } = directionOf(turn(toEquatorial, at))
    yield { designation: `Bench ${i + 1}`, class: isHost ? 'spiral' : draw.pick(['dwarf-spheroidal', 'dwarf-irregular', 'ultra-faint'] as const), ra: lon, dec: lat, measurements: measure(draw, modulusOf(length(at)), absV) }
  }
}

function inTheField(draw: Random): Vector {
  for (;;) {
    const at: Vector = [EDGE * (2 * draw.uniform() - 1), EDGE * (2 * draw.uniform() - 1), 0.3 * EDGE * (2 * draw.uniform() - 1)]
    const d = length(at)
    if (d > 0.02 && d < EDGE) return at
  }
}

/** Within about 0.6 Mpc of a host, denser towards it. */
function about(draw: Random, [x, y, z]: Vector): Vector {
  const r = 0.6 * draw.uniform() ** 1.5
  const direction: Vector = [draw.normal(), draw.normal(), draw.normal()]
  const scale = r / length(direction)
  return [x + scale * direction[0], y + scale * direction[1], z + scale * direction[2]]
}

function measure(draw: Random, modulus: number, absV: number): InventedMeasurement[] {
  const list: InventedMeasurement[] = []
  const add = (quantity: QuantityKey, value: number, error: number, more: Partial<InventedMeasurement> = {}): void => {
    const noisy = Number((value + error * draw.normal()).toFixed(4))
    list.push({ quantity, value: noisy, error, method: null, anchor: null, anchorValueAssumed: null, source: draw.integer(SOURCES), ...more })
  }
  add('distance_modulus', modulus, 0.08, { method: 'trgb', anchor: 'trgb-absolute-i', anchorValueAssumed: draw.pick([-4.01, -4.049, -4.05]) })
  add('distance_modulus', modulus, 0.1, { method: 'trgb' })
  add('distance_modulus', modulus, 0.12, { method: 'cepheids', anchor: 'lmc-modulus', anchorValueAssumed: draw.pick([18.41, 18.477, 18.5]) })
  add('distance_modulus', modulus, 0.4, { method: 'tully-fisher' })
  const velocity = 70 * distanceOf(modulus) + 90 * draw.normal()
  add('velocity', velocity, 3)
  add('velocity', velocity, 8)
  add('v_mag', absV + modulus, 0.1)
  add('b_mag', absV + 0.7 + modulus, 0.1)
  add('r_half', 0.2 + 2 * draw.uniform(), 0.01)
  add('axis_ratio', 0.4 + 0.5 * draw.uniform(), 0.01)
  return list
}
