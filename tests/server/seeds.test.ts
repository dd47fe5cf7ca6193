import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { permissionsOf } from '../../core/permissions.ts'
import { DEMONSTRATION_ACCOUNTS } from '../../seeds/accounts.ts'
import { ZERO_POINT } from '../../seeds/demonstration/catalogue-faults.ts'
import { PLANTED_FAULTS } from '../../seeds/demonstration/faults.ts'
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

async function curatorOf({ knex }: TestDatabase, id: number): Promise<Reader> {
  const row = (await knex('users').where({ id }).first('name', 'email')) as { name: string; email: string }
  return { user: { id, ...row, roles: ['curator'] }, permissions: permissionsOf(['curator']) }
}

describe('the demonstration', () => {
  it('has a desk in use: every state, revisions that approvals made, an override, a proposed anchor, and the planted slips found by the checks', async () => {
    const database = await seeded('demonstration')
    const { knex } = database
    const rows = (await knex('submissions').select('id', 'state', 'revision', 'title', 'author').orderBy('id')) as { id: number; state: string; revision: number | null; title: string; author: number }[]
    const states = rows.map((r) => r.state).sort()
    expect(states).toEqual(['approved', 'approved', 'draft', 'draft', 'draft', 'rejected', 'returned', 'submitted', 'submitted', 'submitted', 'submitted', 'submitted', 'withdrawn'])
    const newest = (await knex('revisions').max('number as number').first()) as { number: number }
    expect(rows.flatMap((r) => r.revision ?? [])).toEqual([newest.number - 1, newest.number])
    expect(await knex('overrides').whereNull('revTo').select('about', 'reason')).toEqual([{ about: 'distance_modulus', reason: 'The other tip is contaminated by the disc behind.' }])
    expect(await knex('changes').where({ action: 'anchor.set' }).select('galaxy')).toHaveLength(1)

    const open = rows.filter((r) => r.state === 'submitted' || r.state === 'draft')
    const found = new Map<string, string[][]>()
    for (const row of open) {
      const answer = await answerOf(knex, row.id, row.state === 'draft' ? await curatorOf(database, row.author) : await approverOf(database))
      found.set(row.title, answer.items.map((item) => item.checks.filter((c) => c.level !== 'ok').map((c) => c.check)))
      if (row.state === 'submitted') expect(answer.may.review).toBe(true)
    }
    for (const fault of PLANTED_FAULTS) expect(found.get(fault.submission)?.[fault.change], `${fault.submission}, change ${fault.change}: ${fault.story}`).toContain(fault.check)
    // What is sound is left alone, but for what a reviewer has to know anyway.
    const told = new Set(['host-change'])
    for (const [title, changes] of found) {
      changes.forEach((checks, i) => {
        if (PLANTED_FAULTS.some((f) => f.submission === title && f.change === i)) return
        expect(checks.filter((c) => !told.has(c)), `${title}, change ${i}`).toEqual([])
      })
    }
  }, 60_000)

  it('has slips in the catalogue itself: a paper on a zero point of its own stands out by its residuals, an outlying tip by its tension', async () => {
    const { knex } = databases[0] as TestDatabase
    const { rows } = (await knex.raw(
      `select s.title, count(*)::int as n, avg((r ->> 'residual')::float8) as mean
         from adopted_values a cross join jsonb_array_elements(a.reasons) r join measurements m on m.lineage = (r ->> 'measurementId')::int and m.rev_to is null join sources s on s.id = m.source
        where a.rev_to is null and a.quantity = 'distance_modulus' and m.method = 'trgb' and (r ->> 'used')::boolean and a.n_used > 1
        group by s.title order by abs(avg((r ->> 'residual')::float8)) desc`,
    )) as { rows: { title: string; n: number; mean: number }[] }
    expect(rows[0]?.title).toBe(ZERO_POINT.title)
    // Half of the offset, for a pair, over an error of about 0.06 mag.
    expect(rows[0]?.mean).toBeGreaterThan(1)
    const { rows: tense } = (await knex.raw(
      "select count(*)::int as n from adopted_values a cross join jsonb_array_elements(a.reasons) r where a.rev_to is null and a.quantity = 'distance_modulus' and (r ->> 'tension')::boolean and abs((r ->> 'residual')::float8) > 5",
    )) as { rows: { n: number }[] }
    expect(tense[0]?.n).toBeGreaterThan(0)
  })

  it('is a neighbourhood of about 600 galaxies, ours among them with its satellites', async () => {
    const { knex } = databases[0] as TestDatabase
    const [{ galaxies }] = (await knex('catalogueRows').whereNull('revTo').select(knex.raw('count(*)::int as galaxies'))) as [{ galaxies: number }]
    expect(Math.abs(galaxies - 600)).toBeLessThan(80)
    const [own] = (await knex('catalogueRows').whereNull('revTo').where({ slug: 'hearth' }).select('distance', 'hostRelation', 'logMstar')) as { distance: number; hostRelation: string; logMstar: number }[]
    expect(own).toMatchObject({ hostRelation: 'host' })
    expect(own?.distance).toBeCloseTo(0.0082, 3)
    const satellites = (await knex('catalogueRows').whereNull('revTo').where({ host: 'hearth' }).select('hostSep', 'distance')) as { hostSep: number; distance: number }[]
    expect(satellites.length).toBeGreaterThan(15)
    // Galactocentric: not what the observer at the edge of the disc measures.
    expect(satellites.some((s) => Math.abs(s.hostSep - 1000 * s.distance) > 3)).toBe(true)
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
