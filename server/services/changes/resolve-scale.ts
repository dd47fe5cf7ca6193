/** Anchors and the policy: checked against the scale as it stands. */
import type { Knex } from 'knex'
import { method } from '../../../core/methods.ts'
import type { ChangePayload } from '../../../core/schema/changes.ts'
import { ANCHOR_FIELDS, anchorFields, anchorKindWords } from '../../../core/scale/anchor-fields.ts'
import { policyDifferences, policyValues } from '../../../core/scale/policy-leaves.ts'
import { anchorsNow, policyNow } from './current-scale.ts'
import type { HeldAnchor } from './current-scale.ts'
import { NO_GROUND } from './ground.ts'
import type { Ground, Say } from './ground.ts'
import { changesOf } from './types.ts'
import type { StoredChange } from './types.ts'

export async function resolveAnchor(knex: Knex, payload: ChangePayload<'anchor.set'>, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const anchors = await anchorsNow(knex)
  const others = changesOf(siblings, 'anchor.set').map((c) => c.payload)
  const held = anchors.get(payload.key)
  if (others.some((o) => o.key === payload.key)) {
    say('payload.key', `This submission already sets the anchor "${held?.label ?? payload.label}". Change that entry instead.`)
  }
  if (held && held.kind !== payload.kind) {
    say('payload.kind', `${held.label} is ${anchorKindWords(held.kind) === 'absolute magnitude' ? 'an absolute magnitude' : 'a distance modulus'}, and an anchor keeps its kind. Add another anchor instead.`)
  }
  const taken = [...anchors.values(), ...others].find((a) => a.key !== payload.key && a.label.toLowerCase() === payload.label.toLowerCase())
  if (taken) say('payload.label', `Another anchor is called "${taken.label}". Two of one name could not be told apart.`)
  payload.methods.forEach((key, i) => {
    const owner = claimant(key, payload.key, anchors, others)
    if (owner) say(`payload.methods.${i}`, `${method(key).label} hangs on ${owner} already, and a method hangs on one anchor. Take it from that one first.`)
  })
  if (!held) return NO_GROUND
  const [now, next] = [anchorFields(held), anchorFields(payload)]
  if (ANCHOR_FIELDS.every((field) => now[field] === next[field])) say('payload.value', `${held.label} holds these values already.`)
  return { base: { versionId: held.versionId, fields: now }, galaxy: null }
}

/** The label of another anchor that a method would hang on, once this submission is carried out. */
function claimant(methodKey: string, own: string, anchors: ReadonlyMap<string, HeldAnchor>, others: readonly ChangePayload<'anchor.set'>[]): string | undefined {
  const hangs = (a: { methods: readonly string[] }): boolean => a.methods.includes(methodKey)
  const set = others.find((o) => o.key !== own && hangs(o))
  if (set) return set.label
  return [...anchors.values()].find((a) => a.key !== own && !others.some((o) => o.key === a.key) && hangs(a))?.label
}

export async function resolvePolicy(knex: Knex, payload: ChangePayload<'policy.set'>, siblings: readonly StoredChange[], say: Say): Promise<Ground> {
  const held = await policyNow(knex)
  if (siblings.some((c) => c.action === 'policy.set')) say('payload.document', 'This submission already sets the policy. Change that entry instead.')
  if (!held) return NO_GROUND
  if (policyDifferences(held.document, payload.document).length === 0) say('payload.document', 'The policy says this already.')
  return { base: { versionId: held.versionId, fields: policyValues(held.document) }, galaxy: null }
}
