/** People as signing in needs them. */
import type { Knex } from 'knex'
import { permissionsOf, type Role } from '../../core/permissions.ts'
import type { Reader } from '../http/route.ts'
import { passwordIs } from './passwords.ts'

export type Person = NonNullable<Reader['user']>

export const VISITOR: Reader = { user: null, permissions: permissionsOf([]) }

export function readerOf(person: Person | null | undefined): Reader {
  return person ? { user: person, permissions: permissionsOf(person.roles) } : VISITOR
}

/** The active person with this id, or null. Asked on every request with a session, so that a suspension works at once. */
export async function personById(knex: Knex, id: number): Promise<Person | null> {
  const row = (await knex('users').where({ id, state: 'active' }).first('id', 'name', 'email', 'roles')) as (Person & { roles: Role[] }) | undefined
  return row ?? null
}

/** The person whom these words let in, or null; it takes as long either way. */
export async function personWith(knex: Knex, email: string, password: string): Promise<Person | null> {
  const row = (await knex('users').where({ email, state: 'active' }).first('id', 'name', 'email', 'roles', 'passwordHash')) as (Person & { passwordHash: string }) | undefined
  if (!(await passwordIs(row?.passwordHash ?? null, password)) || !row) return null
  await knex('users').where({ id: row.id }).update({ lastSeenAt: knex.fn.now() })
  return { id: row.id, name: row.name, email: row.email, roles: row.roles }
}
