/** What a change of the scale makes of it as it stands now: it moves what it was made to move, and leaves what others moved meanwhile. */
import { ANCHOR_FIELDS, anchorFields } from '../../../core/scale/anchor-fields.ts'
import type { AnchorField, AnchorFields } from '../../../core/scale/anchor-fields.ts'
import { policyValues, policyWith } from '../../../core/scale/policy-leaves.ts'
import { policySchema } from '../../../core/scale/policy.ts'
import type { Policy } from '../../../core/scale/policy.ts'
import type { HeldAnchor } from './current-scale.ts'
import type { StoredChangeOf } from './types.ts'

/** The fields that a change of an anchor moves: all of a new one. */
export function anchorMoves(c: StoredChangeOf<'anchor.set'>): AnchorField[] {
  const next = anchorFields(c.payload)
  const { base } = c
  return ANCHOR_FIELDS.filter((field) => !base || base.versionId === null || base.fields[field] !== next[field])
}

export function mergedAnchor(c: StoredChangeOf<'anchor.set'>, held: HeldAnchor | undefined): AnchorFields {
  const next = anchorFields(c.payload)
  if (!held) return next
  const moved = new Set(anchorMoves(c))
  const now = anchorFields(held)
  return Object.fromEntries(ANCHOR_FIELDS.map((field) => [field, moved.has(field) ? next[field] : now[field]])) as AnchorFields
}

/** The leaves that a change of the policy moves, by path, with the values it sets. */
export function policyMoves(c: StoredChangeOf<'policy.set'>): Record<string, string | number> {
  const fields = c.base?.fields ?? {}
  return Object.fromEntries(Object.entries(policyValues(c.payload.document)).filter(([path, value]) => fields[path] !== value))
}

/** @throws ZodError when what comes out is no policy, which the bounds of its leaves rule out */
export function mergedPolicy(c: StoredChangeOf<'policy.set'>, held: Policy | undefined): Policy {
  return policySchema.parse(held ? policyWith(held, policyMoves(c)) : c.payload.document)
}
