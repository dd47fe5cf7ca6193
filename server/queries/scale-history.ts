/** How the scale came to be: anchors and policy, revision by revision. */
import type { Knex } from 'knex'
import type { Anchor } from '../../core/catalogue/types.ts'
import type { ScaleHistory } from '../../core/schema/scale.ts'
import { ANCHOR_FIELDS, anchorFieldLabel, anchorFields, anchorFieldWords } from '../../core/scale/anchor-fields.ts'
import { policyDifferences } from '../../core/scale/policy-leaves.ts'
import { policySchema, type Policy } from '../../core/scale/policy.ts'
import type { ReadRevision } from './at-revision.ts'

type Entry = ScaleHistory['entries'][number]
type AnchorVersion = Anchor & { revFrom: number }

/**
 * Newest first, up to the revision that is read.
 *
 * @param withPeople - whether approvers and submissions are named: to who signed in, not to visitors
 */
export async function scaleHistoryOf(knex: Knex, revision: ReadRevision, withPeople: boolean): Promise<ScaleHistory> {
  const anchors = (await knex('anchors').select('key', 'label', 'kind', 'methods', 'value', 'err', 'source', 'revFrom').where('revFrom', '<=', revision.number).orderBy(['revFrom', 'label', 'key'])) as AnchorVersion[]
  const policies = (await knex('policies').select('document', 'revFrom').where('revFrom', '<=', revision.number).orderBy('revFrom')) as { document: unknown; revFrom: number }[]
  const changes = new Map<number, Entry['changes']>()
  const tell = (at: number, told: Entry['changes']): void => void changes.set(at, [...(changes.get(at) ?? []), ...told])
  const latest = new Map<string, AnchorVersion>()
  for (const a of anchors) {
    tell(a.revFrom, anchorChanges(latest.get(a.key), a))
    latest.set(a.key, a)
  }
  let before: Policy | undefined
  for (const { document, revFrom } of policies) {
    const policy = policySchema.parse(document)
    tell(revFrom, before ? policyDifferences(before, policy).map((d) => ({ subject: 'Adoption policy', field: d.label, before: d.before, after: d.after })) : [{ subject: 'Adoption policy', field: 'Name', before: null, after: policy.name }])
    before = policy
  }
  const made = (await knex('revisions as r')
    .leftJoin('users as u', 'u.id', 'r.approvedBy')
    .select('r.number', 'r.approvedAt', 'u.name as by', 'r.summary', 'r.submission')
    .whereRaw('r.number = ANY(?)', [[...changes.keys()]])
    .orderBy('r.number', 'desc')) as { number: number; approvedAt: Date; by: string | null; summary: string; submission: number | null }[]
  return {
    entries: made.map((r) => ({
      revision: r.number, at: r.approvedAt.toISOString(), by: withPeople ? r.by : null, summary: r.summary, submission: withPeople ? r.submission : null, changes: changes.get(r.number) ?? [],
    })),
  }
}

/** Of a new anchor its value, error and methods; of one that moved, what moved. */
function anchorChanges(before: AnchorVersion | undefined, after: AnchorVersion): Entry['changes'] {
  const now = anchorFields(after)
  const was = before && anchorFields(before)
  return ANCHOR_FIELDS.filter((field) => (was ? was[field] !== now[field] : field !== 'label')).map((field) => ({
    subject: after.label, field: anchorFieldLabel(field), before: was ? anchorFieldWords(field, was[field]) : null, after: anchorFieldWords(field, now[field]),
  }))
}
