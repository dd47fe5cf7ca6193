/** All rows of a filter, as a stream that reads no faster than it is read. */
import type { Readable } from 'node:stream'
import type { Knex } from 'knex'
import type { Client } from 'pg'
import QueryStream from 'pg-query-stream'
import type { CatalogueValue, Column } from '../../core/columns.ts'
import { sortOf, type Filter } from '../../core/filters/filter.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'
import { all, filterFragments, identifier } from './filter-sql.ts'
import { orderBy } from './keyset.ts'
import { timeText } from './list.ts'

const ROWS_A_FETCH = 500
/** A reader slower than this is given up, so that nobody holds a connection for ever. */
const LONGEST_EXPORT_MS = 10 * 60_000

/** What the two calls of knex's client that a stream needs look like. */
interface ConnectionSource {
  acquireConnection: () => Promise<Client>
  releaseConnection: (connection: Client) => Promise<void>
}

export interface ExportRows {
  /** Rows as lists of values, in the order of the columns. */
  rows: Readable
  /** Gives the connection back; to be called once, whatever happened. */
  close: () => Promise<void>
}

/**
 * Begins to read; the first rows are on their way when this returns, and everything that can be refused has been.
 *
 * @throws BadInput
 */
export async function exportRows(knex: Knex, filter: Filter, columns: readonly Column[], revision: ReadRevision): Promise<ExportRows> {
  // By number even where it is the current one: an approval meanwhile must not mix two revisions.
  const holds = holdsAt({ ...revision, current: false })
  const where = all([{ sql: holds.sql(), bindings: holds.bindings }, ...(await filterFragments(knex, filter, revision))])
  const selected = columns.map(({ key, type }) => (type === 'time' ? timeText(identifier(key)) : identifier(key)))
  const query = knex.raw(`SELECT ${selected.join(', ')} FROM catalogue_rows WHERE ${where.sql} ORDER BY ${orderBy(sortOf(filter), false)}`, [...where.bindings]).toSQL().toNative()
  const source = knex.client as ConnectionSource
  const connection = await source.acquireConnection()
  let closed = false
  const close = async (): Promise<void> => {
    if (closed) return
    closed = true
    await connection.query('RESET statement_timeout').catch(() => undefined)
    await source.releaseConnection(connection)
  }
  try {
    await connection.query(`SET statement_timeout = ${LONGEST_EXPORT_MS}`)
    const rows = connection.query(new QueryStream(query.sql, [...query.bindings], { rowMode: 'array', batchSize: ROWS_A_FETCH, highWaterMark: ROWS_A_FETCH }))
    return { rows, close }
  } catch (error) {
    await close()
    throw error
  }
}

/** Rows as the writers take them. */
export type ExportRow = CatalogueValue[]
