/**
 * The adopted distance modulus: every value on one scale, the best tier only, combined within each method and then across methods.
 *
 * The systematic error of a method is the policy's: the one that authors state (errSys) is mostly that of the zero point which the scale replaces,
 * so it is shown and does not enter.
 *
 * Everything is combined in modulus, never in Mpc: an error common to all that is proportional to the distance would pull a least-squares
 * mean outside its own data (Peelle's puzzle; D'Agostini 1994, Nuclear Instruments and Methods A 346, 306).
 */
import type { Measurement } from '../catalogue/types.ts'
import type { MethodKey } from '../methods.ts'
import type { MethodPolicy } from '../scale/policy.ts'
import type { Adopted, Chosen, Reason, Scale } from './adopted.ts'
import { barred, statedError } from './eligible.ts'
import { pauleMandel, type Combined } from './paule-mandel.ts'
import { hangsOnAnchor, rescaling } from './rescale.ts'
import { distanceSentence } from './sentence.ts'

interface Candidate {
  measurement: Measurement
  rule: MethodPolicy
  shift: number
  scaled: number
  /** Statistical, with the uncertainty of an unknown scale in it. */
  error: number
  flags: string[]
  barred: string | null
}

/** What one method says. */
interface MethodMean {
  method: MethodKey
  members: Candidate[]
  within: Combined
  systematic: number
}

/**
 * @param measurements - all distance moduli of one galaxy
 * @returns null when none can be used
 */
export function adoptDistance(measurements: readonly Measurement[], scale: Scale, override: Chosen | null = null): Adopted | null {
  const candidates = measurements.flatMap((m) => candidate(m, measurements, scale, override))
  const free = candidates.filter((c) => c.barred === null)
  if (free.length === 0) return null
  const tier = override ? null : Math.min(...free.map((c) => c.rule.tier))
  const used = free.filter((c) => tier === null || c.rule.tier === tier)
  const methods = byMethod(used)
  const across = pauleMandel(
    methods.map((m) => m.within.mean),
    methods.map((m) => Math.hypot(m.within.error, m.systematic)),
  )
  const { statistical, systematic } = splitErrors(methods, across, scale)
  const weights = shares(methods, across)
  const reasons = measurements.map((m): Reason => {
    const c = candidates.find((own) => own.measurement === m)
    if (!c) return outsidePolicy(m)
    const weight = weights.get(c) ?? 0
    const residual = (c.scaled - across.mean) / c.error
    return {
      measurementId: c.measurement.id, used: weight > 0, weight, shift: c.shift, scaled: c.scaled, error: c.error, residual,
      tension: Math.abs(residual) > scale.policy.tension, reason: c.barred ?? (weight > 0 ? 'used' : 'lower tier'), flags: c.flags,
    }
  })
  const heaviest = methods.reduce((best, m, i) => ((across.weights[i] ?? 0) > (across.weights[methods.indexOf(best)] ?? 0) ? m : best), methods[0] as MethodMean)
  return {
    quantity: 'distance_modulus', value: across.mean, textValue: null, errPlus: statistical, errMinus: statistical, errSys: systematic,
    nUsed: used.length, nAll: measurements.length, chi2: chiSquared(used, across.mean), dof: used.length - 1, scatter: largestScatter(methods, across),
    method: heaviest.method, sentence: distanceSentence(candidates, weights, override, scale), reasons, override: override?.reason ?? null,
  }
}

/** A method that the policy gives no tier and no errors cannot be weighed. */
function outsidePolicy(m: Measurement): Reason {
  return { measurementId: m.id, used: false, weight: 0, shift: 0, scaled: m.value, error: statedError(m), residual: null, tension: false, reason: 'the policy has no rule for its method', flags: [] }
}

function candidate(m: Measurement, all: readonly Measurement[], scale: Scale, override: Chosen | null): Candidate[] {
  const rule = scale.policy.methods.find((r) => r.method === m.method)
  if (m.value === null || !rule) return []
  const shift = rescaling(m, scale.anchors)
  const stated = statedError(m)
  const unknownScale = shift === null && hangsOnAnchor(rule.method, scale.anchors)
  const own = stated ?? rule.defaultError
  return [{
    measurement: m, rule, shift: shift ?? 0, scaled: m.value + (shift ?? 0), error: unknownScale ? Math.hypot(own, rule.unscaled) : own,
    flags: [...(stated === null ? ['error assumed'] : []), ...(unknownScale ? ['scale unknown'] : [])], barred: barred(m, all, override),
  }]
}

function byMethod(used: readonly Candidate[]): MethodMean[] {
  const keys = [...new Set(used.map((c) => c.rule.method))]
  return keys.map((method) => {
    const members = used.filter((c) => c.rule.method === method)
    return { method, members, within: pauleMandel(members.map((c) => c.scaled), members.map((c) => c.error)), systematic: members[0]?.rule.systematic ?? 0 }
  })
}

/**
 * The statistical part is what would shrink with more measurements by the same methods; the systematic one is the methods' own and that of
 * the anchors that they hang on.
 */
function splitErrors(methods: readonly MethodMean[], across: Combined, scale: Scale): { statistical: number; systematic: number } {
  const share = (i: number): number => across.weights[i] ?? 0
  const statistical = Math.sqrt(methods.reduce((sum, m, i) => sum + (share(i) * m.within.error) ** 2, 0))
  const own = Math.sqrt(Math.max(0, across.error ** 2 - statistical ** 2))
  return { statistical, systematic: Math.hypot(own, anchorError(methods, share, scale)) }
}

/**
 * The uncertainty of the anchors, each counted with the share of the value that hangs on it: an anchor that carries all of it adds its error in
 * full, one that carries half of it adds half. Different anchors are independent of one another.
 */
function anchorError(methods: readonly MethodMean[], share: (i: number) => number, scale: Scale): number {
  return Math.hypot(...scale.anchors.map((a) => a.err * methods.reduce((sum, m, i) => sum + (a.methods.includes(m.method) ? share(i) : 0), 0)))
}

function shares(methods: readonly MethodMean[], across: Combined): Map<Candidate, number> {
  return new Map(methods.flatMap((m, i) => m.members.map((c, k) => [c, (across.weights[i] ?? 0) * (m.within.weights[k] ?? 0)] as const)))
}

function chiSquared(used: readonly Candidate[], mean: number): number {
  return used.reduce((sum, c) => sum + ((c.scaled - mean) / c.error) ** 2, 0)
}

function largestScatter(methods: readonly MethodMean[], across: Combined): number {
  return Math.max(across.tau, ...methods.map((m) => m.within.tau))
}

export type { Candidate as DistanceCandidate }
