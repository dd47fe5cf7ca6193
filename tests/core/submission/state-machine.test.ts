import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { SUBMISSION_STATES } from '../../../core/schema/submissions.ts'
import type { SubmissionState } from '../../../core/schema/submissions.ts'
import { mayAct, refusal, refusalOf, SUBMISSION_EVENTS, transition } from '../../../core/submission/state-machine.ts'

const someone = { isAuthor: false, isEditor: false, mayWrite: true, mayReview: true }
const FINAL: readonly SubmissionState[] = ['approved', 'rejected', 'withdrawn']

describe('the states of a submission', () => {
  it('leads by legal steps only, and never out of a final state', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...SUBMISSION_EVENTS), { maxLength: 40 }), (events) => {
        let state: SubmissionState | null = 'draft'
        const path: (SubmissionState | null)[] = [state]
        for (const event of events) {
          if (state === null) break
          const step = transition(state, event)
          if (!step) continue
          expect(FINAL).not.toContain(state)
          if (event === 'approve' || event === 'reject' || event === 'return') expect(state).toBe('submitted')
          if (step.to === null) expect(path).not.toContain('submitted')
          state = step.to
          path.push(state)
        }
        if (path.includes('approved')) expect(path).toContain('submitted')
        if (path.includes('returned')) expect(path.indexOf('submitted')).toBeLessThan(path.indexOf('returned'))
      }),
      { numRuns: 500 },
    )
  })

  it('reaches every state', () => {
    const reached = new Set<SubmissionState>(['draft'])
    for (let round = 0; round < SUBMISSION_STATES.length; round += 1) {
      for (const state of [...reached]) for (const event of SUBMISSION_EVENTS) {
        const to = transition(state, event)?.to
        if (to != null) reached.add(to)
      }
    }
    expect([...reached].sort()).toEqual([...SUBMISSION_STATES].sort())
  })

  it('lets nobody decide on what he wrote, whatever he may otherwise do', () => {
    fc.assert(
      fc.property(fc.boolean(), fc.boolean(), fc.boolean(), fc.boolean(), (isAuthor, isEditor, mayWrite, mayReview) => {
        const may = mayAct('reviewer', { isAuthor, isEditor, mayWrite, mayReview })
        expect(may).toBe(mayReview && !isAuthor && !isEditor)
      }),
    )
  })

  it('says why not', () => {
    expect(refusal('approved', 'withdraw')).toBe('This submission has been approved, so it cannot be withdrawn. Nothing was changed.')
    expect(refusalOf('reviewer', 'approve', { ...someone, isAuthor: true })).toContain('your own submission')
    expect(refusalOf('reviewer', 'approve', { ...someone, isEditor: true })).toContain('You wrote in this submission')
    expect(refusalOf('author', 'withdraw', someone)).toContain('Only its author')
  })
})
