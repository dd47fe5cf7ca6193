/** What the thread that asks and a thread that computes a share say to one another. */
import type { Neighbour } from '../../../../core/derive/neighbourhood.ts'
import type { CatalogueEffect } from '../../../../core/effect.ts'
import type { Batch } from '../write.ts'
import type { AdoptInput } from './share.ts'

/** What a thread is started with. */
export interface ThreadStart {
  databaseUrl: string
  /** Of the transaction whose view of the database the thread is to have. */
  snapshot: string
}

export type Asked =
  | { step: 'adopt'; input: AdoptInput }
  | { step: 'place'; input: readonly Neighbour[] }
  | { step: 'finish'; input: ReadonlySet<number> }
  /** The batch was written; the next may come. */
  | { step: 'written' }

export type Told =
  | { kind: 'batch'; batch: Batch }
  | { kind: 'progress'; done: number }
  | { kind: 'result'; result: Neighbour[] | Map<number, number> | CatalogueEffect }
  | { kind: 'failed'; error: unknown }
