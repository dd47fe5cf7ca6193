/**
 * A policy as a list of its leaves, each with a path, a name that people read and its value in words: so that two policies can be compared,
 * and two changes of different leaves do not collide.
 */
import { numberWords } from '../formats/measure-words.ts'
import { METHODS, type MethodKey } from '../methods.ts'
import { GAP } from '../spaces.ts'
import type { MethodPolicy, Policy } from './policy.ts'

export interface PolicyLeaf {
  /** `methods.trgb.tier`, `host.massRatio` */
  path: string
  /** "TRGB: tier", "Hosts: mass ratio" */
  label: string
  value: string | number
  /** With its unit: `0.05 mag`. */
  words: string
}

interface LeafWords {
  label: string
  unit: string
  /** The least decimals printed. */
  decimals: number
}

export type MethodField = Exclude<keyof MethodPolicy, 'method'>
export type HostField = keyof Policy['host']

export const METHOD_FIELDS: Readonly<Record<MethodField, LeafWords>> = {
  tier: { label: 'tier', unit: '', decimals: 0 },
  systematic: { label: 'systematic error', unit: 'mag', decimals: 2 },
  unscaled: { label: 'added where the scale is unknown', unit: 'mag', decimals: 2 },
  defaultError: { label: 'error where none is stated', unit: 'mag', decimals: 2 },
}

export const HOST_FIELDS: Readonly<Record<HostField, LeafWords>> = {
  massRatio: { label: 'mass ratio', unit: '', decimals: 0 },
  sphere: { label: 'radius of the sphere', unit: 'R200', decimals: 1 },
  totalOverStellar: { label: 'total over stellar mass', unit: '', decimals: 1 },
  hubble: { label: 'Hubble constant', unit: 'km/s/Mpc', decimals: 1 },
  draws: { label: 'draws', unit: '', decimals: 0 },
  seed: { label: 'seed of the draws', unit: '', decimals: 0 },
  unknownError: { label: 'error of a modulus that states none', unit: 'mag', decimals: 2 },
}

/** What each of the policy's numbers of hosts means, for those who set it. */
export const HOST_MEANINGS: Readonly<Record<HostField, string>> = {
  massRatio: 'A galaxy can be a host of another when it is at least this many times as massive in stars.',
  sphere: 'How far a host’s sphere reaches, in units of its R200: satellites lie inside.',
  totalOverStellar: 'From the stellar to the total mass of a host, for its R200.',
  hubble: 'For R200, the radius within which the mean density is 200 times the critical one.',
  draws: 'How many times the distances are drawn from their errors for a membership probability.',
  seed: 'Where the draws begin: the same seed gives the same probabilities.',
  unknownError: 'Taken for a modulus without an error, in the draws only.',
}

/** Every leaf of a policy, in the order in which people read them. */
export function policyLeaves(policy: Policy): PolicyLeaf[] {
  const leaf = (path: string, prefix: string, value: number, words: LeafWords): PolicyLeaf => ({
    path, label: `${prefix}: ${words.label}`, value, words: leafWords(value, words),
  })
  return [
    { path: 'name', label: 'Name', value: policy.name, words: policy.name },
    ...METHODS.flatMap(({ key, label }) => {
      const rule = policy.methods.find((m) => m.method === key)
      return rule ? fieldsOf(METHOD_FIELDS).map(([field, words]) => leaf(`methods.${key}.${field}`, label, rule[field], words)) : []
    }),
    { path: 'tension', label: 'Tension', value: policy.tension, words: `${numberWords(policy.tension, 0)}${GAP}σ` },
    ...fieldsOf(HOST_FIELDS).map(([field, words]) => leaf(`host.${field}`, 'Hosts', policy.host[field], words)),
  ]
}

function fieldsOf<K extends string>(record: Readonly<Record<K, LeafWords>>): [K, LeafWords][] {
  return Object.entries(record) as [K, LeafWords][]
}

function leafWords(value: number, { unit, decimals }: LeafWords): string {
  return `${numberWords(value, decimals)}${unit === '' ? '' : GAP + unit}`
}

/** The values of a policy's leaves by path. */
export function policyValues(policy: Policy): Record<string, string | number> {
  return Object.fromEntries(policyLeaves(policy).map((l) => [l.path, l.value]))
}

export interface PolicyDifference {
  path: string
  label: string
  /** null for a method that had no rule. */
  before: string | null
  after: string | null
}

/** What differs between two policies, leaf by leaf, in words; nothing when they say the same. */
export function policyDifferences(before: Policy, after: Policy): PolicyDifference[] {
  const was = new Map(policyLeaves(before).map((l) => [l.path, l]))
  const is = new Map(policyLeaves(after).map((l) => [l.path, l]))
  return [...new Set([...was.keys(), ...is.keys()])].flatMap((path): PolicyDifference[] => {
    const [old, now] = [was.get(path), is.get(path)]
    if (old?.value === now?.value) return []
    return [{ path, label: (now ?? old)?.label ?? path, before: old?.words ?? null, after: now?.words ?? null }]
  })
}

/**
 * A policy with some leaves set, by path. Paths that no policy has are passed over.
 *
 * @param leaves - values by path, as {@link policyValues} gives them
 */
export function policyWith(policy: Policy, leaves: Readonly<Record<string, string | number>>): Policy {
  const next: Policy = { ...policy, methods: policy.methods.map((m) => ({ ...m })), host: { ...policy.host } }
  const rules = new Map(next.methods.map((m) => [m.method as string, m]))
  for (const [path, value] of Object.entries(leaves)) {
    const [first, second = '', third = ''] = path.split('.')
    if (path === 'name') next.name = String(value)
    else if (path === 'tension') next.tension = Number(value)
    else if (first === 'host' && second in HOST_FIELDS) next.host[second as HostField] = Number(value)
    else if (first === 'methods' && third in METHOD_FIELDS) {
      const rule = rules.get(second) ?? { method: second as MethodKey, tier: 0, systematic: 0, unscaled: 0, defaultError: 0 }
      rule[third as MethodField] = Number(value)
      if (!rules.has(second)) next.methods.push(rule)
      rules.set(second, rule)
    }
  }
  return next
}
