/** A policy as it is typed into a form: a text for each of its leaves, by path. */
import type { MethodKey } from '../../../../core/methods.ts'
import { METHODS } from '../../../../core/methods.ts'
import { policyValues, policyWith } from '../../../../core/scale/policy-leaves.ts'
import { completePolicySchema, type Policy } from '../../../../core/scale/policy.ts'
import { asTyped, typedNumber } from '../../../lib/typed-number.ts'

export type TypedPolicy = Readonly<Record<string, string>>

/** What stands in a field that nobody has typed into. */
export function policyTexts(policy: Policy): Record<string, string> {
  return Object.fromEntries(Object.entries(policyValues(policy)).map(([path, value]) => [path, typeof value === 'number' ? asTyped(value) : value]))
}

export interface ReadPolicy {
  /** What comes of it; of leaves that cannot be read, nothing useful. */
  policy: Policy
  /** What is wrong, by path of the leaf. */
  errors: ReadonlyMap<string, string>
}

/** Reads the form. @param typed - only what was typed into; the rest stays as it is in `base` */
export function readPolicy(base: Policy, typed: TypedPolicy): ReadPolicy {
  const leaves = Object.entries(typed).map(([path, text]) => [path, path === 'name' ? text : (typedNumber(text) ?? Number.NaN)] as const)
  const policy = withAllMethods(policyWith(base, Object.fromEntries(leaves)))
  const parsed = completePolicySchema.safeParse(policy)
  const errors = new Map<string, string>()
  if (!parsed.success) for (const issue of parsed.error.issues) errors.set(leafOf(issue.path, policy), issue.message)
  return { policy: parsed.success ? parsed.data : policy, errors }
}

/** A method that came into the registry since gets a rule to be filled in: tier 9, so that nothing moves by itself. */
function withAllMethods(policy: Policy): Policy {
  const missing = METHODS.filter((m) => !policy.methods.some((rule) => rule.method === m.key))
  return { ...policy, methods: [...policy.methods, ...missing.map((m) => ({ method: m.key as MethodKey, tier: 9, systematic: 0.3, unscaled: 0.1, defaultError: 0.5 }))] }
}

/** `document.methods.4.tier` is `methods.trgb.tier` here. */
export function leafOf(path: readonly PropertyKey[], policy: Policy): string {
  const [first, second, third] = path
  if (first === 'methods' && typeof second === 'number' && third !== undefined) return `methods.${policy.methods[second]?.method ?? second}.${String(third)}`
  return path.map(String).join('.')
}
