/** Gathers what the automatic checks need of the catalogue, and asks them about each change. */
import type { Knex } from 'knex'
import type { Check } from '../../../core/schema/submissions.ts'
import type { Vocabulary } from '../changes/present.ts'
import type { StoredChange } from '../changes/types.ts'

/** What the checks find, by change. */
export async function checksOf(_knex: Knex, changes: readonly StoredChange[], _vocabulary: Vocabulary): Promise<Map<number, Check[]>> {
  return new Map(changes.map((c) => [c.id, []]))
}
