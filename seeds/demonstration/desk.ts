/**
 * Submissions in every state, so that a visitor of the demonstration finds the desk in use. All of it goes through the services that people's
 * own work goes through; nothing is written past them but one invented source.
 */
import type { Knex } from 'knex'
import type { ChangeForm } from '../../core/schema/changes.ts'
import { changeInputSchema } from '../../core/schema/changes.ts'
import type { SubmissionAnswer } from '../../core/schema/submissions.ts'
import type { Reader, Services } from '../../server/http/route.ts'
import { approve } from '../../server/services/review/approve.ts'
import { refuse } from '../../server/services/review/decide.ts'
import { addChange, createSubmission } from '../../server/services/submissions/drafts.ts'
import { remark, submit, withdraw } from '../../server/services/submissions/transitions.ts'
import { addSources } from './load.ts'
import type { Proposal, Proposed } from './proposal.ts'
import { proposals } from './proposals.ts'

export interface Hands {
  curator: Reader
  approver: Reader
}

/** Lays out the desk on the catalogue as it stands in the transaction. */
export async function layTheDesk(services: Services, hands: Hands): Promise<void> {
  const { knex } = services
  const newest = await newestSource(knex, hands.curator.user?.id ?? 0)
  for (const proposal of await proposals(knex, newest)) await carryOut(services, hands, proposal)
}

/** The paper that the curator is working on. */
async function newestSource(knex: Knex, createdBy: number): Promise<number> {
  const [id] = await addSources(knex as Knex.Transaction, [
    { title: 'Red giant branch tips of faint invented satellites', authors: ['Harrow, I.', 'Lindqvist, M.'], year: 2026, venue: 'Invented', about: 'trgb' },
  ], createdBy)
  return id ?? 0
}

async function carryOut(services: Services, { curator, approver }: Hands, proposal: Proposal): Promise<void> {
  let now = await createSubmission(services, curator, { title: proposal.title, summary: proposal.summary })
  const { id } = now
  for (const proposed of proposal.changes) now = await addChange(services, curator, id, changeInputSchema.parse(settled(proposed, now)))
  if (proposal.remark) await remark(services, curator, id, { change: null, body: proposal.remark })
  if (proposal.becomes === 'draft') return
  now = await submit(services, curator, id, now.lockVersion)
  const contentHash = now.contentHash ?? ''
  if (proposal.question) await remark(services, approver, id, { change: null, body: proposal.question })
  if (proposal.becomes === 'withdrawn') await withdraw(services, curator, id, now.lockVersion)
  if (proposal.becomes === 'approved') await approve(services, approver, id, { contentHash, note: proposal.note ?? '' })
  if (proposal.becomes === 'returned') await refuse(services, approver, id, 'return', { contentHash, note: proposal.note ?? '' })
  if (proposal.becomes === 'rejected') await refuse(services, approver, id, 'reject', { contentHash, note: proposal.note ?? '' })
}

/** Some changes speak of a galaxy that an earlier one of the same submission adds, whose number is known only now. */
function settled(proposed: Proposed, submission: SubmissionAnswer): ChangeForm {
  return typeof proposed === 'function' ? proposed(submission.items.map((item) => item.id)) : proposed
}
