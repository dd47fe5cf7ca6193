/** Threads that draw, few and each with its own memory. */
import { Piscina } from 'piscina'
import type { DrawResult, DrawTask } from './draw-task.ts'

/** A picture of many pixels takes hundreds of megabytes while it is drawn. */
const MOST_THREADS = 2
/** Who comes after so many is told to try again. */
const MOST_WAITING = 24
const IDLE_MS = 60_000
const LONGEST_MS = 60_000

const compiled = import.meta.url.endsWith('.js')

let pool: Piscina<DrawTask, DrawResult> | undefined

/** More is waiting to be drawn than can be waited for. */
export class DrawingBusy extends Error {
  override readonly name = 'DrawingBusy'
}

/** @throws DrawingBusy, also when drawing takes longer than may be waited for */
export async function drawInThread(task: DrawTask): Promise<DrawResult> {
  pool ??= new Piscina<DrawTask, DrawResult>({
    filename: new URL(compiled ? './draw-task.js' : './draw-task.ts', import.meta.url).href,
    // Threads begin without the loader that reads TypeScript in development and in tests.
    execArgv: compiled ? ['--enable-source-maps'] : ['--import', 'tsx'],
    minThreads: 0, maxThreads: MOST_THREADS, maxQueue: MOST_WAITING, idleTimeout: IDLE_MS,
  })
  if (pool.queueSize >= MOST_WAITING) throw new DrawingBusy('the queue is full')
  const timeout = AbortSignal.timeout(LONGEST_MS)
  try {
    return await pool.run(task, { signal: timeout })
  } catch (error) {
    if (timeout.aborted) throw new DrawingBusy('drawing took too long', { cause: error })
    throw error
  }
}
