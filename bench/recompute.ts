/**
 * Everything computed anew: adopted values, derived values, hosts with their draws, held against what stands. With one thread and with two, from
 * 1,000 galaxies to 100,000 (ten measurements each), then what an anchor moved everywhere costs, foreseen and written, and how little one
 * measurement touches.
 */
import type { Knex } from 'knex'
import type { Scale } from '../core/adoption/adopted.ts'
import { openDatabase } from '../server/database.ts'
import { migrateToLatest } from '../server/maintenance/migrate.ts'
import { computeRevision } from '../server/services/revision/compute.ts'
import { galaxiesAcrossTheSky, loadScale } from '../server/services/revision/load.ts'
import { readSurroundings } from '../server/services/revision/neighbourhood-cache.ts'
import { rebuildCatalogue } from '../server/services/revision/rebuild.ts'
import { recompute, type Progress } from '../server/services/revision/whole/recompute.ts'
import { withSharers } from '../server/services/revision/whole/threads.ts'
import { generateCatalogue } from './catalogue/generate.ts'

const SIZES = (process.env.BENCH_SIZES ?? '1000,10000,100000').split(',').map(Number)
const THREADS = Number(process.env.BENCH_THREADS ?? 2)
const BAR_S = 60
const say = (line: string): void => void process.stdout.write(`${line}\n`)
const seconds = (ms: number): string => `${(ms / 1000).toFixed(1)} s`

async function timed<T>(work: () => Promise<T>): Promise<{ ms: number; result: T }> {
  const begun = performance.now()
  const result = await work()
  return { ms: performance.now() - begun, result }
}

/** How long each step takes, from how far the computation says it is. */
function stepClock(): { hear: (progress: Progress) => void; words: () => string } {
  const begun = new Map<string, number>()
  return {
    hear: ({ step }) => void (begun.has(step) || begun.set(step, performance.now())),
    words: () => {
      const list = [...begun]
      return list.map(([step, at], i) => `${step.toLowerCase()} ${seconds((list[i + 1]?.[1] ?? performance.now()) - at)}`).join(', ')
    },
  }
}

const movedBy = (scale: Scale, by: number): Scale => ({ ...scale, anchors: scale.anchors.map((a) => (a.key === 'trgb-absolute-i' ? { ...a, value: a.value + by } : a)) })

function foresee(knex: Knex, databaseUrl: string, threads: number, by: number, onProgress?: (progress: Progress) => void): Promise<{ galaxiesChanged: number; distancesMoved: number }> {
  return knex.transaction(
    async (trx) => {
      const scale = movedBy(await loadScale(trx), by)
      const ids = await galaxiesAcrossTheSky(trx)
      return withSharers(trx, { databaseUrl, threads, enough: 1 }, async (sharers) => (await recompute(sharers, { scale, ids, onProgress })).effect.counts)
    },
    { isolationLevel: 'repeatable read', readOnly: true },
  )
}

/** A database of its own for each size: revisions are never taken back, so one cannot be emptied. */
async function freshDatabase(base: string, name: string): Promise<string> {
  const knex = openDatabase({ databaseUrl: base, purpose: 'upkeep', connections: 1 })
  try {
    await knex.raw('drop database if exists ?? with (force)', [name])
    await knex.raw('create database ??', [name])
  } finally {
    await knex.destroy()
  }
  const address = new URL(base)
  address.pathname = `/${name}`
  return address.href
}

async function main(): Promise<boolean> {
  let within = true
  for (const galaxies of SIZES) {
    const last = galaxies === SIZES.at(-1)
    const databaseUrl = await freshDatabase(process.env.DATABASE_URL ?? '', `bench_recompute_${galaxies}`)
    const knex = openDatabase({ databaseUrl, purpose: 'upkeep', connections: 3 })
    try {
      await migrateToLatest(knex)
      const took = await measure(knex, databaseUrl, galaxies)
      if (last) {
        within = took <= BAR_S * 1000
        await approveScale(knex, databaseUrl)
      }
    } finally {
      await knex.destroy()
    }
  }
  say(`bar: ${SIZES.at(-1) ?? 0} galaxies computed anew under ${BAR_S} s`)
  return within
}

