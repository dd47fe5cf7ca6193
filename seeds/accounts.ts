/** The five accounts of the demonstration, one a role. */
import { hash } from '@node-rs/argon2'
import type { Knex } from 'knex'
import type { Role } from '../core/permissions.ts'

export interface Account {
  name: string
  email: string
  roles: readonly Role[]
}

export const DEMONSTRATION_ACCOUNTS: readonly Account[] = [
  { name: 'Ines Farrow', email: 'curator@demo.vicinage.test', roles: ['curator'] },
  { name: 'Samuel Wren', email: 'approver@demo.vicinage.test', roles: ['approver'] },
  { name: 'Adaeze Okoro', email: 'researcher@demo.vicinage.test', roles: ['researcher'] },
  { name: 'Tobias Marsh', email: 'outreach@demo.vicinage.test', roles: ['outreach'] },
  { name: 'Vera Eskola', email: 'steward@demo.vicinage.test', roles: ['steward'] },
]

/** Makes the accounts, all with one password. @returns their ids by e-mail address */
export async function addAccounts(trx: Knex.Transaction, password: string): Promise<Map<string, number>> {
  const passwordHash = await hash(password)
  const rows = DEMONSTRATION_ACCOUNTS.map((a) => ({ name: a.name, email: a.email, roles: [...a.roles], passwordHash, state: 'active' }))
  const made = (await trx('users').insert(rows).returning(['id', 'email'])) as { id: number; email: string }[]
  return new Map(made.map((u) => [u.email, u.id]))
}
