/**
 * The effect of another scale on the whole catalogue. It is computed on a view of the database of its own, without the catalogue's lock, since
 * on a large catalogue it takes its time; whoever asks for the same meanwhile, or after, is given the same.
 */
import type { Knex } from 'knex'
import type { Scale } from '../../../core/adoption/adopted.ts'
import type { CatalogueEffect } from '../../../core/effect.ts'
import type { Services } from '../../http/route.ts'
import { currentRevision } from '../changes/current.ts'
import { galaxiesAcrossTheSky } from '../revision/load.ts'
import { recompute, type Progress } from '../revision/whole/recompute.ts'
import { withSharers } from '../revision/whole/threads.ts'

export interface ScaleEffect {
  /** The catalogue that it was computed on. */
  revision: number
  effect: CatalogueEffect
}

interface Running {
  answer: Promise<ScaleEffect>
  listeners: Set<(progress: Progress) => void>
  last: Progress | null
}

/** The latest effects, by database; what they were computed for names them. */
const kept = new WeakMap<object, Map<string, Running>>()
const MOST_KEPT = 8

/** @param of - what is proposed to which catalogue: the same has the same effect */
export async function effectOfScale(services: Services, scale: Scale, of: { submission: number; hash: string; revision: number }, onProgress?: (progress: Progress) => void): Promise<ScaleEffect> {
  const pool = (services.knex.client as { config: object }).config
  const known = kept.get(pool) ?? new Map<string, Running>()
  kept.set(pool, known)
  const key = JSON.stringify(of)
  const running = known.get(key) ?? start(services, scale)
  // The newest stand last.
  known.delete(key)
  known.set(key, running)
  for (const old of [...known.keys()].slice(0, -MOST_KEPT)) known.delete(old)
  running.answer.catch(() => known.delete(key))
  if (running.last) onProgress?.(running.last)
  if (onProgress) running.listeners.add(onProgress)
  try {
    return await running.answer
  } finally {
    if (onProgress) running.listeners.delete(onProgress)
  }
}

function start(services: Services, scale: Scale): Running {
  const running: Running = { answer: Promise.resolve(null as never), listeners: new Set(), last: null }
  running.answer = compute(services, scale, (progress) => {
    running.last = progress
    for (const listener of running.listeners) listener(progress)
  })
  return running
}

async function compute({ knex, config }: Services, scale: Scale, onProgress: (progress: Progress) => void): Promise<ScaleEffect> {
  return knex.transaction(
    async (trx) => {
      await trx.raw('set local statement_timeout = 0')
      await trx.raw('set local idle_in_transaction_session_timeout = 0')
      const revision = await currentRevision(trx)
      const ids = await galaxiesAcrossTheSky(trx)
      const { effect } = await withSharers(trx, { databaseUrl: config.databaseUrl, threads: config.computeThreads }, (sharers) => recompute(sharers, { scale, ids, onProgress }))
      return { revision, effect: await withCounts(trx, effect) }
    },
    { isolationLevel: 'repeatable read', readOnly: true },
  )
}

/** Systems with how many satellites they have before and after. */
async function withCounts(trx: Knex, effect: CatalogueEffect): Promise<CatalogueEffect> {
  if (effect.systems.length === 0) return effect
  const { rows } = (await trx.raw('select host, count(*)::int as satellites from catalogue_rows where rev_to is null and host = any(?) group by host', [
    effect.systems.map((s) => s.slug),
  ])) as { rows: { host: string; satellites: number }[] }
  const before = new Map(rows.map((r) => [r.host, r.satellites]))
  return { ...effect, systems: effect.systems.map((s) => ({ ...s, before: before.get(s.slug) ?? 0, after: (before.get(s.slug) ?? 0) + s.gained.length - s.lost.length })) }
}
