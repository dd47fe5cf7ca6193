/**
 * The catalogue list at 100,000 galaxies and 1,000,000 measurements, against a bare pg + Express route that runs the same SQL and returns the
 * same bytes; both in processes of their own, asked in many short turns, so that whatever else the machine does falls on both. Then the time of filter + sort + page questions of all kinds.
 */
import { spawn, type ChildProcess } from 'node:child_process'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import type { Knex } from 'knex'
import { openDatabase } from '../server/database.ts'
import { migrateToLatest } from '../server/maintenance/migrate.ts'
import { generateCatalogue } from './catalogue/generate.ts'
import { askList } from './list/ask-list.ts'
import type { BareQuestion } from './list/bare-server.ts'
import { ensureWrk, load } from './list/load.ts'

const GALAXIES = Number(process.env.BENCH_GALAXIES ?? 100_000)
const BAR_SHARE = 0.6
const BAR_P95_MS = 50
const ROUNDS = Number(process.env.BENCH_ROUNDS ?? 15)
const SECONDS = Number(process.env.BENCH_SECONDS ?? 1)

/** What the table page asks; the first is the one that the bar is about. */
const TABLE_COLUMNS = 'columns=name,class,distance,distance_method,abs_v,abs_b,host,host_relation,host_sep,host_probability,tidal_index,v_lg,n_measurements'
const COMPARED = [`${TABLE_COLUMNS}&limit=50`, `${TABLE_COLUMNS}&limit=50&sort=-distance`, `class=dwarf-irregular&abs_v=..-10&sort=abs_v&limit=100`]

/** @param host - identifier of a galaxy with satellites */
const TIMED = (host: string): string[] => [
  'sort=name', 'sort=-name', 'sort=distance', 'sort=-distance', 'sort=abs_v', 'sort=-abs_v', 'sort=host_sep', 'sort=-metallicity', 'sort=ra', 'sort=class,-distance',
  'class=dwarf-irregular', 'q=bench&sort=-distance', 'class=ultra-faint&sort=-abs_v', 'distance=1..2&sort=abs_v', 'distance=..0.7&sort=-v_lg', 'abs_v=..-20&sort=distance', `host=${host}&sort=host_sep`,
  `host=!${host}&sort=tidal_index`, 'has=metallicity&sort=-metallicity', 'lacks=v_hel&sort=distance', 'glat=!-10..10&sort=abs_b', 'q=bench%20123', 'q=bch%20777&sort=distance',
  'cone=120,30,5&sort=distance', 'cone=10,-60,0.5', `within=${host},800&sort=abs_v`, 'log_mhi=8..&metallicity=-1..&sort=-log_mstar', 'updated_at=2026-01-01..&sort=-updated_at',
]

async function start(program: string, env: Record<string, string>): Promise<{ child: ChildProcess; base: string }> {
  const child = spawn(process.execPath, ['--import', 'tsx', join(import.meta.dirname, 'list', program)], { stdio: ['ignore', 'pipe', 'inherit'], env: { ...process.env, ...env } })
  if (!child.stdout) throw new Error('no output to read the port from')
  for await (const line of createInterface(child.stdout)) return { child, base: `http://127.0.0.1:${line}` }
  throw new Error(`${program} did not start`)
}

async function textOf(url: string): Promise<string> {
  const response = await fetch(url)
  const text = await response.text()
  if (!response.ok) throw new Error(`${url} answered ${response.status}: ${text.slice(0, 500)}`)
  return text
}

/** The statements that the application sends for a question it has been asked before, and its answer around the rows. */
async function recorded(knex: Knex, ask: () => Promise<string>): Promise<BareQuestion> {
  await ask()
  const statements: BareQuestion['statements'] = []
  const note = ({ sql, bindings }: { sql: string; bindings: unknown[] }): void => {
    statements.push({ sql, bindings })
  }
  knex.on('query', note)
  const text = await ask()
  knex.removeListener('query', note)
  const after = text.slice(text.lastIndexOf('],"total":'))
  return { statements, before: '{"rows":[', after }
}

function percentile(sorted: readonly number[], share: number): number {
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? NaN
}

const say = (line: string): void => void process.stdout.write(`${line}\n`)

/** The invented catalogue, released; a database that holds one already is left as it is. */
async function fill(knex: Knex): Promise<void> {
  const { rows } = await knex.raw<{ rows: { n: number }[] }>('SELECT count(*)::int AS n FROM galaxies')
  if (rows[0]?.n !== GALAXIES) {
    const made = await generateCatalogue(knex, { galaxies: GALAXIES, log: say })
    await knex.raw("INSERT INTO releases (label, revision, title) SELECT 'bench', max(number), 'Bench' FROM revisions")
    say(`${made.galaxies} galaxies, ${made.measurements} measurements`)
  }
  await knex.raw('VACUUM ANALYZE')
}

