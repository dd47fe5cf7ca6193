/**
 * Approving submissions of one distance each in a catalogue of 100,000 galaxies and 1,000,000 measurements: the preview of the effect, and
 * the approval itself, beside the bare statements that store the same. Then an import of many at once, and how the cost grows with the
 * catalogue's size.
 */
import type { Knex } from 'knex'
import { pino } from 'pino'
import { permissionsOf, type Role } from '../core/permissions.ts'
import { random, type Random } from '../core/random.ts'
import { changeInputSchema } from '../core/schema/changes.ts'
import type { SubmissionAnswer } from '../core/schema/submissions.ts'
import { loadConfig } from '../server/config.ts'
import { openDatabase } from '../server/database.ts'
import type { Reader, Services } from '../server/http/route.ts'
import { migrateToLatest } from '../server/maintenance/migrate.ts'
import { approve } from '../server/services/review/approve.ts'
import { effectOfSubmission } from '../server/services/review/effect.ts'
import { addChange, createSubmission } from '../server/services/submissions/drafts.ts'
import { submit } from '../server/services/submissions/transitions.ts'
import { generateCatalogue } from './catalogue/generate.ts'

const GALAXIES = Number(process.env.BENCH_GALAXIES ?? 100_000)
const ROUNDS = Number(process.env.BENCH_ROUNDS ?? 30)
const BAR_APPROVAL_MS = 150
const BAR_PREVIEW_MS = 300
const say = (line: string): void => void process.stdout.write(`${line}\n`)

interface Bench {
  services: Services
  author: Reader
  approver: Reader
  draw: Random
  /** Slugs of galaxies to measure. */
  slugs: string[]
}

async function person(knex: Knex, name: string, role: Role): Promise<Reader> {
  const email = `${name.toLowerCase()}@bench.test`
  await knex('users').insert({ name, email, roles: [role], state: 'active', passwordHash: 'none' }).onConflict('email').ignore()
  const found = (await knex('users').where({ email }).first('id')) as { id: number }
  return { user: { id: found.id, name, email, roles: [role] }, permissions: permissionsOf([role]) }
}

/** A submission with one new distance for each of some galaxies, waiting for review. */
async function submission({ services, author, draw, slugs }: Bench, distances: number): Promise<SubmissionAnswer> {
  let answer = await createSubmission(services, author, { title: 'A new distance', summary: '' })
  for (let i = 0; i < distances; i++) {
    const slug = draw.pick(slugs)
    const row = (await services.knex('catalogueRows').where({ slug }).whereNull('revTo').first('dm')) as { dm: number }
    const measurement = { quantity: 'distance_modulus', value: row.dm + 0.1 * draw.normal(), errPlus: 0.09, errMinus: 0.09, unit: 'mag', method: 'trgb', sourceId: 1 + draw.integer(400) }
    answer = await addChange(services, author, answer.id, changeInputSchema.parse({ action: 'measurement.add', payload: { galaxy: { slug }, measurement } }))
  }
  return submit(services, author, answer.id, answer.lockVersion)
}

async function timed<T>(work: () => Promise<T>): Promise<{ ms: number; result: T }> {
  const begun = performance.now()
  const result = await work()
  return { ms: performance.now() - begun, result }
}

/** From BEGIN to the first statement after COMMIT, which waits for its answer. */
function transactionClock(knex: Knex): { take: () => number } {
  let begun = 0
  let took = 0
  let committing = false
  knex.on('query', ({ sql }: { sql: string }) => {
    const now = performance.now()
    if (committing) took = now - begun
    committing = /^commit/i.test(sql)
    if (/^begin/i.test(sql)) begun = now
  })
  return { take: () => took }
}

/** What storing the outcome takes with nothing computed: one galaxy's measurements read, one row and one adopted value each closed and begun. */
async function bareStatements(knex: Knex, slug: string): Promise<void> {
  await knex.transaction(async (trx) => {
    const { rows } = (await trx.raw('select galaxy from galaxy_versions where slug = ? and rev_to is null', [slug])) as { rows: { galaxy: number }[] }
    const galaxy = rows[0]?.galaxy ?? 0
    const { rows: newest } = (await trx.raw('select max(number) + 1 as revision from revisions')) as { rows: { revision: number }[] }
    const revision = newest[0]?.revision ?? 0
    await trx.raw("insert into revisions (number, summary) values (?, 'Bare statements')", [revision])
    await trx.raw('select * from measurements where galaxy = ? and rev_to is null', [galaxy])
    await copyOfStanding(trx, 'adopted_values', "galaxy = ? and quantity = 'distance_modulus'", galaxy, revision)
    await copyOfStanding(trx, 'catalogue_rows', 'galaxy = ?', galaxy, revision)
  })
}

