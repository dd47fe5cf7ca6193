/**
 * What the invented literature says of the invented galaxies: drawn about the truth with honest errors.
 */
import type { MethodKey } from '../../core/methods.ts'
import type { QuantityKey, ReddeningConvention } from '../../core/quantities.ts'
import type { Random } from '../../core/random.ts'
import type { InventedSource } from './literature.ts'
import type { TrueGalaxy } from './truth.ts'

export interface DrawnMeasurement {
  quantity: QuantityKey
  value: number | null
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  textValue: string | null
  method: MethodKey | null
  anchor: string | null
  anchorValueAssumed: number | null
  convention: ReddeningConvention | null
  /** Index into the invented literature. */
  source: number
  locator: string
}

/** Which methods reach how far (Mpc), how well (mag), for whom. */
const REACH: readonly { method: MethodKey; within: number; error: number; chance: number; fits: (g: TrueGalaxy) => boolean }[] = [
  { method: 'eclipsing-binaries', within: 1.2, error: 0.04, chance: 0.3, fits: (g) => g.absV < -15 },
  { method: 'rr-lyrae', within: 1.8, error: 0.07, chance: 0.5, fits: () => true },
  { method: 'horizontal-branch', within: 2.2, error: 0.12, chance: 0.35, fits: (g) => g.hiFlux === null },
  { method: 'cepheids', within: 10, error: 0.06, chance: 0.8, fits: (g) => g.hiFlux !== null && g.absV < -15 },
  { method: 'trgb', within: 10.5, error: 0.06, chance: 0.92, fits: () => true },
  { method: 'trgb', within: 7, error: 0.09, chance: 0.4, fits: () => true },
  { method: 'jagb', within: 5, error: 0.08, chance: 0.25, fits: (g) => g.absV < -13 },
  { method: 'sbf', within: 11.5, error: 0.18, chance: 0.35, fits: (g) => g.hiFlux === null },
  { method: 'pnlf', within: 11, error: 0.15, chance: 0.3, fits: (g) => g.absV < -18 },
  { method: 'tully-fisher', within: 12, error: 0.38, chance: 0.55, fits: (g) => g.hiFlux !== null },
  { method: 'brightest-stars', within: 9, error: 0.5, chance: 0.3, fits: (g) => g.hiFlux !== null },
]

/** Anchor and the values of it that invented authors assumed, old and new. */
const ANCHORS: Partial<Record<MethodKey, { key: string; adopted: number; sign: 1 | -1; assumed: readonly number[] }>> = {
  'cepheids': { key: 'lmc-modulus', adopted: 18.477, sign: 1, assumed: [18.5, 18.477, 18.41] },
  'rr-lyrae': { key: 'lmc-modulus', adopted: 18.477, sign: 1, assumed: [18.5, 18.477] },
  'trgb': { key: 'trgb-absolute-i', adopted: -4.049, sign: -1, assumed: [-4.05, -4.049, -4.01] },
}

/** Everything that is measured of one galaxy: at least one distance. */
export function measure(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const distances = REACH.filter((r) => g.distance < r.within && r.fits(g) && draw.uniform() < r.chance).map((r) => modulus(draw, g, r, sources))
  if (distances.length === 0) distances.push(modulus(draw, g, { method: 'trgb', error: 0.12 }, sources))
  return [...distances.slice(0, 6), ...photometry(draw, g, sources), ...structure(draw, g, sources), ...dynamics(draw, g, sources)]
}

function modulus(draw: Random, g: TrueGalaxy, how: { method: MethodKey; error: number }, sources: readonly InventedSource[]): DrawnMeasurement {
  const source = sourceAbout(draw, sources, how.method)
  const error = round(how.error * (0.7 + 0.7 * draw.uniform()), 2)
  const anchor = ANCHORS[how.method]
  const assumed = anchor && draw.uniform() < 0.8 ? draw.pick(anchor.assumed) : null
  const published = 5 * Math.log10(g.distance) + 25 + error * draw.normal() + (sources[source]?.zeroPoint ?? 0)
  // Authors who hang on another anchor value publish a modulus that is off by just that.
  const shift = anchor && assumed !== null ? anchor.sign * (assumed - anchor.adopted) : 0
  const missing = how.method === 'brightest-stars' && draw.uniform() < 0.3
  return {
    ...blank(source), quantity: 'distance_modulus', value: round(published + shift, 2), method: how.method,
    errPlus: missing ? null : error, errMinus: missing ? null : round(error * (draw.uniform() < 0.15 ? 1.3 : 1), 2),
    errSys: draw.uniform() < 0.3 ? 0.05 : null, anchor: assumed === null ? null : (anchor?.key ?? null), anchorValueAssumed: assumed,
    locator: `table ${1 + draw.integer(4)}`,
  }
}

