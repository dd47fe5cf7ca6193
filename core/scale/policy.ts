/**
 * The adoption policy: a document that says which methods are believed first, what systematic error each carries, and how hosts are
 * assigned. Versioned in the database and changed only through a submission; this file holds its shape and the one a new catalogue starts with.
 */
import { z } from 'zod'
import { method, METHOD_KEYS } from '../methods.ts'

const within = (lo: number, hi: number, unit = '') => {
  const sentence = `This must be a number from ${lo} to ${hi}${unit}.`
  return z.number(sentence).min(lo, sentence).max(hi, sentence)
}
const wholeWithin = (lo: number, hi: number) => {
  const sentence = `This must be a whole number from ${lo} to ${hi}.`
  return z.int(sentence).min(lo, sentence).max(hi, sentence)
}
const MAGNITUDES = 'This must be more than 0 and at most 2 mag.'
const magnitudeError = z.number(MAGNITUDES).positive(MAGNITUDES).max(2, MAGNITUDES)

export const methodPolicySchema = z.strictObject({
  method: z.enum(METHOD_KEYS),
  /** 1 is believed first; a lower tier is shown and not used. */
  tier: wholeWithin(1, 9),
  /** Systematic error of the method on the catalogue's scale, mag. */
  systematic: magnitudeError,
  /** Added in quadrature when the anchor value assumed is not stated, mag. */
  unscaled: magnitudeError,
  /** Stands in for a missing error bar, mag. */
  defaultError: magnitudeError,
})

export const policySchema = z.strictObject({
  name: z.string().trim().min(1, 'Give the policy a name.').max(120),
  methods: z.array(methodPolicySchema).refine((list) => new Set(list.map((m) => m.method)).size === list.length, 'A method stands here twice.'),
  /** |z| above which a measurement is flagged as in tension; it is never dropped for it. */
  tension: within(2, 10),
  host: z.strictObject({
    /** A disturber counts as a possible host when it is at least this many times as massive in stars. */
    massRatio: within(1, 100),
    /** Radius of a host's sphere in units of its R200. */
    sphere: within(0.5, 4),
    /** Total over stellar mass. */
    totalOverStellar: within(1, 200),
    /** Hubble constant for R200, km/s/Mpc. */
    hubble: within(50, 100, ' km/s/Mpc'),
    /** Draws for membership probabilities, and the seed they start from. */
    draws: wholeWithin(100, 20000),
    seed: wholeWithin(0, 2 ** 31 - 1),
    /** Error of a distance modulus that states none, for draws only, mag. */
    unknownError: magnitudeError,
  }),
})

/**
 * A policy as it may be proposed: with a rule for every method there is. (An older one may lack a method that was added to the registry since;
 * values of it are then shown and not used, until a policy says how.)
 */
export const completePolicySchema = policySchema.superRefine((policy, context) => {
  const missing = METHOD_KEYS.filter((key) => !policy.methods.some((m) => m.method === key))
  if (missing.length > 0) context.addIssue({ code: 'custom', path: ['methods'], message: `No rule for ${missing.map((key) => method(key).label).join(', ')}: every method needs one.` })
})

export type Policy = z.infer<typeof policySchema>
export type MethodPolicy = z.infer<typeof methodPolicySchema>

const rule = (method: MethodPolicy['method'], tier: number, systematic: number, unscaled: number, defaultError: number): MethodPolicy => ({
  method, tier, systematic, unscaled, defaultError,
})

/**
 * The policy of a new catalogue. Tiers and systematics are common practice, no source: geometry and standard candles first, secondary
 * indicators next, compilations after what they compile, assumptions last.
 */
export const DEFAULT_POLICY: Policy = {
  name: 'First policy',
  methods: [
    rule('eclipsing-binaries', 1, 0.03, 0.02, 0.05),
    rule('masers', 1, 0.03, 0.02, 0.05),
    rule('geometric', 1, 0.01, 0.01, 0.02),
    rule('cepheids', 1, 0.05, 0.05, 0.1),
    rule('trgb', 1, 0.05, 0.05, 0.1),
    rule('rr-lyrae', 1, 0.06, 0.05, 0.1),
    rule('miras', 1, 0.08, 0.06, 0.15),
    rule('jagb', 1, 0.06, 0.05, 0.1),
    rule('horizontal-branch', 1, 0.08, 0.06, 0.15),
    rule('red-clump', 1, 0.08, 0.06, 0.15),
    rule('sbf', 2, 0.1, 0.08, 0.2),
    rule('pnlf', 2, 0.1, 0.08, 0.2),
    rule('sn-ia', 2, 0.12, 0.08, 0.2),
    rule('sn-ii', 2, 0.15, 0.1, 0.25),
    rule('compilation', 3, 0.05, 0.05, 0.2),
    rule('tully-fisher', 4, 0.2, 0.1, 0.4),
    rule('fundamental-plane', 4, 0.25, 0.1, 0.4),
    rule('gclf', 4, 0.2, 0.1, 0.3),
    rule('supergiants', 4, 0.25, 0.1, 0.4),
    rule('brightest-stars', 5, 0.35, 0.15, 0.5),
    rule('membership', 6, 0.2, 0.1, 0.4),
    rule('hubble-flow', 7, 0.3, 0.1, 0.6),
  ],
  tension: 3,
  host: { massRatio: 5, sphere: 1.5, totalOverStellar: 21.4, hubble: 67.4, draws: 2000, seed: 20111, unknownError: 0.3 },
}
