/** The content of a submission and its hash: what a review speaks of. */
import { createHash } from 'node:crypto'
import { hashInput } from '../../../core/submission/content.ts'
import type { SubmissionContent } from '../../../core/submission/content.ts'
import type { StoredChange } from '../changes/types.ts'

export function contentOf(submission: { title: string; summary: string }, changes: readonly StoredChange[]): SubmissionContent {
  return {
    title: submission.title,
    summary: submission.summary,
    changes: changes.map((c) => ({ change: c.id, action: c.action, payload: c.payload }) as SubmissionContent['changes'][number]),
  }
}

/** SHA-256 in hexadecimal over the canonical text. */
export function contentHash(content: SubmissionContent): string {
  return createHash('sha256').update(hashInput(content), 'utf8').digest('hex')
}
