import { expect, it } from 'vitest'
import { migrations } from '../../migrations/index.ts'
import { migrateToLatest, rollBackAll } from '../../server/maintenance/migrate.ts'
import { useTestDatabase } from './harness/database.ts'

const database = useTestDatabase()

it('has nothing left to do on the template', async () => {
  expect(await migrateToLatest(database().knex)).toEqual([])
})

it('goes all the way back and forward again, and two at once do not collide', async () => {
  const { knex } = database()
  const names = Object.keys(migrations).sort()
  expect((await rollBackAll(knex)).sort()).toEqual(names)
  const { rows } = await knex.raw<{ rows: { relname: string }[] }>(
    "select relname from pg_class where relnamespace = 'public'::regnamespace and relkind = 'r' and relname not like 'knex%'",
  )
  expect(rows).toEqual([])
  const both = await Promise.all([migrateToLatest(knex), migrateToLatest(knex)])
  expect(both.map((ran) => ran.length).sort()).toEqual([0, names.length])
})

it('clears the lock that a killed migration leaves', async () => {
  const { knex } = database()
  await knex('knex_migrations_lock').update({ is_locked: 1 })
  expect(await migrateToLatest(knex)).toEqual([])
})
