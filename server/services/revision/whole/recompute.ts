/** Everything computed anew, by one or several who share the galaxies: the order of the steps, what goes between them, and how far they are. */
import type { Scale } from '../../../../core/adoption/adopted.ts'
import { mergeEffects, type CatalogueEffect } from '../../../../core/effect.ts'
import type { Batch } from '../write.ts'
import type { AdoptInput, Outlet, Sharer } from './share.ts'

export interface Progress {
  /** 0 to 1 */
  done: number
  step: string
}

export interface RecomputeOptions {
  scale: Scale
  /** Galaxies, those near one another in the sky following one another. */
  ids: readonly number[]
  onProgress?: (progress: Progress) => void
  /** Writes what differs, as of a revision. Without it the effect is foreseen. */
  writing?: { revision: number; write: (batch: Batch) => Promise<void> }
}

const STEPS = {
  adopt: { from: 0, to: 0.4, words: 'Adopting values' },
  place: { from: 0.4, to: 0.8, words: 'Looking for hosts' },
  finish: { from: 0.8, to: 1, words: 'Comparing with what stands' },
} as const

/** @returns the effect (of a computation that writes: empty), and how many rows and adopted values were written, those that only ended included */
export async function recompute(sharers: readonly Sharer[], { scale, ids, onProgress, writing }: RecomputeOptions): Promise<{ effect: CatalogueEffect; written: { rows: number; adopted: number } }> {
  const shares = split(ids, sharers.length)
  const written = { rows: 0, adopted: 0 }
  // One batch at a time: they go through one transaction.
  let last: Promise<void> = Promise.resolve()
  const write = (batch: Batch): Promise<void> => {
    last = last.then(async () => {
      await writing?.write(batch)
      written[batch.table === 'catalogue_rows' ? 'rows' : 'adopted'] += Math.max(batch.count, batch.ending.length)
    })
    return last
  }
  const inStep = async <T>(step: keyof typeof STEPS, work: (sharer: Sharer, outlet: Outlet, share: readonly number[]) => Promise<T>): Promise<T[]> => {
    const { from, to, words } = STEPS[step]
    const done = shares.map(() => 0)
    const tell = (): void => onProgress?.({ done: from + ((to - from) * done.reduce((a, b) => a + b, 0)) / Math.max(1, ids.length), step: words })
    tell()
    return settled(
      sharers.map((sharer, k) => {
        const outlet: Outlet = {
          batch: write,
          progress: (n) => {
            done[k] = n
            tell()
          },
        }
        return work(sharer, outlet, shares[k] ?? [])
      }),
    )
  }
  const task = (share: readonly number[]): AdoptInput => ({ ids: share, scale, writing: writing?.revision ?? null })
  const neighbours = await inStep('adopt', (sharer, outlet, share) => sharer.adopt(task(share), outlet))
  const everybody = neighbours.flat()
  const satellites = await inStep('place', (sharer, outlet) => sharer.place(everybody, outlet))
  const hosting = new Set(satellites.flatMap((of) => [...of.keys()]))
  const effects = await inStep('finish', (sharer, outlet) => sharer.finish(hosting, outlet))
  return { effect: mergeEffects(effects), written }
}

/** Waits for all, so that nobody is still at work when the first failure is told. */
async function settled<T>(work: readonly Promise<T>[]): Promise<T[]> {
  const results = await Promise.allSettled(work)
  return results.map((r) => {
    if (r.status === 'rejected') throw r.reason
    return r.value
  })
}

function split<T>(list: readonly T[], into: number): (readonly T[])[] {
  const size = Math.ceil(list.length / into)
  return Array.from({ length: into }, (_, k) => list.slice(k * size, (k + 1) * size))
}