async function largestHost(knex: Knex): Promise<string> {
  const { rows } = await knex.raw<{ rows: { host: string }[] }>('SELECT host FROM catalogue_rows WHERE host IS NOT NULL GROUP BY host ORDER BY count(*) DESC, host LIMIT 1')
  return rows[0]?.host ?? 'nobody'
}

async function main(): Promise<boolean> {
  ensureWrk()
  const databaseUrl = process.env.DATABASE_URL ?? ''
  const upkeep = openDatabase({ databaseUrl, purpose: 'upkeep', connections: 2 })
  await migrateToLatest(upkeep)
  await fill(upkeep)
  const timed = TIMED(await largestHost(upkeep))
  const questions: BareQuestion[] = []
  for (const query of COMPARED) questions.push(await recorded(upkeep, () => askList(upkeep, query)))
  await upkeep.destroy()
  const app = await start('app-server.ts', { DATABASE_URL: databaseUrl })
  const bare = await start('bare-server.ts', { DATABASE_URL: databaseUrl, BARE: JSON.stringify(questions) })
  try {
    const share = await compare(app.base, bare.base)
    const slowest = await timeAll(app.base, timed)
    return share >= BAR_SHARE && slowest <= BAR_P95_MS
  } finally {
    app.child.kill()
    bare.child.kill()
  }
}

/** @returns our share of the bare route's requests a second, on the first question */
async function compare(app: string, bare: string): Promise<number> {
  let first = NaN
  for (const [i, query] of COMPARED.entries()) {
    const [ours, theirs] = [`${app}/api/galaxies?${query}`, `${bare}/${i}`]
    const [a, b] = [await textOf(ours), await textOf(theirs)]
    if (a !== b) throw new Error(`the two answers to ${query} differ`)
    const rounds: { ours: number; theirs: number }[] = []
    for (let round = -1; round < ROUNDS; round++) {
      const one = await load(ours, round < 0 ? 1 : SECONDS)
      const other = await load(theirs, round < 0 ? 1 : SECONDS)
      if (round >= 0) rounds.push({ ours: one.perSecond, theirs: other.perSecond })
    }
    const shares = rounds.map((r) => r.ours / r.theirs).sort((x, y) => x - y)
    const middle = percentile(shares, 0.5)
    if (i === 0) first = middle
    const best = (key: 'ours' | 'theirs'): string => Math.max(...rounds.map((r) => r[key])).toFixed(0)
    say(`${query}\n  ours ${best('ours')}/s, bare ${best('theirs')}/s, ${(a.length / 1000).toFixed(1)} kB; share ${(100 * middle).toFixed(0)} % (${shares.map((s) => (100 * s).toFixed(0)).join(', ')})`)
  }
  say(`list against the bare route: ${(100 * first).toFixed(0)} % (bar ${100 * BAR_SHARE} %)`)
  return first
}

/** Every question on its first page and one further on, several times, one client. @returns the 95th percentile of all, ms */
async function timeAll(app: string, questions: readonly string[]): Promise<number> {
  const times: number[] = []
  const slow: { query: string; ms: number }[] = []
  for (const query of questions) {
    const own: number[] = []
    for (let round = 0; round < 4; round++) {
      const begun = performance.now()
      const page = JSON.parse(await textOf(`${app}/api/galaxies?${TABLE_COLUMNS}&${query}`)) as { next: string | null }
      own.push(performance.now() - begun)
      if (page.next === null) continue
      const again = performance.now()
      await textOf(`${app}/api/galaxies?${TABLE_COLUMNS}&${query}&cursor=${page.next}`)
      own.push(performance.now() - again)
    }
    times.push(...own)
    slow.push({ query, ms: Math.max(...own.slice(1)) })
  }
  times.sort((a, b) => a - b)
  slow.sort((a, b) => b.ms - a.ms)
  const p95 = percentile(times, 0.95)
  say(`filter + sort + page, ${times.length} questions: median ${percentile(times, 0.5).toFixed(1)} ms, p95 ${p95.toFixed(1)} ms (bar ${BAR_P95_MS} ms), longest ${times.at(-1)?.toFixed(1)} ms`)
  for (const { query, ms } of slow.slice(0, 6)) say(`  ${ms.toFixed(1).padStart(6)} ms  ${query}`)
  return p95
}

process.exitCode = (await main()) ? 0 : 1
