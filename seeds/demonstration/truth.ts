/**
 * An invented neighbourhood: what is really there, before anybody measures it.
 *
 * Hosts lie with a flattened scatter about the supergalactic plane. Satellite luminosities follow a Schechter function (Schechter 1976, ApJ
 * 203, 297) and their distances from the host an NFW profile (Navarro, Frenk & White 1997, ApJ 490, 493). Sizes, colours and gas follow
 * luminosity and class with scatter: common practice, no source. Everything comes from the generator handed in.
 */
import { convert } from '../../core/astro/frames.ts'
import type { GalaxyClass } from '../../core/classes.ts'
import type { Random } from '../../core/random.ts'
import { FIELD_NAMES, HOST_NAMES, roman } from './names.ts'

export interface TrueGalaxy {
  designation: string
  class: GalaxyClass
  morphology: string
  stage: number
  /** deg, ICRS */
  ra: number
  dec: number
  /** Mpc */
  distance: number
  /** Galactic latitude, deg: dust hides the faint at low latitude. */
  latitude: number
  /** mag, before extinction */
  absV: number
  colourBV: number
  colourVK: number
  /** True reddening, mag. */
  ebv: number
  /** Semi-major half-light radius, pc. */
  radius: number
  axisRatio: number
  positionAngle: number
  /** Heliocentric, km/s. */
  velocity: number
  /** Jy km/s; null without gas. */
  hiFlux: number | null
  lineWidth: number | null
  metallicity: number
  /** Designation of the host it was placed about; null in the field. */
  host: string | null
}

type Vector = readonly [number, number, number]

/** km/s/Mpc: the invented flow; satellites scatter about it. */
const HUBBLE = 70
const MAX_DISTANCE = 11

/** The whole neighbourhood: hosts, their satellites, the field. */
export function neighbourhood(draw: Random): TrueGalaxy[] {
  const hosts = HOST_NAMES.map((name, i) => host(draw, name, i))
  const satellites = hosts.flatMap((h) => satellitesOf(draw, h))
  const field = FIELD_NAMES.map((name) => fieldGalaxy(draw, name))
  return [...hosts.map((h) => h.galaxy), ...satellites, ...field].filter((g) => seen(draw, g))
}

interface Host {
  galaxy: TrueGalaxy
  at: Vector
  velocity: number
  /** Mpc */
  virialRadius: number
}

function host(draw: Random, name: string, index: number): Host {
  // Two nearby hosts, the others spread in volume.
  const distance = index < 2 ? 0.8 + 2.2 * index + 0.3 * draw.uniform() : 2.8 + 7.4 * Math.cbrt(draw.uniform())
  const angle = 2 * Math.PI * draw.uniform()
  const height = Math.max(-0.75 * distance, Math.min(0.75 * distance, 0.7 * draw.normal()))
  const inPlane = Math.sqrt(distance ** 2 - height ** 2)
  const at: Vector = [inPlane * Math.cos(angle), inPlane * Math.sin(angle), height]
  const early = draw.uniform() < 0.2
  const absV = -20.6 - 1.1 * draw.uniform()
  const galaxy = dress(draw, {
    designation: name, at, absV, host: null, velocity: flow(at) + 70 * draw.normal(),
    class: early ? (draw.uniform() < 0.5 ? 'elliptical' : 'lenticular') : 'spiral',
  })
  return { galaxy, at, velocity: galaxy.velocity, virialRadius: 0.2 * 10 ** (-0.4 * (absV + 21) / 3) }
}

function satellitesOf(draw: Random, h: Host): TrueGalaxy[] {
  const count = Math.round(14 + 9 * (-20.6 - h.galaxy.absV) + 10 * draw.uniform())
  return Array.from({ length: count }, (_, i) => {
    const radius = h.virialRadius * nfwRadius(draw)
    const at = add(h.at, scale(direction(draw), radius))
    const absV = schechterMagnitude(draw, { bright: h.galaxy.absV + 2.2, faint: -6.2, slope: -1.25, knee: -18.5 })
    const gasRich = draw.uniform() < 0.1 + 0.5 * Math.min(1, radius / (1.2 * h.virialRadius))
    return dress(draw, {
      designation: `${h.galaxy.designation} ${roman(i + 1)}`, at, absV, host: h.galaxy.designation, velocity: h.velocity + 95 * draw.normal(),
      class: dwarfClass(draw, absV, gasRich),
    })
  })
}

