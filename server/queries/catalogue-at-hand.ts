import type { Knex } from 'knex'
import type { Session } from '../../core/schema/session.ts'

/** Which catalogue this is: its kind, its current revision, its newest release. */
export async function catalogueAtHand(knex: Knex): Promise<Session['catalogue']> {
  const { rows } = (await knex.raw(`
    select (select kind from catalogue_kind) as kind, coalesce((select max(number) from revisions), 0) as revision,
           (select label from releases order by revision desc, published_at desc limit 1) as release`)) as { rows: Session['catalogue'][] }
  const [found] = rows
  if (!found) throw new Error('the catalogue did not say what it is')
  return found
}
