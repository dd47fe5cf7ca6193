/** Changes of the scale and of overrides in words. */
import { ANCHOR_FIELDS, anchorFieldLabel, anchorFields, anchorFieldWords, anchorKindWords } from '../../../core/scale/anchor-fields.ts'
import { policyLeaves, policyWith } from '../../../core/scale/policy-leaves.ts'
import type { ChangeAnswer } from '../../../core/schema/submissions.ts'
import { overrideSubjectWords } from '../../../core/schema/changes.ts'
import { choiceWords } from './override-words.ts'
import type { ChoiceVocabulary } from './override-words.ts'
import { anchorMoves, policyMoves } from './scale-merge.ts'
import type { StoredChangeOf } from './types.ts'

type Diff = ChangeAnswer['diff']

const reasonOf = (reason: string): Diff[number] => ({ field: 'Reason', before: null, after: reason })

/** Only what moves; of a new anchor, everything. */
export function anchorWords(c: StoredChangeOf<'anchor.set'>): { subject: string; diff: Diff } {
  const next = anchorFields(c.payload)
  const was = c.base?.versionId == null ? null : c.base.fields
  const diff: Diff = anchorMoves(c).map((field) => {
    const before = was?.[field]
    return { field: anchorFieldLabel(field), before: before == null ? null : anchorFieldWords(field, before as string | number), after: anchorFieldWords(field, next[field]) }
  })
  if (was === null) diff.splice(1, 0, { field: 'Kind', before: null, after: anchorKindWords(c.payload.kind) })
  const label = was === null ? c.payload.label : String(was['label'])
  const what = ANCHOR_FIELDS.filter((field) => was !== null && was[field] !== next[field]).map((field) => anchorFieldLabel(field).toLowerCase())
  return { subject: was === null ? `${label}, a new anchor` : `${label}, ${what.join(', ') || 'as it was'}`, diff: [...diff, reasonOf(c.payload.reason)] }
}

/** Leaf by leaf, with names that people read. */
export function policyWords(c: StoredChangeOf<'policy.set'>): { subject: string; diff: Diff } {
  const moved = policyMoves(c)
  const leaves = policyLeaves(c.payload.document).filter((l) => l.path in moved)
  // What was, in the words of what is: the base keeps bare values.
  const was = c.base?.versionId == null ? new Map<string, string>() : new Map(policyLeaves(policyWith(c.payload.document, baseLeaves(c))).map((l) => [l.path, l.words]))
  const diff: Diff = leaves.map((l) => ({ field: l.label, before: c.base && l.path in c.base.fields ? (was.get(l.path) ?? null) : null, after: l.words }))
  const few = leaves.length <= 2 ? leaves.map((l) => l.label).join(', ') : `${leaves.length} of its rules`
  return { subject: `Adoption policy, ${few}`, diff: [...diff, reasonOf(c.payload.reason)] }
}

function baseLeaves(c: StoredChangeOf<'policy.set'>): Record<string, string | number> {
  return Object.fromEntries(Object.entries(c.base?.fields ?? {}).filter((entry): entry is [string, string | number] => typeof entry[1] === 'string' || typeof entry[1] === 'number'))
}

/** What holds so far, and what is decided instead. */
export function overrideWords(c: StoredChangeOf<'override.set'> | StoredChangeOf<'override.clear'>, name: string, v: ChoiceVocabulary): { subject: string; diff: Diff } {
  const subject = overrideSubjectWords(c.payload.about)
  const before = c.base?.fields['stands']
  const after = c.action === 'override.set' ? choiceWords(c.payload.choice, v) : c.payload.about === 'host' ? 'by the rule' : 'by the policy'
  const label = subject.charAt(0).toUpperCase() + subject.slice(1)
  const was = c.base?.fields['reason']
  const earlier: Diff = typeof was === 'string' ? [{ field: 'Reason so far', before: was, after: null }] : []
  return {
    subject: `${name}, ${c.action === 'override.set' ? 'override of' : 'no override of'} the ${subject}`,
    diff: [{ field: label, before: typeof before === 'string' ? before : null, after }, ...earlier, reasonOf(c.payload.reason)],
  }
}
