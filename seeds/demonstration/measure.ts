/**
 * What the invented literature says of the invented galaxies: drawn about the truth with honest errors.
 */
import type { MethodKey } from '../../core/methods.ts'
import type { Random } from '../../core/random.ts'
import { DEFAULT_ANCHORS } from '../../core/scale/anchors.ts'
import { blank, number, rounded, sourceAbout, sourceTitled, type DrawnMeasurement } from './drawn.ts'
import type { InventedSource } from './literature.ts'
import { photometry } from './photometry.ts'
import type { Systematics } from './systematics.ts'
import type { TrueGalaxy } from './truth.ts'

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

/** Values of the anchors that invented authors assumed, old and new. */
const ASSUMED: Partial<Record<MethodKey, readonly number[]>> = {
  'cepheids': [18.5, 18.477, 18.41],
  'rr-lyrae': [18.5, 18.477],
  'trgb': [-4.05, -4.049, -4.01],
}
/** Of the authors whose method hangs on an anchor, so many say which value of it they took. */
const SAY_SO = 0.8

/** Half-light radii are not measured of what is larger than a field. */
const WIDEST_FIELD_ARCMIN = 240

/** Everything that is measured of one galaxy: one to six distances, and what surveys give. */
export function measure(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[], systematics: Systematics): DrawnMeasurement[] {
  if (g.fromWithin) return measureFromWithin(draw, g, sources)
  const off = systematics.ofGalaxy()
  const one = (how: { method: MethodKey; error: number }): DrawnMeasurement => modulus(draw, g, how, sources, systematics, off)
  const distances = REACH.filter((r) => g.distance < r.within && r.fits(g) && draw.uniform() < r.chance).slice(0, 6).map(one)
  if (distances.length === 0) distances.push(one({ method: 'trgb', error: 0.12 }))
  return [...distances, ...photometry(draw, g, sources), ...structure(draw, g, sources), ...dynamics(draw, g, sources)]
}

/** Of their own galaxy the observers know how far its centre is, and its mass. */
function measureFromWithin(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const centre = sourceTitled(sources, 'centre of our')
  return [
    { ...number(draw, 'distance_modulus', 5 * Math.log10(g.distance) + 25, 0.01, 3, centre), method: 'geometric' },
    { ...number(draw, 'log_mstar', 10.75, 0.1, 2, centre) },
    { ...blank(centre), quantity: 'morphology', textValue: g.morphology, locator: 'section 1' },
  ]
}

function modulus(draw: Random, g: TrueGalaxy, how: { method: MethodKey; error: number }, sources: readonly InventedSource[], systematics: Systematics, off: (method: MethodKey) => number): DrawnMeasurement {
  const source = sourceAbout(draw, sources, how.method)
  const error = rounded(how.error * (0.7 + 0.7 * draw.uniform()), 2)
  const anchor = DEFAULT_ANCHORS.find((a) => a.methods.includes(how.method))
  const assumable = ASSUMED[how.method]
  const assumed = assumable ? draw.pick(assumable) : null
  const saysSo = draw.uniform() < SAY_SO
  const wrong = off(how.method) + (anchor ? (systematics.ofAnchors.get(anchor.key) ?? 0) : 0)
  // One in seven states a larger error downwards; it is drawn with their mean, as which they are read.
  const down = rounded(error * (draw.uniform() < 0.15 ? 1.3 : 1), 2)
  const published = 5 * Math.log10(g.distance) + 25 + ((error + down) / 2) * draw.normal() + wrong
  // Authors who hang on another anchor value publish a modulus that is off by just that. Of those who do not say so nobody knows by how much: by as
  // much as the policy takes them to be.
  const shift = !anchor ? 0 : saysSo && assumed !== null ? (anchor.kind === 'modulus' ? 1 : -1) * (assumed - anchor.value) : systematics.unscaled(how.method) * draw.normal()
  const missing = how.method === 'brightest-stars' && draw.uniform() < 0.3
  return {
    ...blank(source), quantity: 'distance_modulus', value: rounded(published + shift, 2), method: how.method,
    errPlus: missing ? null : error, errMinus: missing ? null : down,
    errSys: draw.uniform() < 0.3 ? 0.05 : null, anchor: saysSo && assumed !== null ? (anchor?.key ?? null) : null, anchorValueAssumed: saysSo ? assumed : null,
    locator: `table ${1 + draw.integer(4)}`,
  }
}

function structure(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const survey = sourceTitled(sources, 'structure')
  const arcmin = (g.radius / (g.distance * 1e6)) * (180 / Math.PI) * 60
  const text = (): DrawnMeasurement => ({ ...blank(survey), quantity: 'morphology', value: null, textValue: g.morphology, locator: 'table 1' })
  const out = [text(), { ...number(draw, 'morph_t', g.stage, 0, 0, survey), errPlus: null, errMinus: null }]
  if (draw.uniform() < 0.9 && arcmin < WIDEST_FIELD_ARCMIN) out.push(number(draw, 'r_half', arcmin, 0.06 * arcmin, 2, survey), number(draw, 'axis_ratio', g.axisRatio, 0.04, 2, survey))
  if (g.axisRatio < 0.85) out.push(number(draw, 'position_angle', g.positionAngle, 4, 0, survey))
  return out.map(within)
}

function dynamics(draw: Random, g: TrueGalaxy, sources: readonly InventedSource[]): DrawnMeasurement[] {
  const survey = sourceTitled(sources, 'velocities')
  const out: DrawnMeasurement[] = []
  if (g.absV < -9 || draw.uniform() < 0.4) out.push(number(draw, 'velocity', g.velocity, g.hiFlux === null ? 5 : 2, 1, survey))
  if (g.hiFlux !== null && g.hiFlux > 0.05 && g.hiFlux < 5e5) out.push(number(draw, 'hi_flux', g.hiFlux, 0.08 * g.hiFlux, 2, survey), number(draw, 'w50', g.lineWidth ?? 40, 3, 0, survey))
  if (g.hiFlux === null && draw.uniform() < 0.6) out.push(number(draw, 'metallicity', g.metallicity, 0.12, 2, survey))
  return out.map(within)
}

/** Measured values stay where such values can be. */
function within(m: DrawnMeasurement): DrawnMeasurement {
  if (m.value === null) return m
  if (m.quantity === 'axis_ratio') return { ...m, value: Math.min(1, Math.max(0.05, m.value)) }
  if (m.quantity === 'position_angle') return { ...m, value: ((m.value % 180) + 180) % 180 }
  if (m.quantity === 'hi_flux' || m.quantity === 'r_half' || m.quantity === 'diameter') return { ...m, value: Math.max(0.01, m.value) }
  if (m.quantity === 'w50') return { ...m, value: Math.max(12, m.value) }
  return m
}
