/** A page of the catalogue: rows as JSON text made by PostgreSQL, passed through as it is. */
import type { Knex } from 'knex'
import type { Column } from '../../core/columns.ts'
import { columnsOf, sortOf, USUAL_LIMIT, type Filter, type SortKey } from '../../core/filters/filter.ts'
import { partsAt, type Fragment, type ReadRevision } from './at-revision.ts'
import { countRows } from './count.ts'
import { all, filterFragments, identifier } from './filter-sql.ts'
import { preparedRows } from './prepared.ts'
import { after, NEVER_MISSING, orderBy, printCursor, readCursor, type Cursor } from './keyset.ts'

interface Page {
  /** `{...},{...}` without brackets; null for none. */
  docs: string | null
  count: number
  /** Sort keys and galaxy of the last row, as JSON. */
  last: string | null
}

/** The answer of `GET /api/galaxies` as JSON text. @throws BadInput */
export async function listText(knex: Knex, filter: Filter, revision: ReadRevision): Promise<string> {
  const sort = sortOf(filter)
  const limit = filter.limit ?? USUAL_LIMIT
  const cursor = filter.cursor === null ? null : readCursor(sort, filter.cursor)
  const where = all(await filterFragments(knex, filter, revision))
  const [page, total] = await Promise.all([
    readPage(knex, { columns: listedColumns(filter), sort, limit: limit + 1, cursor, where, revision, plain: isPlain(filter) }),
    countRows(knex, where, revision),
  ])
  const next = page.count > limit && page.last !== null ? printCursor(sort, JSON.parse(page.last) as (string | number | null)[]) : null
  return `{"rows":[${page.docs ?? ''}],"total":${total},"next":${JSON.stringify(next)},"revision":${revision.number}}`
}

/** Without conditions the best plan is the same for every page, so it need not be sought again. */
function isPlain({ conditions, has, lacks, q, cone, within }: Filter): boolean {
  return Object.keys(conditions).length + has.length + lacks.length === 0 && q === null && cone === null && within === null
}

/** The identifier is always among them, so that a row can be told from the others. */
function listedColumns(filter: Filter): readonly Column[] {
  const columns = columnsOf(filter)
  return columns.some((c) => c.key === 'slug') ? columns : [...columnsOf({ ...filter, columns: ['slug'] }), ...columns]
}

interface PageRequest {
  columns: readonly Column[]
  sort: readonly SortKey[]
  /** One more row than is shown: it tells whether there is a next page. */
  limit: number
  cursor: Cursor | null
  where: Fragment
  revision: ReadRevision
  /** Whether there are no conditions but the usual ones. */
  plain: boolean
}

/** Rows with a value in the first sort column come from one query, those without, where the page reaches them, from a second. */
async function readPage(knex: Knex, request: PageRequest): Promise<Page> {
  const first = request.sort[0]
  if (!first || NEVER_MISSING.has(first.column)) return readStage(knex, request, null)
  const column = identifier(first.column)
  const amongMissing = request.cursor !== null && request.cursor.values[0] === null
  if (amongMissing) return readStage(knex, request, `${column} IS NULL`)
  const present = await readStage(knex, request, `${column} IS NOT NULL`)
  if (present.count >= request.limit) return present
  const missing = await readStage(knex, { ...request, cursor: null, limit: request.limit - present.count }, `${column} IS NULL`)
  if (missing.count === 0) return present
  const docs = [present.docs, missing.docs].filter((text) => text !== null && text !== '').join(',')
  return { docs: docs === '' ? null : docs, count: present.count + missing.count, last: missing.last ?? present.last }
}

async function readStage(knex: Knex, request: PageRequest, stage: string | null): Promise<Page> {
  const query = pageSql(request, stage)
  const [page] = request.plain ? await preparedRows<Page>(knex, query.sql, query.bindings) : (await knex.raw<{ rows: Page[] }>(query.sql, query.bindings)).rows
  if (!page) throw new Error('a page query gave no row')
  return { ...page, docs: page.docs === null ? null : page.docs.slice(1, -1) }
}

/** The SQL of one stage of a page. The limit stands in its text, so that a plan made once knows it. */
function pageSql({ columns, sort, limit, cursor, where, revision }: PageRequest, stage: string | null): { sql: string; bindings: Knex.RawBinding[] } {
  const conditions = [where, ...(stage === null ? [] : [{ sql: stage, bindings: [] }]), ...(cursor ? [afterIn(sort, cursor, stage)] : [])]
  // Within a stage the first column has values everywhere or nowhere, so where its missing ones stand is no question, and an index can give the order.
  const order = orderBy(sort, stage !== null)
  const parts = partsAt(revision).map((part) => {
    const whole = all([part, ...conditions])
    return { sql: `(SELECT * FROM catalogue_rows WHERE ${whole.sql} ORDER BY ${order} LIMIT ${limit})`, bindings: whole.bindings }
  })
  const shown = limit - 1
  const keys = sort.map((key) => `p.${identifier(key.column)}`).join(', ')
  return {
    sql: `SELECT json_agg(p.doc ORDER BY p.n) FILTER (WHERE p.n <= ${shown})::text AS docs, count(*)::int AS count, max(p.keys) FILTER (WHERE p.n = ${shown}) AS last
      FROM (
        SELECT row_to_json(doc) AS doc, json_build_array(${keys}, p.galaxy)::text AS keys, row_number() OVER () AS n
        FROM (SELECT * FROM (${parts.map((part) => part.sql).join(' UNION ALL ')}) AS found ORDER BY ${order} LIMIT ${limit}) AS p
        CROSS JOIN LATERAL (SELECT ${columns.map(selectColumn).join(', ')}) AS doc
      ) AS p`,
    bindings: parts.flatMap((part) => part.bindings),
  }
}

/** With the first column known to be present, its missing values need not be thought of: an index can begin at the cursor. */
function afterIn(sort: readonly SortKey[], cursor: Cursor, stage: string | null): Fragment {
  const fragment = after(sort, cursor)
  const first = sort[0]
  if (!first || !(stage?.endsWith('IS NOT NULL') ?? false)) return fragment
  const bound = cursor.values[0]
  if (bound == null) return fragment
  return all([{ sql: `${identifier(first.column)} ${first.descending ? '<=' : '>='} ?`, bindings: [bound] }, fragment])
}

function selectColumn(column: Column): string {
  const name = `p.${identifier(column.key)}`
  return column.type === 'time' ? `${timeText(name)} AS ${identifier(column.key)}` : name
}

/** A time as every answer and export writes it. */
export function timeText(name: string): string {
  return `to_char(${name} AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS"Z"')`
}
