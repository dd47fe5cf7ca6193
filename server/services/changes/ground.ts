/** What the checks of a proposed change give. */
import type { Base } from './types.ts'

/** What a change is made from, and the galaxy it touches, where there is one already. */
export interface Ground {
  base: Pick<Base, 'versionId' | 'fields'>
  galaxy: number | null
}

/** Of an addition, or of something that is not there. */
export const NO_GROUND: Ground = { base: { versionId: null, fields: {} }, galaxy: null }

/** Says why a field of a proposed change cannot stand. */
export type Say = (path: string, message: string) => void
