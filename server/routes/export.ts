/** Downloads of the catalogue under a filter, of any size. */
import { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import { z } from 'zod'
import { describeFilter } from '../../core/filters/describe.ts'
import { columnsOf, type Filter } from '../../core/filters/filter.ts'
import { printFilter } from '../../core/filters/print.ts'
import { csvWriter } from '../../core/formats/csv.ts'
import type { TableWriter } from '../../core/formats/table-writer.ts'
import { votableWriter } from '../../core/formats/votable.ts'
import type { Column } from '../../core/columns.ts'
import { answeredAlready } from '../http/catalogue-answer.ts'
import { HttpError } from '../http/errors.ts'
import { route, type Route, type RouteContext } from '../http/route.ts'
import { readRevision, type ReadRevision } from '../queries/at-revision.ts'
import { exportRows, type ExportRow, type ExportRows } from '../queries/export-rows.ts'
import { namesOf } from '../queries/names-of.ts'
import { readFilter } from './read-filter.ts'

const FORMATS = ['csv', 'vot'] as const
type Format = (typeof FORMATS)[number]

/** Each holds a connection while it lasts, and the pages need some too. */
const MOST_AT_ONCE = 4
const PIECE_BYTES = 64 * 1024

let running = 0

type Context = RouteContext<{ format: Format }, Record<string, never>, undefined>

export const exportRoutes: Route[] = [
  route({
    method: 'get', path: '/api/export.:format', summary: 'The catalogue under a filter as a file: csv or vot (VOTable), all rows', permission: 'catalogue.read', limit: 'export', filtered: true,
    params: z.object({ format: z.enum(FORMATS) }),
    handle: async (context: Context) => {
      // A file is the whole answer: what belongs to pages of a list says nothing here.
      const filter: Filter = { ...readFilter(context.request), limit: null, cursor: null }
      const revision = await readRevision(context.knex, context.reader, filter.at)
      if (answeredAlready(context, revision)) return
      if (running >= MOST_AT_ONCE) {
        throw new HttpError(503, 'Busy', 'Several downloads are running already. Nothing is lost: try again in a few seconds.', { kind: 'busy', headers: { 'retry-after': '5' } })
      }
      running++
      try {
        await send(context, filter, revision)
      } finally {
        running--
      }
    },
  }),
]

async function send(context: Context, filter: Filter, revision: ReadRevision): Promise<void> {
  const { knex, params, request, response } = context
  const columns = columnsOf(filter)
  const writer = await writerOf(context, filter, columns, revision)
  const source = await exportRows(knex, filter, columns, revision)
  try {
    // Whoever turns away stops the query, also while nothing has been read yet.
    response.once('close', () => source.rows.destroy())
    const iterator = (source.rows as AsyncIterable<ExportRow>)[Symbol.asyncIterator]()
    // What the database refuses, it refuses before the first row: then no byte has been sent.
    const first = await iterator.next()
    response.setHeader('content-type', writer.mediaType)
    response.setHeader('content-disposition', `attachment; filename="vicinage-r${revision.number}.${params.format}"`)
    if (request.method === 'HEAD') response.end()
    else await pipeline(Readable.from(pieces(writer, first, iterator), { objectMode: false, highWaterMark: PIECE_BYTES }), response)
  } catch (error) {
    if (!response.destroyed) throw error
  } finally {
    await ended(source)
  }
}

/** The file in pieces large enough to be worth sending. */
async function* pieces(writer: TableWriter, first: IteratorResult<ExportRow>, rest: AsyncIterator<ExportRow>): AsyncGenerator<Buffer> {
  let piece = writer.begin()
  for (let row = first; row.done !== true; row = await rest.next()) {
    piece += writer.row(row.value)
    if (piece.length >= PIECE_BYTES) {
      yield Buffer.from(piece, 'utf8')
      piece = ''
    }
  }
  yield Buffer.from(piece + writer.end(), 'utf8')
}

async function ended({ rows, close }: ExportRows): Promise<void> {
  if (!rows.closed) {
    const closed = new Promise((resolve) => rows.once('close', resolve))
    rows.on('error', () => undefined)
    rows.destroy()
    await closed
  }
  await close()
}

async function writerOf({ knex, params }: Context, filter: Filter, columns: readonly Column[], revision: ReadRevision): Promise<TableWriter> {
  if (params.format === 'csv') return csvWriter(columns)
  const labels = Object.fromEntries(await namesOf(knex, namedIn(filter), revision))
  return votableWriter(columns, { revision: revision.number, release: revision.release, filter: describeFilter(filter, labels), query: printFilter(filter).toString() })
}

/** Slugs of galaxies that a filter names. */
function namedIn({ conditions, within }: Filter): string[] {
  const listed = [conditions.host, conditions.main_disturber].flatMap((condition) => (condition?.kind === 'list' ? condition.values : []))
  return within ? [...listed, within.host] : [...listed]
}
