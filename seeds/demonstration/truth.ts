/**
 * An invented neighbourhood: what is really there, before anybody measures it.
 *
 * Hosts lie with a flattened scatter about the supergalactic plane. Satellite luminosities follow a Schechter function, their distances from the
 * host the mass profile of a halo; velocities are a Hubble flow with dispersions. The satellites of two hosts lie mostly in a thin plane. One of the
 * hosts is the galaxy that the observers live in. Everything comes from the generator handed in.
 */
import { designationOf } from '../../core/astro/designation.ts'
import { convert } from '../../core/astro/frames.ts'
import { unitVector } from '../../core/astro/sphere.ts'
import { length, type Vector } from '../../core/astro/vector.ts'
import type { GalaxyClass } from '../../core/classes.ts'
import type { Random } from '../../core/random.ts'
import { direction, directionInPlane, nfwRadius, plus, scaled, schechterMagnitude } from './distributions.ts'
import { dress, dwarfClass } from './dress.ts'
import { FIELD_NAMES, HOST_NAMES, OWN_NAME, roman } from './names.ts'

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
  /** The observers' own: of it they know the distance of the centre and the mass. */
  fromWithin: boolean
}

/** km/s/Mpc: the invented flow; satellites scatter about it. */
const HUBBLE = 70
const MAX_DISTANCE = 11
/** Of the hosts whose satellites lie mostly in a plane: which they are, and how thick it is for its size. */
const PLANES: ReadonlyMap<string, number> = new Map([['Ostrel', 0.18], ['Tamsin', 0.12]])
const SHARE_IN_PLANE = 0.8
/** Field dwarfs that have no name but that of the survey. */
const UNNAMED = 140
/** Where the observers' galaxy has its centre: 8.2 kpc towards Galactic longitude 0. */
const OWN_CENTRE_MPC = 0.0082
/** Nearer to the centre of the galaxy that they live in the observers tell no satellite from its disc. */
const OUTSIDE_OUR_DISC_MPC = 0.025

/** The whole neighbourhood: hosts, their satellites, the field. */
export function neighbourhood(draw: Random): TrueGalaxy[] {
  const hosts = [ownGalaxy(draw), ...HOST_NAMES.map((name, i) => host(draw, name, i))]
  const satellites = hosts.flatMap((h) => satellitesOf(draw, h))
  const field = [...FIELD_NAMES, ...Array.from({ length: UNNAMED }, () => '')].map((name) => fieldGalaxy(draw, name))
  return [...hosts.map((h) => h.galaxy), ...[...satellites, ...field].filter((g) => seen(draw, g))]
}

interface Host {
  galaxy: TrueGalaxy
  at: Vector
  /** In the frame of the Local Group, km/s. */
  velocity: number
  /** Mpc */
  virialRadius: number
}

/** Seen from within: the centre lies where our own Galaxy's does, since dust and zone of avoidance are drawn about that. */
function ownGalaxy(draw: Random): Host {
  const centre = convert(0, 0, 'galactic', 'supergalactic')
  const at = scaled(unitVector(centre.lon, centre.lat), OWN_CENTRE_MPC)
  const absV = -20.9
  const galaxy = { ...dress(draw, { designation: OWN_NAME, at, absV, host: null, velocity: 0, class: 'spiral' }), fromWithin: true }
  return { galaxy, at, velocity: 0, virialRadius: virialRadius(absV) }
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
  const velocity = flow(at) + 70 * draw.normal()
  const galaxy = dress(draw, {
    designation: name, at, absV, host: null, velocity,
    class: early ? (draw.uniform() < 0.5 ? 'elliptical' : 'lenticular') : 'spiral',
  })
  return { galaxy, at, velocity, virialRadius: virialRadius(absV) }
}

/** R200 goes with the cube root of the light, Mpc. */
function virialRadius(absV: number): number {
  return 0.2 * 10 ** ((-0.4 * (absV + 21)) / 3)
}

function satellitesOf(draw: Random, h: Host): TrueGalaxy[] {
  const count = Math.round(35 + 14 * (-20.6 - h.galaxy.absV) + 16 * draw.uniform())
  const normal = direction(draw)
  const thickness = PLANES.get(h.galaxy.designation)
  return Array.from({ length: count }, (_, i) => {
    const radius = Math.max(h.galaxy.fromWithin ? OUTSIDE_OUR_DISC_MPC : 0, h.virialRadius * nfwRadius(draw))
    const towards = thickness !== undefined && draw.uniform() < SHARE_IN_PLANE ? directionInPlane(draw, normal, thickness) : direction(draw)
    const at = plus(h.at, scaled(towards, radius))
    const absV = schechterMagnitude(draw, { bright: h.galaxy.absV + (h.galaxy.fromWithin ? 4 : 2.2), faint: -6.2, slope: -1.25, knee: -18.5 })
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
  const at = scaled(flattened, distance / length(flattened))
  const absV = schechterMagnitude(draw, { bright: name === '' ? -16 : -19.4, faint: -9, slope: -1.1, knee: -18 })
  const galaxy = dress(draw, { designation: name, at, absV, host: null, velocity: flow(at) + 60 * draw.normal(), class: dwarfClass(draw, absV, draw.uniform() < 0.85) })
  return name === '' ? { ...galaxy, designation: designationOf('Demo', galaxy.ra, galaxy.dec) } : galaxy
}

/** Fewer faint galaxies at low galactic latitude, and none too faint for anybody to have found. */
function seen(draw: Random, g: TrueGalaxy): boolean {
  const hidden = Math.exp(-Math.abs(g.latitude) / 9) * Math.min(1, Math.max(0, (g.absV + 19) / 6))
  const faintness = g.absV + 5 * Math.log10(g.distance) + 25
  return draw.uniform() > hidden && (faintness < 20.5 || draw.uniform() < 0.25)
}

function flow(at: Vector): number {
  return HUBBLE * length(at)
}

