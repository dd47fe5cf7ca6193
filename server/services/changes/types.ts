/** A change as the desk holds it. */
import type { ChangeInput } from '../../../core/schema/changes.ts'

/** A value of one field, as JSON keeps it. */
export type Plain = string | number | boolean | null

/** The version that a change was made from, with the fields that it would move. */
export interface Base {
  /** The catalogue's revision when the change was made. */
  atRevision: number
  /** null for an addition. */
  versionId: number | null
  fields: Record<string, Plain>
}

export type StoredChange = ChangeInput & {
  id: number
  submission: number
  position: number
  base: Base | null
  /** The galaxy it touches, where that exists already. */
  galaxy: number | null
}

/** What has been checked against the catalogue and can be stored. */
export interface ResolvedChange {
  input: ChangeInput
  base: Base | null
  galaxy: number | null
}

/** The stored changes of one action. */
export type StoredChangeOf<A extends ChangeInput['action']> = Extract<StoredChange, { action: A }>

/** Keeps the changes of one action, typed. */
export function changesOf<A extends ChangeInput['action']>(changes: readonly StoredChange[], action: A): StoredChangeOf<A>[] {
  return changes.filter((c): c is StoredChangeOf<A> => c.action === action)
}
