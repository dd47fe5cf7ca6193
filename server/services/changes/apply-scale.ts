/** Anchors and the policy: versions that end, and those that begin. */
import { anchorFields, methodsOfField } from '../../../core/scale/anchor-fields.ts'
import { policyDifferences } from '../../../core/scale/policy-leaves.ts'
import type { Application } from './apply.ts'
import { anchorsNow, policyNow } from './current-scale.ts'
import { insertMany } from './insert-many.ts'
import { mergedAnchor, mergedPolicy } from './scale-merge.ts'
import type { StoredChangeOf } from './types.ts'

export async function applyAnchors({ trx, revision }: Application, changes: readonly StoredChangeOf<'anchor.set'>[]): Promise<void> {
  if (changes.length === 0) return
  const held = await anchorsNow(trx)
  const moved = changes.flatMap((c) => {
    const now = held.get(c.payload.key)
    const next = mergedAnchor(c, now)
    return now && JSON.stringify(anchorFields(now)) === JSON.stringify(next) ? [] : [{ now, kind: c.payload.kind, key: c.payload.key, next }]
  })
  await trx('anchors').whereRaw('id = ANY(?)', [moved.flatMap(({ now }) => now?.versionId ?? [])]).update({ revTo: revision })
  await insertMany(
    trx,
    'anchors',
    moved.map(({ kind, key, next }) => ({
      key, kind, label: next.label, methods: methodsOfField(String(next.methods)), value: next.value, err: next.err, source: next.source, revFrom: revision,
    })),
  )
}

export async function applyPolicy({ trx, revision }: Application, changes: readonly StoredChangeOf<'policy.set'>[]): Promise<void> {
  for (const c of changes) {
    const held = await policyNow(trx)
    const document = mergedPolicy(c, held?.document)
    if (held && policyDifferences(held.document, document).length === 0) continue
    if (held) await trx('policies').where({ id: held.versionId }).update({ revTo: revision })
    await trx('policies').insert({ document: JSON.stringify(document), revFrom: revision })
  }
}
