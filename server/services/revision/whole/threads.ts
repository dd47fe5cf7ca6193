/** Who computes everything anew: the thread that asks, for a small catalogue; threads of their own for a large one. */
import { Worker } from 'node:worker_threads'
import type { Knex } from 'knex'
import type { Neighbour } from '../../../../core/derive/neighbourhood.ts'
import type { CatalogueEffect } from '../../../../core/effect.ts'
import type { Asked, Told, ThreadStart } from './messages.ts'
import { shareOf, type Outlet, type Sharer } from './share.ts'

/** A thread takes about half a second to start; a smaller catalogue is done sooner without. */
const ENOUGH_GALAXIES = 1500

const compiled = import.meta.url.endsWith('.js')

export interface ThreadOptions {
  databaseUrl: string
  /** 0 keeps the work in the thread that asks. */
  threads: number
  /** From how many galaxies on. */
  enough?: number
}

/**
 * Lets work be done by as many sharers as are worth it, and ends them.
 *
 * @param trx - threads see the database as this transaction does, but not what it has itself written
 */
export async function withSharers<T>(trx: Knex, { databaseUrl, threads, enough = ENOUGH_GALAXIES }: ThreadOptions, work: (sharers: readonly Sharer[]) => Promise<T>): Promise<T> {
  const { rows: counted } = (await trx.raw('select count(*)::int as galaxies from galaxy_versions where rev_to is null')) as { rows: { galaxies: number }[] }
  if (threads === 0 || (counted[0]?.galaxies ?? 0) < enough) return work([shareOf(trx)])
  const { rows } = (await trx.raw('select pg_export_snapshot() as snapshot')) as { rows: { snapshot: string }[] }
  const start = { databaseUrl, snapshot: rows[0]?.snapshot ?? '' }
  const sharers = Array.from({ length: threads }, () => sharerInThread(start))
  try {
    return await work(sharers)
  } finally {
    await Promise.all(sharers.map((s) => s.close()))
  }
}

function startThread(start: ThreadStart): Worker {
  if (compiled) return new Worker(new URL('./thread.js', import.meta.url), { workerData: start, execArgv: ['--enable-source-maps'] })
  // In development and in tests the thread has to bring the loader that reads TypeScript itself.
  const begin = `import(${JSON.stringify(import.meta.resolve('tsx/esm/api'))}).then(({ register }) => { register(); return import(${JSON.stringify(new URL('./thread.ts', import.meta.url).href)}) })`
  return new Worker(begin, { eval: true, workerData: start, execArgv: [] })
}

function sharerInThread(start: ThreadStart): Sharer {
  const worker = startThread(start)
  // Whatever ends the thread outside a step is told by the next one.
  let ended: Error | undefined
  worker.once('error', (error: Error) => (ended ??= error))
  worker.once('exit', () => (ended ??= new Error('a thread of the computation ended before its work was done')))

  const ask = <T>(asked: Asked, outlet: Outlet): Promise<T> =>
    new Promise<T>((resolve, reject) => {
      if (ended) return reject(ended)
      const finish = (end: () => void): void => {
        worker.off('message', hear).off('error', reject).off('exit', gone)
        end()
      }
      const gone = (): void => reject(ended ?? new Error('a thread of the computation ended'))
      const hear = (told: Told): void => {
        if (told.kind === 'progress') outlet.progress(told.done)
        else if (told.kind === 'result') finish(() => resolve(told.result as T))
        else if (told.kind === 'failed') finish(() => reject(told.error as Error))
        else outlet.batch(told.batch).then(() => worker.postMessage({ step: 'written' } satisfies Asked), (error: unknown) => finish(() => reject(error as Error)))
      }
      worker.on('message', hear).once('error', reject).once('exit', gone)
      worker.postMessage(asked)
    })

  return {
    adopt: (input, outlet) => ask<Neighbour[]>({ step: 'adopt', input }, outlet),
    place: (input, outlet) => ask<Map<number, number>>({ step: 'place', input }, outlet),
    finish: (input, outlet) => ask<CatalogueEffect>({ step: 'finish', input }, outlet),
    close: async () => void (await worker.terminate()),
  }
}