async function copyOfStanding(trx: Knex, table: 'adopted_values' | 'catalogue_rows', where: string, galaxy: number, revision: number): Promise<void> {
  const { rows } = (await trx.raw("select column_name as name from information_schema.columns where table_name = ? and column_name not in ('id', 'rev_from', 'rev_to') and table_schema = current_schema()", [table])) as { rows: { name: string }[] }
  const list = rows.map((r) => `"${r.name}"`).join(', ')
  await trx.raw(`update ${table} set rev_to = ? where ${where} and rev_to is null`, [revision, galaxy])
  await trx.raw(`insert into ${table} (${list}, rev_from) select ${list}, ? from ${table} where ${where} and rev_to = ?`, [revision, galaxy, revision])
}

function summary(name: string, times: readonly number[]): number {
  const sorted = [...times].sort((a, b) => a - b)
  const at = (share: number): number => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN
  say(`${name.padEnd(44)} median ${at(0.5).toFixed(1).padStart(7)} ms   p95 ${at(0.95).toFixed(1).padStart(7)} ms`)
  return at(0.5)
}

async function main(): Promise<boolean> {
  const databaseUrl = process.env.DATABASE_URL ?? ''
  const upkeep = openDatabase({ databaseUrl, purpose: 'upkeep', connections: 2 })
  await migrateToLatest(upkeep)
  const { rows: held } = (await upkeep.raw('select count(*)::int as n from galaxies')) as { rows: { n: number }[] }
  if ((held[0]?.n ?? 0) === 0) await generateCatalogue(upkeep, { galaxies: GALAXIES, log: say })
  const { rows: slugs } = (await upkeep.raw('select slug from catalogue_rows where rev_to is null and dm is not null order by galaxy')) as { rows: { slug: string }[] }
  await upkeep.destroy()

  const knex = openDatabase({ databaseUrl, connections: 4 })
  const config = loadConfig({ DATABASE_URL: databaseUrl, SESSION_SECRET: 'x'.repeat(40), LOG_LEVEL: 'silent' })
  const services: Services = { knex, config, log: pino({ level: 'silent' }) }
  const bench: Bench = { services, author: await person(knex, 'Author', 'curator'), approver: await person(knex, 'Approver', 'approver'), draw: random(99), slugs: slugs.map((r) => r.slug) }
  const clock = transactionClock(knex)
  const times = { preview: [] as number[], approval: [] as number[], inside: [] as number[], bare: [] as number[], rows: [] as number[] }
  try {
    for (let round = -1; round < ROUNDS; round++) {
      const waiting = await submission(bench, 1)
      const preview = await timed(() => effectOfSubmission(services, bench.approver, waiting.id))
      const approval = await timed(() => approve(services, bench.approver, waiting.id, { contentHash: waiting.contentHash ?? '', note: '' }))
      const inside = clock.take()
      const { rows: written } = (await knex.raw('select count(*)::int as n from catalogue_rows where rev_from = ?', [approval.result.revision])) as { rows: { n: number }[] }
      const bare = await timed(() => bareStatements(knex, bench.draw.pick(bench.slugs)))
      if (round < 0) {
        say(`first preview of a process, the neighbourhood read: ${preview.ms.toFixed(0)} ms`)
        continue
      }
      times.preview.push(preview.ms)
      times.approval.push(approval.ms)
      times.inside.push(inside)
      times.bare.push(bare.ms)
      times.rows.push(written[0]?.n ?? 0)
    }
    const previewMs = summary('effect of a one-distance submission', times.preview)
    summary('its approval, as the route answers', times.approval)
    const approvalMs = summary('its approval, in the transaction', times.inside)
    summary('bare statements of one galaxy', times.bare)
    say(`rows that an approval moves: ${Math.min(...times.rows)} to ${Math.max(...times.rows)}`)
    const many = await submission(bench, 100)
    const manyPreview = await timed(() => effectOfSubmission(services, bench.approver, many.id))
    await approve(services, bench.approver, many.id, { contentHash: many.contentHash ?? '', note: '' })
    say(`a submission of 100 distances: effect ${manyPreview.ms.toFixed(0)} ms, approval in the transaction ${clock.take().toFixed(0)} ms`)
    say(`bars: approval ${BAR_APPROVAL_MS} ms, effect ${BAR_PREVIEW_MS} ms`)
    return approvalMs <= BAR_APPROVAL_MS && previewMs <= BAR_PREVIEW_MS
  } finally {
    await knex.destroy()
  }
}

process.exitCode = (await main()) ? 0 : 1