/** @returns how long computing everything anew took in threads, ms */
async function measure(knex: Knex, databaseUrl: string, galaxies: number): Promise<number> {
  const made = await generateCatalogue(knex, { galaxies, shared: { databaseUrl, threads: THREADS } })
  say(`${galaxies} galaxies, ${made.measurements} measurements; computed from nothing and written: ${made.rebuilding.toFixed(1)} s`)
  const clock = stepClock()
  const several = await timed(() => foresee(knex, databaseUrl, THREADS, 0, clock.hear))
  const words = clock.words()
  const one = await timed(() => foresee(knex, databaseUrl, 1, 0))
  if (several.result.galaxiesChanged + one.result.galaxiesChanged > 0) throw new Error('computing anew changed something')
  say(`  computed anew, ${THREADS} threads: ${seconds(several.ms)} (${((1000 * several.ms) / galaxies).toFixed(0)} µs a galaxy; one thread takes ${(one.ms / several.ms).toFixed(2)} times as long)`)
  say(`    ${words}`)
  const anchor = await timed(() => foresee(knex, databaseUrl, THREADS, 0.05))
  say(`  an anchor moved, foreseen: ${seconds(anchor.ms)}; ${anchor.result.distancesMoved} distances move, ${anchor.result.galaxiesChanged} galaxies change`)
  await touchOne(knex)
  return several.ms
}

/** What one galaxy's distance moves: the rows that have to be looked at, and how long it takes. */
async function touchOne(knex: Knex): Promise<void> {
  await readSurroundings(knex)
  const { rows } = (await knex.raw('select galaxy from catalogue_rows where rev_to is null order by md5(slug) limit 40')) as { rows: { galaxy: number }[] }
  const times: number[] = []
  const changed: number[] = []
  for (const { galaxy } of rows) {
    await knex
      .transaction(async (trx) => {
        await trx.raw("update measurements set value = value + 0.02 where galaxy = ? and quantity = 'distance_modulus' and rev_to is null", [galaxy])
        const { ms, result } = await timed(() => computeRevision(trx, { revision: 3, touched: [galaxy] }))
        times.push(ms)
        changed.push(result.rows.length)
        throw new Undone()
      })
      .catch((error: unknown) => {
        if (!(error instanceof Undone)) throw error
      })
  }
  const median = (list: number[]): number => list.sort((a, b) => a - b)[list.length >> 1] ?? NaN
  say(`  one distance moved: median ${median(times).toFixed(0)} ms, ${median(changed)} rows differ (most ${changed.at(-1) ?? 0}; slowest ${(times.at(-1) ?? 0).toFixed(0)} ms)`)
}

class Undone extends Error {}

/** The scale approved: everything that differs written, in one transaction. */
async function approveScale(knex: Knex, databaseUrl: string): Promise<void> {
  const { ms, result } = await timed(() =>
    knex.transaction(async (trx) => {
      await trx.raw("insert into revisions (number, summary) values (3, 'Another scale')")
      await trx.raw("with old as (update anchors set rev_to = 3 where key = 'trgb-absolute-i' and rev_to is null returning *) insert into anchors (key, label, kind, methods, value, err, source, rev_from) select key, label, kind, methods, value + 0.05, err, source, 3 from old")
      return withSharers(trx, { databaseUrl, threads: THREADS }, (sharers) => rebuildCatalogue(trx, 3, { sharers }))
    }),
  )
  say(`  an anchor moved, approved: ${seconds(ms)}; ${result.rows} rows and ${result.adopted} adopted values written`)
}

process.exitCode = (await main()) ? 0 : 1
