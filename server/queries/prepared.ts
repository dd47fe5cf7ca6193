/** Questions that are asked all the time, in words that do not change: PostgreSQL plans them once a connection. */
import { createHash } from 'node:crypto'
import type { Knex } from 'knex'
import type { Client } from 'pg'

/** What knex's client offers and its types do not tell. */
interface PooledClient {
  acquireConnection: () => Promise<Client>
  releaseConnection: (connection: Client) => Promise<void>
  emit: (event: 'query', query: { sql: string; bindings: readonly unknown[] }) => void
}

/** Kept by every connection for as long as it lives, so there must not be many. */
const MOST_STATEMENTS = 100
const known = new Map<string, { text: string; name: string } | null>()

/**
 * Rows of a statement that is worth preparing: one whose best plan does not depend on its values.
 *
 * @param sql - in knex's notation (`?`), without anything of a reader's in its text
 */
export async function preparedRows<Row extends object>(knex: Knex, sql: string, bindings: readonly Knex.RawBinding[]): Promise<Row[]> {
  const statement = statementOf(knex, sql)
  if (!statement || knex.isTransaction) return (await knex.raw<{ rows: Row[] }>(sql, [...bindings])).rows
  const client = knex.client as PooledClient
  const connection = await client.acquireConnection()
  try {
    // For whoever listens to what is asked, as knex itself tells it.
    client.emit('query', { sql: statement.text, bindings })
    return (await connection.query<Row>({ ...statement, values: [...bindings] })).rows
  } finally {
    await client.releaseConnection(connection)
  }
}

function statementOf(knex: Knex, sql: string): { text: string; name: string } | null {
  const found = known.get(sql)
  if (found !== undefined || known.size >= MOST_STATEMENTS) return found ?? null
  const text = (knex.client as { positionBindings: (sql: string) => string }).positionBindings(sql)
  const statement = { text, name: `v${createHash('sha256').update(sql).digest('hex').slice(0, 24)}` }
  known.set(sql, statement)
  return statement
}