function fieldGalaxy(draw: Random, name: string): TrueGalaxy {
  const distance = 1.2 + (MAX_DISTANCE - 1.4) * Math.cbrt(draw.uniform())
  const u = direction(draw)
  const flattened: Vector = [u[0], u[1], 0.45 * u[2]]
  const at = scale(flattened, distance / Math.hypot(...flattened))
  const absV = schechterMagnitude(draw, { bright: -19.4, faint: -9, slope: -1.1, knee: -18 })
  return dress(draw, { designation: name, at, absV, host: null, velocity: flow(at) + 60 * draw.normal(), class: dwarfClass(draw, absV, draw.uniform() < 0.85) })
}

/** Fewer faint galaxies at low galactic latitude. */
function seen(draw: Random, g: TrueGalaxy): boolean {
  const hidden = Math.exp(-Math.abs(g.latitude) / 9) * Math.min(1, Math.max(0, (g.absV + 19) / 6))
  const faintness = g.absV + 5 * Math.log10(g.distance) + 25
  return draw.uniform() > hidden && (faintness < 20.5 || draw.uniform() < 0.25)
}

interface Placed {
  designation: string
  at: Vector
  absV: number
  host: string | null
  velocity: number
  class: GalaxyClass
}

function dress(draw: Random, placed: Placed): TrueGalaxy {
  const { at, absV } = placed
  const distance = Math.hypot(...at)
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
    velocity: placed.velocity,
    hiFlux: gas === null ? null : gas / (2.356e5 * distance ** 2),
    lineWidth: gas === null ? null : 10 ** (1.35 - 0.075 * (absV + 12)) * (1 + 0.1 * draw.normal()),
    metallicity: -1.6 - 0.12 * (absV + 11) + 0.15 * draw.normal(),
    host: placed.host,
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

function dwarfClass(draw: Random, absV: number, gasRich: boolean): GalaxyClass {
  if (absV > -7.7) return 'ultra-faint'
  if (gasRich) {
    if (absV < -17) return 'irregular'
    return draw.uniform() < 0.13 ? 'blue-compact' : draw.uniform() < 0.15 ? 'transition' : 'dwarf-irregular'
  }
  if (absV < -14.2) return 'dwarf-elliptical'
  return draw.uniform() < 0.1 ? 'transition' : 'dwarf-spheroidal'
}

/** A radius in units of R200, from the mass profile of an NFW halo of concentration 8, out to 1.25 R200. */
function nfwRadius(draw: Random): number {
  const concentration = 8
  const mass = (x: number): number => Math.log(1 + x) - x / (1 + x)
  const wanted = draw.uniform() * mass(1.25 * concentration)
  let low = 0
  let high = 1.25 * concentration
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2
    if (mass(middle) < wanted) low = middle
    else high = middle
  }
  return Math.max(0.04, high / concentration)
}

/** An absolute magnitude from a Schechter function, by rejection. */
function schechterMagnitude(draw: Random, f: { bright: number; faint: number; slope: number; knee: number }): number {
  const density = (m: number): number => {
    const l = 10 ** (-0.4 * (m - f.knee))
    return l ** (f.slope + 1) * Math.exp(-l)
  }
  const top = Math.max(density(f.faint), density(f.bright), density(f.knee))
  for (;;) {
    const m = f.bright + (f.faint - f.bright) * draw.uniform()
    if (draw.uniform() * top < density(m)) return m
  }
}

function flow(at: Vector): number {
  return HUBBLE * Math.hypot(...at)
}

function direction(draw: Random): Vector {
  const v: Vector = [draw.normal(), draw.normal(), draw.normal()]
  return scale(v, 1 / Math.hypot(...v))
}

function add(a: Vector, b: Vector): Vector {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]]
}

function scale(a: Vector, factor: number): Vector {
  return [a[0] * factor, a[1] * factor, a[2] * factor]
}
