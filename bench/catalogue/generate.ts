/**
 * Fills a migrated, empty database with an invented catalogue of any size: the versioned tables by COPY, what follows from them by the
 * catalogue's own rebuilding.
 */
import { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import type { Knex } from 'knex'
import type { PoolClient } from 'pg'
import { from as copyFrom } from 'pg-copy-streams'
import { nameKey, slugOf } from '../../core/names.ts'
import { quantity } from '../../core/quantities.ts'
import { layTheScale } from '../../seeds/genesis.ts'
import { rebuildCatalogue } from '../../server/services/revision/rebuild.ts'
import { withSharers } from '../../server/services/revision/whole/threads.ts'
import { invent, SOURCES, type InventedGalaxy } from './invent.ts'

/** The revision that brings the galaxies; the one before lays the scale. */
const REVISION = 2

export interface GenerateOptions {
  galaxies: number
  seed?: number
  /** Who computes: by default, two threads on the database of DATABASE_URL. */
  shared?: { databaseUrl: string; threads: number }
  log?: (sentence: string) => void
}

export interface Generated {
  galaxies: number
  measurements: number
  /** Seconds. */
  loading: number
  rebuilding: number
}

export async function generateCatalogue(knex: Knex, { galaxies: count, seed = 1, shared = { databaseUrl: process.env.DATABASE_URL ?? '', threads: 2 }, log = () => undefined }: GenerateOptions): Promise<Generated> {
  const list = [...invent(count, seed)]
  const started = performance.now()
  await knex.transaction(async (trx) => {
    await layTheScale(trx, null, new Date('2026-01-01T00:00:00Z'))
    await trx('revisions').insert({ number: REVISION, approvedAt: '2026-01-02T00:00:00Z', summary: 'An invented catalogue' })
    const sources = await addSources(trx)
    const ids = await addGalaxyIds(trx, count)
    await copy(trx, 'galaxy_versions (galaxy, designation, slug, status, ra, dec, class, rev_from)', versions(list, ids))
    await copy(trx, 'galaxy_names (galaxy, name, name_key, preferred, rev_from)', names(list, ids))
    await copy(trx, 'measurements (galaxy, quantity, value, err_plus, err_minus, method, anchor, anchor_value_assumed, published, source, rev_from)', measurements(list, ids, sources))
  })
  await knex.raw('analyze galaxies, galaxy_versions, galaxy_names, measurements, sources')
  const loaded = performance.now()
  log(`${count} galaxies loaded in ${seconds(started, loaded).toFixed(1)} s`)
  let told = 0
  const { databaseUrl, threads } = shared
  await knex.transaction((trx) =>
    withSharers(trx, { databaseUrl, threads }, (sharers) =>
      rebuildCatalogue(trx, REVISION, {
        sharers,
        onProgress: ({ done, step }) => {
          if (done < told + 0.1) return
          told = done
          log(`${step}: ${Math.round(100 * done)} % after ${seconds(loaded, performance.now()).toFixed(1)} s`)
        },
      }),
    ),
  )
  await knex.raw('vacuum analyze')
  const rebuilt = performance.now()
  log(`rebuilt in ${seconds(loaded, rebuilt).toFixed(1)} s`)
  return { galaxies: count, measurements: list.reduce((sum, g) => sum + g.measurements.length, 0), loading: seconds(started, loaded), rebuilding: seconds(loaded, rebuilt) }
}

async function addSources(trx: Knex.Transaction): Promise<number[]> {
  const rows = Array.from({ length: SOURCES }, (_, i) => ({
    label: `Bench ${1990 + (i % 36)} ${i}`, title: `Invented source ${i}`, authors: '["Bench, A."]', year: 1990 + (i % 36), kind: 'demonstration',
  }))
  return ((await trx('sources').insert(rows).returning('id')) as { id: number }[]).map((row) => row.id)
}

async function addGalaxyIds(trx: Knex.Transaction, count: number): Promise<number[]> {
  const { rows } = (await trx.raw('insert into galaxies (created_at) select now() from generate_series(1, ?) returning id', [count])) as { rows: { id: number }[] }
  return rows.map((row) => row.id)
}

type Line = readonly (string | number | boolean | null)[]

function* versions(list: readonly InventedGalaxy[], ids: readonly number[]): Generator<Line> {
  for (const [i, g] of list.entries()) yield [ids[i] ?? 0, g.designation, slugOf(g.designation), 'confirmed', g.ra, g.dec, g.class, REVISION]
}

function* names(list: readonly InventedGalaxy[], ids: readonly number[]): Generator<Line> {
  for (const [i, g] of list.entries()) {
    yield [ids[i] ?? 0, g.designation, nameKey(g.designation), true, REVISION]
    yield [ids[i] ?? 0, `BCH ${i + 1}`, nameKey(`BCH ${i + 1}`), false, REVISION]
  }
}

function* measurements(list: readonly InventedGalaxy[], ids: readonly number[], sources: readonly number[]): Generator<Line> {
  for (const [i, g] of list.entries()) {
    for (const m of g.measurements) {
      const published = JSON.stringify({ value: m.value, errPlus: m.error, errMinus: m.error, errSys: null, unit: quantity(m.quantity).unit })
      yield [ids[i] ?? 0, m.quantity, m.value, m.error, m.error, m.method, m.anchor, m.anchorValueAssumed, published, sources[m.source] ?? 0, REVISION]
    }
  }
}

/** Through the connection of the transaction, in COPY's text format. */
async function copy(trx: Knex.Transaction, target: string, lines: Iterable<Line>): Promise<void> {
  const connection = (await (trx.client as { acquireConnection: () => Promise<unknown> }).acquireConnection()) as PoolClient
  await pipeline(Readable.from(chunks(lines)), connection.query(copyFrom(`copy ${target} from stdin`)))
}

function* chunks(lines: Iterable<Line>): Generator<string> {
  let chunk = ''
  for (const line of lines) {
    chunk += `${line.map((field) => (field === null ? '\\N' : String(field).replace(/[\\\t\n\r]/g, (c) => `\\${c}`))).join('\t')}\n`
    if (chunk.length > 1 << 16) {
      yield chunk
      chunk = ''
    }
  }
  if (chunk !== '') yield chunk
}

function seconds(from: number, to: number): number {
  return (to - from) / 1000
}
