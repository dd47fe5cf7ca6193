/**
 * The life of a submission as a table: draft -> submitted -> (returned -> submitted)* -> approved, rejected or withdrawn. Nothing is ever
 * accepted by time running out, and nothing leaves the last three states.
 */
import type { SubmissionState } from '../schema/submissions.ts'

export const SUBMISSION_EVENTS = ['edit', 'remove', 'submit', 'withdraw', 'return', 'approve', 'reject'] as const
export type SubmissionEvent = (typeof SUBMISSION_EVENTS)[number]

/**
 * Who may set off an event: its author; anybody who may write submissions (who thereby becomes an editor, and may no longer review it); or
 * somebody who may review and has not written in it.
 */
export type SubmissionActor = 'author' | 'writer' | 'reviewer'

export interface Transition {
  /** null: the submission is gone. */
  to: SubmissionState | null
  who: SubmissionActor
}

/** State x event -> what it becomes and who may; what is not here is not possible. */
export const TRANSITIONS: Readonly<Record<SubmissionState, Readonly<Partial<Record<SubmissionEvent, Transition>>>>> = {
  draft: {
    edit: { to: 'draft', who: 'author' },
    remove: { to: null, who: 'author' },
    submit: { to: 'submitted', who: 'author' },
  },
  submitted: {
    withdraw: { to: 'withdrawn', who: 'author' },
    return: { to: 'returned', who: 'reviewer' },
    approve: { to: 'approved', who: 'reviewer' },
    reject: { to: 'rejected', who: 'reviewer' },
  },
  returned: {
    edit: { to: 'returned', who: 'writer' },
    submit: { to: 'submitted', who: 'writer' },
    withdraw: { to: 'withdrawn', who: 'author' },
  },
  approved: {},
  rejected: {},
  withdrawn: {},
}

/** What an event makes of a submission in this state, or undefined when it is not possible. */
export function transition(state: SubmissionState, event: SubmissionEvent): Transition | undefined {
  return TRANSITIONS[state][event]
}

/** What somebody is to one submission. */
export interface Standing {
  isAuthor: boolean
  /** Wrote in it: its author always has. */
  isEditor: boolean
  mayWrite: boolean
  mayReview: boolean
}

/** Whether somebody may play this part. */
export function mayAct(who: SubmissionActor, standing: Standing): boolean {
  if (who === 'author') return standing.isAuthor && standing.mayWrite
  if (who === 'writer') return standing.mayWrite
  return standing.mayReview && !standing.isAuthor && !standing.isEditor
}

const IN_WORDS: Readonly<Record<SubmissionEvent, string>> = {
  edit: 'changed',
  remove: 'removed',
  submit: 'submitted',
  withdraw: 'withdrawn',
  return: 'returned',
  approve: 'approved',
  reject: 'rejected',
}

const STATE_WORDS: Readonly<Record<SubmissionState, string>> = {
  draft: 'is a draft that was never submitted',
  submitted: 'is waiting for review',
  returned: 'was returned to its author',
  approved: 'has been approved',
  rejected: 'has been rejected',
  withdrawn: 'was withdrawn',
}

/** Why an event is not possible now: "This submission has been approved, so it cannot be withdrawn. Nothing was changed." */
export function refusal(state: SubmissionState, event: SubmissionEvent): string {
  return `This submission ${STATE_WORDS[state]}, so it cannot be ${IN_WORDS[event]}. Nothing was changed.`
}

/** Why somebody may not play a part that the state would allow. */
export function refusalOf(who: SubmissionActor, event: SubmissionEvent, standing: Standing): string {
  const end = 'Nothing was changed.'
  if (who === 'reviewer' && standing.isAuthor) return `You may not review your own submission. Somebody else must decide on it. ${end}`
  if (who === 'reviewer' && standing.isEditor) return `You wrote in this submission, so somebody else must decide on it. ${end}`
  if (who === 'reviewer') return `Only an approver or a steward may decide on a submission. ${end}`
  if (who === 'author' && standing.mayWrite) return `Only its author may have it ${IN_WORDS[event]}. ${end}`
  return `Your account may not write submissions. ${end}`
}
