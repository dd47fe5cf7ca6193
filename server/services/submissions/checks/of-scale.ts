/** What the checks of anchors need: the anchor as it is. */
import type { Knex } from 'knex'
import type { Anchor } from '../../../../core/catalogue/types.ts'
import { checkAnchor } from '../../../../core/checks/run.ts'
import type { Check } from '../../../../core/schema/submissions.ts'
import { changesOf } from '../../changes/types.ts'
import type { StoredChange } from '../../changes/types.ts'

export async function checksOfScale(knex: Knex, changes: readonly StoredChange[]): Promise<[number, Check[]][]> {
  const anchors = changesOf(changes, 'anchor.set')
  if (anchors.length === 0) return []
  const held = (await knex('anchors').whereNull('revTo').select('key', 'label', 'value', 'err')) as Pick<Anchor, 'key' | 'label' | 'value' | 'err'>[]
  return anchors.map((c) => [c.id, checkAnchor({ before: held.find((a) => a.key === c.payload.key) ?? null, after: c.payload })])
}
