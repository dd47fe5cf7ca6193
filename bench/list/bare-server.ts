/**
 * The least that could answer the same: Express, a pg pool, one route a question, the same SQL, the same bytes. What there is to ask comes as
 * JSON in BARE: `[{sql, bindings, before, after}]`, the answer being `before`, the rows as PostgreSQL wrote them, `after`. Prints its port.
 */
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import express from 'express'
import pg from 'pg'

export interface BareQuestion {
  /** Asked one after the other; the last gives the rows, under `docs`. */
  statements: { sql: string; bindings: unknown[] }[]
  before: string
  after: string
}

const questions = JSON.parse(process.env.BARE ?? '[]') as BareQuestion[]
const pool = new pg.Pool({ connectionString: process.env.DATABASE_URL, max: 8 })
const app = express()
app.disable('x-powered-by')
app.set('etag', false)
for (const [i, { statements, before, after }] of questions.entries()) {
  app.get(`/${i}`, async (_request, response) => {
    let docs = ''
    for (const { sql, bindings } of statements) {
      const { rows } = await pool.query<{ docs?: string }>(sql, bindings)
      docs = rows[0]?.docs ?? ''
    }
    response.type('application/json').send(before + docs.slice(1, -1) + after)
  })
}
const server = createServer(app)
server.listen(0, '127.0.0.1', () => process.stdout.write(`${(server.address() as AddressInfo).port}\n`))
