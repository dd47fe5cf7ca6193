/** Every measurement held of a galaxy at a revision, used or not. */
import type { Knex } from 'knex'
import { holdsAt, type ReadRevision } from './at-revision.ts'

/**
 * The answer of `GET /api/galaxies/:slug/measurements` as JSON text; by quantity, newest source first.
 *
 * @param withPeople - whether the names of those who entered them are told: to who signed in, not to visitors
 */
export async function measurementsText(knex: Knex, galaxy: number, revision: ReadRevision, withPeople: boolean): Promise<string> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: { text: string }[] }>(
    `SELECT json_build_object('revision', ?::integer, 'measurements', coalesce(json_agg(json_build_object(
       'id', m.lineage, 'versionId', m.id, 'galaxyId', m.galaxy, 'quantity', m.quantity, 'value', m.value, 'errPlus', m.err_plus, 'errMinus', m.err_minus, 'errSys', m.err_sys,
       'textValue', m.text_value, 'limitFlag', m.limit_flag, 'method', m.method, 'anchor', m.anchor, 'anchorValueAssumed', m.anchor_value_assumed, 'convention', m.convention,
       'published', m.published, 'source', json_build_object('id', s.id, 'label', s.label, 'year', s.year, 'bibcode', s.bibcode, 'doi', s.doi), 'locator', m.locator,
       'note', m.note, 'excludedReason', m.excluded_reason, 'supersedes', m.supersedes, 'enteredBy', ${withPeople ? 'u.name' : 'NULL'}, 'revision', m.rev_from)
       ORDER BY m.quantity, s.year DESC, s.label, m.lineage), '[]'))::text AS text
     FROM measurements m JOIN sources s ON s.id = m.source LEFT JOIN users u ON u.id = m.entered_by
     WHERE m.galaxy = ? AND ${holds.sql('m')}`,
    [revision.number, galaxy, ...holds.bindings],
  )
  const [row] = answer.rows
  if (!row) throw new Error('the measurements query gave no row')
  return row.text
}
