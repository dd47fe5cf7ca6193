/** Tells every process that something moved: PostgreSQL delivers it when the transaction commits, and never when it does not. */
import type { Knex } from 'knex'

/** The channel that live updates listen on. */
export const NEWS_CHANNEL = 'vicinage_news'

export type News = { kind: 'revision'; revision: number } | { kind: 'submission'; submission: number; state: string }

export async function announce(trx: Knex, news: News): Promise<void> {
  await trx.raw('SELECT pg_notify(?, ?)', [NEWS_CHANNEL, JSON.stringify(news)])
}
