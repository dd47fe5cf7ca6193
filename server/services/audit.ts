import type { Knex } from 'knex'

/**
 * Writes down who did what: in the transaction that does it, so that nothing happens unrecorded and nothing is recorded that did not happen.
 *
 * @param actor - user id; null for somebody unknown, such as a failed sign-in
 * @param action - "submission.approve", "session.fail" ...
 * @param subject - "submission:12", "user:3" ...
 */
export async function record(trx: Knex, actor: number | null, action: string, subject: string, details: Record<string, unknown> = {}): Promise<void> {
  await trx('auditLog').insert({ actor, action, subject, details: JSON.stringify(details) })
}
