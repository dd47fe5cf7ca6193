import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { permissionsOf } from '../../core/permissions.ts'
import { DEMONSTRATION_ACCOUNTS } from '../../seeds/accounts.ts'
import { seedWhenEmpty } from '../../seeds/index.ts'
import { loadConfig } from '../../server/config.ts'
import type { Reader } from '../../server/http/route.ts'
import { answerOf } from '../../server/services/submissions/answer.ts'
import { createTestDatabase, type TestDatabase } from './harness/database.ts'

const uploads = mkdtempSync(join(tmpdir(), 'vicinage-uploads-'))
const databases: TestDatabase[] = []
afterAll(async () => {
  for (const database of databases) await database.drop()
  rmSync(uploads, { recursive: true })
})

async function seeded(catalogue: string): Promise<TestDatabase> {
  const database = await createTestDatabase()
  databases.push(database)
  const config = loadConfig({ DATABASE_URL: database.url, SESSION_SECRET: 'x'.repeat(40), NODE_ENV: 'test', UPLOADS_DIR: uploads, CATALOGUE: catalogue })
  const options = { knex: database.knex, config, log: { info: () => undefined } }
  expect(await seedWhenEmpty(options)).toEqual({ seeded: true })
  expect(await seedWhenEmpty(options)).toEqual({ seeded: false })
  return database
}

async function approverOf({ knex }: TestDatabase): Promise<Reader> {
  const account = DEMONSTRATION_ACCOUNTS.find((a) => a.email.startsWith('approver@'))
  const row = (await knex('users').where({ email: account?.email }).first('id')) as { id: number }
  return { user: { id: row.id, name: account?.name ?? '', email: account?.email ?? '', roles: ['approver'] }, permissions: permissionsOf(['approver']) }
}

describe('the demonstration', () => {
  it('has a desk in use: every state, a revision that an approval made, and slips that the checks find', async () => {
    const database = await seeded('demonstration')
    const { knex } = database
    const rows = (await knex('submissions').select('id', 'state', 'revision', 'title').orderBy('id')) as { id: number; state: string; revision: number | null; title: string }[]
    const states = rows.map((r) => r.state).sort()
    expect(states).toEqual(['approved', 'draft', 'draft', 'rejected', 'returned', 'submitted', 'submitted', 'submitted', 'withdrawn'])
    const newest = (await knex('revisions').max('number as number').first()) as { number: number }
    expect(rows.find((r) => r.state === 'approved')?.revision).toBe(newest.number)
    const slips = rows.find((r) => r.title.startsWith('Three more satellites'))
    const answer = await answerOf(knex, slips?.id ?? 0, await approverOf(database))
    const warned = answer.items.map((item) => item.checks.filter((c) => c.level === 'warn').map((c) => c.check))
    expect(warned[0]).toContain('unit-slip')
    expect(warned[1]).toContain('agreement')
    expect(warned[2]).toContain('anchor-stated')
    expect(answer.may.review).toBe(true)
  })
})

describe('the published sample', () => {
  it('came in through the import, was approved by somebody else, and is release 1', async () => {
    const { knex } = await seeded('published')
    const submission = (await knex('submissions as s').join('users as a', 'a.id', 's.author').join('users as d', 'd.id', 's.decidedBy').first('s.state', 's.revision', 'a.email as author', 'd.email as decider')) as Record<string, unknown>
    expect(submission).toEqual({ state: 'approved', revision: 2, author: 'curator@demo.vicinage.test', decider: 'approver@demo.vicinage.test' })
    expect(await knex('releases').select('label', 'revision')).toEqual([{ label: '1', revision: 2 }])
    expect(await knex('importRows').whereNull('change')).toEqual([])
  })

  it('is the table that the tests of the science are held to', () => {
    const read = (path: string): string => readFileSync(new URL(path, import.meta.url), 'utf8')
    expect(read('../../seeds/published/published.csv')).toBe(read('../reference/published.csv'))
  })
})
