/** The first revision of every catalogue: its scale, before there is any galaxy. */
import type { Knex } from 'knex'
import { COMPUTATION_VERSION } from '../core/computation.ts'
import { DEFAULT_ANCHORS } from '../core/scale/anchors.ts'
import { DEFAULT_POLICY } from '../core/scale/policy.ts'

/** @param approvedBy - user id, or null where nobody has an account yet */
export async function layTheScale(trx: Knex.Transaction, approvedBy: number | null, approvedAt: Date): Promise<void> {
  await trx('revisions').insert({ number: 1, approvedBy, approvedAt, summary: 'The scale that the catalogue starts with' })
  await trx('computations').insert({ version: COMPUTATION_VERSION, revision: 1 })
  await trx('anchors').insert(
    DEFAULT_ANCHORS.map((a) => ({ key: a.key, label: a.label, kind: a.kind, methods: [...a.methods], value: a.value, err: a.err, source: a.source, revFrom: 1 })),
  )
  await trx('policies').insert({ document: JSON.stringify(DEFAULT_POLICY), revFrom: 1 })
}
