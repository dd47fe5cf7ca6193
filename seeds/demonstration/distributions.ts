/** Published distributions that the neighbourhood is drawn from. Everything comes from the generator handed in. */
import { length, type Vector } from '../../core/astro/vector.ts'
import type { Random } from '../../core/random.ts'

const CONCENTRATION = 8
/** Satellites are followed out to so many R200. */
const OUTERMOST = 1.25
/** The disc of the host, in R200: nobody is told apart there. */
const INNERMOST = 0.04

/** A radius in units of R200 from the mass profile of a halo of concentration 8: Navarro, Frenk & White 1997, ApJ 490, 493. */
export function nfwRadius(draw: Random): number {
  const mass = (x: number): number => Math.log(1 + x) - x / (1 + x)
  const wanted = draw.uniform() * mass(OUTERMOST * CONCENTRATION)
  let low = 0
  let high = OUTERMOST * CONCENTRATION
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2
    if (mass(middle) < wanted) low = middle
    else high = middle
  }
  return Math.max(INNERMOST, high / CONCENTRATION)
}

export interface LuminosityFunction {
  /** Absolute magnitudes between which it is drawn. */
  bright: number
  faint: number
  slope: number
  knee: number
}

/** An absolute magnitude from a Schechter function (Schechter 1976, ApJ 203, 297), by rejection. */
export function schechterMagnitude(draw: Random, f: LuminosityFunction): number {
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

/** A direction, every one as likely. */
export function direction(draw: Random): Vector {
  const v: Vector = [draw.normal(), draw.normal(), draw.normal()]
  return scaled(v, 1 / length(v))
}

/** A direction near the plane across a normal: the height above it is a fraction of what chance would give. */
export function directionInPlane(draw: Random, normal: Vector, thickness: number): Vector {
  const v = direction(draw)
  const height = v[0] * normal[0] + v[1] * normal[1] + v[2] * normal[2]
  const flat = plus(v, scaled(normal, (thickness - 1) * height))
  return scaled(flat, 1 / length(flat))
}

export function plus(a: Vector, b: Vector): Vector {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]]
}

export function scaled(a: Vector, factor: number): Vector {
  return [a[0] * factor, a[1] * factor, a[2] * factor]
}
