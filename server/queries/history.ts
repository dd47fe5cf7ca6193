/** What changed of a galaxy's row, revision by revision. */
import type { Knex } from 'knex'
import { COLUMNS, type CatalogueRow, type CatalogueValue } from '../../core/columns.ts'
import type { History } from '../../core/schema/catalogue.ts'
import type { ReadRevision } from './at-revision.ts'

interface Version {
  revFrom: number
  row: CatalogueRow
  at: Date
  by: string | null
  summary: string
  submission: number | null
  release: string | null
}

/** Stamped by every change, so they tell nothing of it. */
const STAMPS: ReadonlySet<string> = new Set(['revision', 'updated_at'])
/** What the first entry tells of a galaxy that was new then. */
const AT_FIRST: ReadonlySet<string> = new Set(['name', 'status', 'class', 'ra', 'dec', 'dm', 'distance', 'v_hel', 'host', 'host_relation'])

/**
 * Newest first, up to the revision that is read.
 *
 * @param withPeople - whether approvers and submissions are named: to who signed in, not to visitors
 */
export async function historyOf(knex: Knex, galaxy: number, revision: ReadRevision, withPeople: boolean): Promise<History> {
  const answer = await knex.raw<{ rows: Version[] }>(
    `SELECT c.rev_from AS "revFrom", row_to_json(c) AS row, r.approved_at AS at, u.name AS by, r.summary, r.submission,
            (SELECT l.label FROM releases l WHERE l.revision = r.number ORDER BY l.published_at LIMIT 1) AS release
     FROM catalogue_rows c JOIN revisions r ON r.number = c.rev_from LEFT JOIN users u ON u.id = r.approved_by
     WHERE c.galaxy = ? AND c.rev_from <= ? ORDER BY c.rev_from DESC`,
    [galaxy, revision.number],
  )
  return {
    entries: answer.rows.map((version, i) => ({
      revision: version.revFrom,
      at: version.at.toISOString(),
      by: withPeople ? version.by : null,
      summary: version.summary,
      submission: withPeople ? version.submission : null,
      release: version.release,
      changes: differences(answer.rows[i + 1]?.row, version.row),
    })),
  }
}

function differences(before: CatalogueRow | undefined, after: CatalogueRow): History['entries'][number]['changes'] {
  return COLUMNS.filter(({ key }) => !STAMPS.has(key) && (before !== undefined || AT_FIRST.has(key))).flatMap(({ key }) => {
    const [old, now]: CatalogueValue[] = [before?.[key] ?? null, after[key] ?? null]
    return old === now ? [] : [{ column: key, before: old ?? null, after: now ?? null }]
  })
}
