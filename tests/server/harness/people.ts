/** People with accounts, one of each role or as a test wants them. */
import type { Knex } from 'knex'
import { ROLES, type Role } from '../../../core/permissions.ts'
import { hashPassword } from '../../../server/auth/passwords.ts'

export const PASSWORD = 'a password of the tests'

/** Made once a test file: a password takes its time to hash. */
let passwordHash: Promise<string> | undefined

export interface PersonOfTests {
  id: number
  name: string
  email: string
  roles: readonly Role[]
}

export interface Account {
  name?: string
  email: string
  roles: readonly Role[]
  state?: 'invited' | 'active' | 'suspended'
}

/** Everybody's password is PASSWORD. */
export async function addPerson(knex: Knex, { email, roles, state = 'active', name = email.split('@')[0] ?? email }: Account): Promise<PersonOfTests> {
  passwordHash ??= hashPassword(PASSWORD)
  const [made] = (await knex('users').insert({ name, email, roles: [...roles], state, passwordHash: await passwordHash }).returning('id')) as { id: number }[]
  if (!made) throw new Error(`${email} got no account`)
  return { id: made.id, name, email, roles }
}

/** `curator@people.test` and so on. */
export const emailOf = (role: Role): string => `${role}@people.test`

export async function addEveryRole(knex: Knex): Promise<Record<Role, PersonOfTests>> {
  const people = {} as Record<Role, PersonOfTests>
  for (const role of ROLES) people[role] = await addPerson(knex, { email: emailOf(role), roles: [role] })
  return people
}
