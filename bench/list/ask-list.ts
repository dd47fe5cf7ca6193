/** What the list route asks of the database, without HTTP: for recording its statements. */
import type { Knex } from 'knex'
import { parseFilter } from '../../core/filters/parse.ts'
import { VISITOR } from '../../server/auth/people.ts'
import { readRevision } from '../../server/queries/at-revision.ts'
import { listText } from '../../server/queries/list.ts'

export async function askList(knex: Knex, query: string): Promise<string> {
  const { filter } = parseFilter(new URLSearchParams(query))
  return listText(knex, filter, await readRevision(knex, VISITOR, filter.at))
}
