/** Magnitudes and diameters of the invented galaxies, as the invented surveys give them. */
import { EXTINCTION_PER_TRUE_REDDENING } from '../../core/astro/constants.ts'
import type { Random } from '../../core/random.ts'
import type { InventedSource } from './literature.ts'
import { number, sourceTitled, type DrawnMeasurement } from './drawn.ts'
import type { TrueGalaxy } from './truth.ts'

const WIDEST_PLATE_ARCMIN = 360

type Band = keyof typeof EXTINCTION_PER_TRUE_REDDENING

/** Mean colours about V (Jester et al. 2005, AJ 130, 873, for g and r; V − I by eye; all from memory). */
const COLOUR: Readonly<Record<Band, (g: TrueGalaxy) => number>> = {
  V: () => 0, B: (g) => g.colourBV, K: (g) => -g.colourVK, I: (g) => -0.35 - 0.85 * g.colourBV, g: (g) => 0.6 * g.colourBV - 0.12, r: (g) => -0.42 * g.colourBV + 0.11,
}

export function photometry(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const first = sourceTitled(sources, 'I: photometry')
  const fourth = sourceTitled(sources, 'g and r')
  const band = (key: Band, error: number, source: number): DrawnMeasurement => {
    const apparent = g.absV + COLOUR[key](g) + 5 * Math.log10(g.distance) + 25 + EXTINCTION_PER_TRUE_REDDENING[key] * g.ebv
    return number(draw, `${key.toLowerCase() as Lowercase<Band>}_mag`, apparent, error, 2, source)
  }
  const out = [band('V', 0.05, first), band('B', 0.06, first), { ...number(draw, 'ebv', g.ebv, 0.008, 3, sourceTitled(sources, 'reddening')), convention: 'true' as const }]
  if (g.absV < -15) out.push(band('K', 0.07, first))
  if (g.absV < -9 && draw.uniform() < 0.4) out.push(band('I', 0.05, first))
  if (draw.uniform() < 0.55) out.push(band('g', 0.03, fourth), band('r', 0.03, fourth))
  const size = diameter(draw, g, sources)
  // The nearest fill more than a plate.
  if (g.absV < -14 && (size.value ?? 0) < WIDEST_PLATE_ARCMIN) out.push(size)
  return out
}

/** About four half-light radii: common practice, no source. */
function diameter(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement {
  const arcmin = ((4 * g.radius) / (g.distance * 1e6)) * (180 / Math.PI) * 60
  return number(draw, 'diameter', arcmin * (1 + 0.1 * draw.normal()), 0.08 * arcmin, 2, sourceTitled(sources, 'diameters'))
}
