/** The demonstration's people as the services know them: what a seed does at the desk, somebody does. */
import { pino } from 'pino'
import type { Knex } from 'knex'
import { readerOf } from '../server/auth/people.ts'
import type { Config } from '../server/config.ts'
import type { Reader, Services } from '../server/http/route.ts'
import { DEMONSTRATION_ACCOUNTS } from './accounts.ts'

export type PersonName = 'curator' | 'approver' | 'researcher' | 'outreach' | 'steward'

/** @param people - ids by e-mail address. @throws RangeError when that account was not made */
export function personCalled(people: ReadonlyMap<string, number>, name: PersonName): Reader {
  const account = DEMONSTRATION_ACCOUNTS.find((a) => a.email.startsWith(`${name}@`))
  const id = account && people.get(account.email)
  if (!account || id === undefined) throw new RangeError(`there is no ${name} in this database`)
  return readerOf({ id, name: account.name, email: account.email, roles: [...account.roles] })
}

/** The services within the seed's transaction: theirs become savepoints of it, so that a seed is whole or not there. */
export function servicesWithin(trx: Knex.Transaction, config: Config): Services {
  return { knex: trx, config, log: pino({ level: 'silent' }) }
}
