/** From where a galaxy is and how bright, to all that there is to see of it: sizes, colours and gas follow luminosity and class with scatter (common practice, no source). */
import { convert } from '../../core/astro/frames.ts'
import { velocityLocalGroup } from '../../core/astro/velocities.ts'
import { length, type Vector } from '../../core/astro/vector.ts'
import type { GalaxyClass } from '../../core/classes.ts'
import type { Random } from '../../core/random.ts'
import type { TrueGalaxy } from './truth.ts'

export interface Placed {
  /** Empty for one that has no name but that of a survey. */
  designation: string
  /** Supergalactic, Mpc. */
  at: Vector
  absV: number
  host: string | null
  /** In the frame of the Local Group, km/s. */
  velocity: number
  class: GalaxyClass
}

export function dress(draw: Random, placed: Placed): TrueGalaxy {
  const { at, absV } = placed
  const distance = length(at)
  const sgl = (Math.atan2(at[1], at[0]) * 180) / Math.PI
  const sgb = (Math.asin(at[2] / distance) * 180) / Math.PI
  const sky = convert(sgl, sgb, 'supergalactic', 'equatorial')
  const galactic = convert(sgl, sgb, 'supergalactic', 'galactic')
  const type = TYPES[placed.class]
  const gas = type.gas > 0 ? 10 ** (-0.4 * (absV - 4.8) + Math.log10(type.gas) + 0.2 * draw.normal()) : null
  const latitude = Math.abs(galactic.lat)
  return {
    designation: placed.designation,
    class: placed.class,
    morphology: draw.pick(type.words),
    stage: type.stage,
    ra: sky.lon,
    dec: sky.lat,
    distance,
    latitude: galactic.lat,
    absV,
    colourBV: type.colour + 0.05 * draw.normal(),
    colourVK: 2.3 + 0.8 * (type.colour - 0.5) + 0.1 * draw.normal(),
    ebv: 0.018 + 0.35 * Math.exp(-latitude / 7) * (0.6 + 0.8 * draw.uniform()),
    radius: 10 ** (2.45 - 0.105 * (absV + 10) + type.puff + 0.14 * draw.normal()),
    axisRatio: Math.min(1, Math.max(0.15, type.flat + 0.16 * draw.normal())),
    positionAngle: 180 * draw.uniform(),
    // What the observers measure from the moving Sun.
    velocity: placed.velocity - velocityLocalGroup(0, galactic.lon, galactic.lat),
    hiFlux: gas === null ? null : gas / (2.356e5 * distance ** 2),
    lineWidth: gas === null ? null : 10 ** (1.35 - 0.075 * (absV + 12)) * (1 + 0.1 * draw.normal()),
    metallicity: -1.6 - 0.12 * (absV + 11) + 0.15 * draw.normal(),
    host: placed.host,
    fromWithin: false,
  }
}

interface TypeTraits {
  words: readonly string[]
  stage: number
  /** B − V */
  colour: number
  /** H I mass over V luminosity; 0 for none. */
  gas: number
  /** Added to log radius. */
  puff: number
  /** Mean axis ratio. */
  flat: number
}

const TYPES: Readonly<Record<GalaxyClass, TypeTraits>> = {
  'spiral': { words: ['SA(s)b', 'SAB(r)bc', 'SB(rs)c', 'SA(s)cd'], stage: 4, colour: 0.65, gas: 0.2, puff: -0.05, flat: 0.55 },
  'lenticular': { words: ['SA0', 'SB0', 'S0 pec'], stage: -2, colour: 0.88, gas: 0, puff: -0.1, flat: 0.6 },
  'elliptical': { words: ['E1', 'E3', 'E5'], stage: -5, colour: 0.93, gas: 0, puff: -0.1, flat: 0.8 },
  'dwarf-elliptical': { words: ['dE2', 'dE4', 'dE'], stage: -5, colour: 0.8, gas: 0, puff: 0, flat: 0.75 },
  'dwarf-spheroidal': { words: ['dSph'], stage: -3, colour: 0.72, gas: 0, puff: 0.05, flat: 0.7 },
  'dwarf-irregular': { words: ['Im', 'IB(s)m', 'dIrr'], stage: 10, colour: 0.4, gas: 1.4, puff: 0.1, flat: 0.6 },
  'transition': { words: ['dIrr/dSph'], stage: 10, colour: 0.55, gas: 0.5, puff: 0.05, flat: 0.65 },
  'blue-compact': { words: ['BCD'], stage: 11, colour: 0.3, gas: 1, puff: -0.25, flat: 0.7 },
  'irregular': { words: ['SB(s)m', 'Irr'], stage: 9, colour: 0.45, gas: 0.8, puff: 0.1, flat: 0.55 },
  'ultra-faint': { words: ['UFD'], stage: -3, colour: 0.7, gas: 0, puff: -0.1, flat: 0.6 },
  'unknown': { words: ['?'], stage: 0, colour: 0.6, gas: 0, puff: 0, flat: 0.6 },
}

export function dwarfClass(draw: Random, absV: number, gasRich: boolean): GalaxyClass {
  if (absV > -7.7) return 'ultra-faint'
  if (gasRich) {
    if (absV < -17) return 'irregular'
    return draw.uniform() < 0.13 ? 'blue-compact' : draw.uniform() < 0.15 ? 'transition' : 'dwarf-irregular'
  }
  if (absV < -14.2) return 'dwarf-elliptical'
  return draw.uniform() < 0.1 ? 'transition' : 'dwarf-spheroidal'
}
