/** A proposal to change the scale, as it is typed, and the changes that it comes to. */
import type { ChangeForm } from '../../../core/schema/changes.ts'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import { policyDifferences, type PolicyDifference } from '../../../core/scale/policy-leaves.ts'
import { anchorDiffers, readAnchor, type TypedAnchor } from '../../components/curation/scale/anchor-typed.ts'
import { readPolicy, type TypedPolicy } from '../../components/curation/scale/policy-typed.ts'

export interface Proposal {
  /** Anchors that hold, as typed so far, by key. */
  anchors: Readonly<Record<string, TypedAnchor>>
  added: readonly TypedAnchor[]
  policy: TypedPolicy
  reason: string
  title: string
  /** Number of an own draft, or null for a new one. */
  draft: number | null
}

export const NO_PROPOSAL: Proposal = { anchors: {}, added: [], policy: {}, reason: '', title: '', draft: null }

/** One thing that would change. */
export interface Proposed {
  /** Of the anchor, `policy`, or `added.0`. */
  key: string
  label: string
  body: ChangeForm | null
  /** What is wrong, by field. */
  errors: ReadonlyMap<string, string>
}

export interface ReadProposal {
  proposed: readonly Proposed[]
  differences: readonly PolicyDifference[]
  policyErrors: ReadonlyMap<string, string>
}

/** Reads what was typed against the scale that holds: only what differs is proposed. */
export function readProposal(typed: Proposal, scale: ScaleAnswer): ReadProposal {
  const keys = scale.anchors.map((a) => a.key)
  const held = scale.anchors.flatMap((a) => {
    const anchor = typed.anchors[a.key]
    return anchor && anchorDiffers(anchor, a) ? [ofAnchor(a.key, a.label, anchor, typed.reason, keys)] : []
  })
  const added = typed.added.map((anchor, i) => ofAnchor(`added.${i}`, anchor.label || 'A new anchor', anchor, typed.reason, keys))
  const { policy, errors } = readPolicy(scale.policy, typed.policy)
  const differences = errors.size === 0 ? policyDifferences(scale.policy, policy) : []
  const ofPolicy: Proposed[] =
    errors.size > 0 || differences.length > 0
      ? [{ key: 'policy', label: 'Adoption policy', errors, body: errors.size > 0 ? null : { action: 'policy.set', payload: { document: policy, reason: typed.reason } } }]
      : []
  return { proposed: [...held, ...added, ...ofPolicy], differences, policyErrors: errors }
}

function ofAnchor(key: string, label: string, anchor: TypedAnchor, reason: string, taken: readonly string[]): Proposed {
  // The reason is one for all, and has a field of its own.
  const parsed = readAnchor(anchor, reason.trim().length >= 3 ? reason : '...', taken)
  if (parsed.success) return { key, label, errors: new Map(), body: { action: 'anchor.set', payload: { ...parsed.data, reason } } }
  return { key, label, errors: new Map(parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message])), body: null }
}

/** What the submission is called when nobody says otherwise. */
export function titleOf(proposed: readonly Proposed[]): string {
  return proposed.length === 0 ? '' : `Scale: ${proposed.map((p) => p.label).join(', ')}`.slice(0, 160)
}
