import type { Plain } from './types.ts'

/** A conflict before its words: who moved it is looked up once for all. */
export interface Clash {
  change: number
  /** As {@link fieldLabel} knows it, or in words already. */
  field: string
  base: Plain
  theirs: Plain
  yours: Plain
  revision: number | null
}
