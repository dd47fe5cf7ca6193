/** What a review speaks of: the content of a submission, in a form in which equal contents are equal texts. */
import type { ChangeInput } from '../schema/changes.ts'

export interface SubmissionContent {
  title: string
  summary: string
  /** In order; `change` is what other changes of the same submission refer to. */
  changes: readonly ({ change: number } & ChangeInput)[]
}

/**
 * JSON with the keys of every object in order of their code units and no blanks, so that equal values give equal texts (the idea of
 * RFC 8785). Undefined members are left out.
 *
 * @throws RangeError when a number is not finite
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean' || typeof value === 'string') return JSON.stringify(value)
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new RangeError('only finite numbers have a canonical form')
    return JSON.stringify(value)
  }
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`
  if (typeof value === 'object') {
    const members = Object.entries(value)
      .filter(([, member]) => member !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
      .map(([key, member]) => `${JSON.stringify(key)}:${canonicalJson(member)}`)
    return `{${members.join(',')}}`
  }
  throw new RangeError(`a ${typeof value} has no canonical form`)
}

/** The text whose SHA-256 is a submission's content hash. The versions that changes were made from are no part of it: an unchanged
 * submission keeps its hash when it is brought up to date. */
export function hashInput(content: SubmissionContent): string {
  return canonicalJson({
    title: content.title,
    summary: content.summary,
    changes: content.changes.map(({ change, action, payload }) => ({ change, action, payload })),
  })
}