function photometry(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const survey = sourceTitled(sources, 'photometry')
  const apparent = (abs: number, extinction: number): number => abs + 5 * Math.log10(g.distance) + 25 + extinction * g.ebv
  const band = (quantity: QuantityKey, truth: number, error: number): DrawnMeasurement => number(draw, quantity, truth, error, 2, survey)
  const out = [
    band('v_mag', apparent(g.absV, 3.1), 0.05),
    band('b_mag', apparent(g.absV + g.colourBV, 4.1), 0.06),
    { ...number(draw, 'ebv', g.ebv, 0.008, 3, sourceTitled(sources, 'reddening')), convention: 'true' as const },
  ]
  if (g.absV < -15) out.push(band('k_mag', apparent(g.absV - g.colourVK, 0.35), 0.07))
  return out
}

function structure(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const survey = sourceTitled(sources, 'structure')
  const arcmin = (g.radius / (g.distance * 1e6)) * (180 / Math.PI) * 60
  const text = (): DrawnMeasurement => ({ ...blank(survey), quantity: 'morphology', value: null, textValue: g.morphology, locator: 'table 1' })
  const out = [text(), { ...number(draw, 'morph_t', g.stage, 0, 0, survey), errPlus: null, errMinus: null }]
  if (draw.uniform() < 0.9) out.push(number(draw, 'r_half', arcmin, 0.06 * arcmin, 2, survey), number(draw, 'axis_ratio', g.axisRatio, 0.04, 2, survey))
  if (g.axisRatio < 0.85) out.push(number(draw, 'position_angle', g.positionAngle, 4, 0, survey))
  return out.map(within)
}

function dynamics(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const survey = sourceTitled(sources, 'velocities')
  const out: DrawnMeasurement[] = []
  if (g.absV < -9 || draw.uniform() < 0.4) out.push(number(draw, 'velocity', g.velocity, g.hiFlux === null ? 5 : 2, 1, survey))
  if (g.hiFlux !== null && g.hiFlux > 0.05) out.push(number(draw, 'hi_flux', g.hiFlux, 0.08 * g.hiFlux, 2, survey), number(draw, 'w50', g.lineWidth ?? 40, 3, 0, survey))
  if (g.hiFlux === null && draw.uniform() < 0.6) out.push(number(draw, 'metallicity', g.metallicity, 0.12, 2, survey))
  return out.map(within)
}

/** Measured values stay where such values can be. */
function within(m: DrawnMeasurement): DrawnMeasurement {
  if (m.value === null) return m
  if (m.quantity === 'axis_ratio') return { ...m, value: Math.min(1, Math.max(0.05, m.value)) }
  if (m.quantity === 'position_angle') return { ...m, value: ((m.value % 180) + 180) % 180 }
  if (m.quantity === 'hi_flux' || m.quantity === 'r_half') return { ...m, value: Math.max(0.01, m.value) }
  if (m.quantity === 'w50') return { ...m, value: Math.max(12, m.value) }
  return m
}

function number(draw: Random, quantity: QuantityKey, truth: number, error: number, decimals: number, source: number): DrawnMeasurement {
  const bar = error > 0 ? Math.max(10 ** -decimals, round(error, decimals)) : null
  const value = round(truth + error * draw.normal(), decimals)
  return { ...blank(source), quantity, value: quantity === 'ebv' ? Math.max(0, value) : value, errPlus: bar, errMinus: bar, locator: `table ${1 + draw.integer(5)}` }
}

function blank(source: number): DrawnMeasurement {
  return {
    quantity: 'distance_modulus', value: null, errPlus: null, errMinus: null, errSys: null, textValue: null, method: null, anchor: null,
    anchorValueAssumed: null, convention: null, source, locator: '',
  }
}

function sourceAbout(draw: Random, sources: readonly InventedSource[], about: InventedSource['about']): number {
  const fitting = sources.flatMap((s, i) => (s.about === about ? [i] : []))
  return fitting.length === 0 ? 0 : draw.pick(fitting)
}

function sourceTitled(sources: readonly InventedSource[], word: string): number {
  return Math.max(0, sources.findIndex((s) => s.title.includes(word)))
}

function round(x: number, decimals: number): number {
  return Number(x.toFixed(decimals))
}
