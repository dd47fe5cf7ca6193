/** Reads all rows of a table under its mapping against the catalogue as it stands: what each would become, and its problems in words. */
import { setImmediate as nextTurn } from 'node:timers/promises'
import type { Knex } from 'knex'
import { labelInSentence, measureWords } from '../../../core/formats/measure-words.ts'
import { columnName, rowReader } from '../../../core/formats/import-row.ts'
import type { ReadRow, RowMeasurement, RowProblem } from '../../../core/formats/import-row.ts'
import { method } from '../../../core/methods.ts'
import { quantity } from '../../../core/quantities.ts'
import type { Anchor } from '../../../core/catalogue/types.ts'
import type { Mapping } from '../../../core/schema/imports.ts'
import { measurementsOfGalaxies } from '../changes/current.ts'
import { statedFields } from '../changes/fields.ts'
import { angleWords, matchGalaxies } from './match-galaxies.ts'
import type { GalaxyMatch } from './match-galaxies.ts'
import { constantSource, matchSources } from './match-sources.ts'
import type { SourceMatch } from './match-sources.ts'

export interface RowToRead {
  number: number
  raw: string[]
  leftOut: string | null
  /** The change it became, in an earlier draft. */
  change: number | null
}

/** What is kept of a row that has been read. */
export interface ParsedRow {
  reading: string | null
  galaxy: { slug: string | null; name: string; isNew: boolean } | null
  /** Citation in the row, when it brings a new source. */
  newSource: string | null
}

export interface RowOutcome {
  row: RowToRead
  read: ReadRow
  match: GalaxyMatch | undefined
  source: SourceMatch
  parsed: ParsedRow
  problems: RowProblem[]
}

/** Rows that are left out are read too, and compared with no others. */
export async function readRows(knex: Knex, headers: readonly string[], mapping: Mapping, rows: readonly RowToRead[]): Promise<RowOutcome[]> {
  const anchors = (await knex('anchors').select('key', 'label').whereNull('revTo')) as Pick<Anchor, 'key' | 'label'>[]
  const read = await readAll(rows, rowReader({ headers, mapping, anchors }))
  const matches = await matchGalaxies(knex, read, mapping.addGalaxies)
  const sources = await matchSources(knex, read.map((r) => r.source))
  const constant = await constantSource(knex, mapping.constants.sourceId)
  const at = (role: string): string | null => {
    const i = mapping.columns.findIndex((c) => c.role === role)
    return i < 0 ? null : columnName(headers, i)
  }

  const outcomes = rows.map((row, i): RowOutcome => {
    const r = read[i] as ReadRow
    const match = matches[i]
    const source = r.source === '' ? constant : (sources.get(r.source) ?? constant)
    const problems = [...r.problems]
    if (match?.kind === 'none') problems.push({ column: at('galaxy'), message: match.problem })
    if (source.kind === 'none' && r.measurements.length > 0) problems.push({ column: at('source'), message: source.problem })
    return { row, read: r, match, source, parsed: parsedOf(r, match, source), problems }
  })
  await markDuplicates(knex, outcomes)
  return outcomes
}

const ROWS_AT_A_TIME = 2000

/** A large table must not keep everybody else waiting: others get their turn every so many rows. */
async function readAll(rows: readonly RowToRead[], reader: (cells: readonly string[]) => ReadRow): Promise<ReadRow[]> {
  const read: ReadRow[] = []
  for (const [i, row] of rows.entries()) {
    if (i > 0 && i % ROWS_AT_A_TIME === 0) await nextTurn()
    read.push(reader(row.raw))
  }
  return read
}

function parsedOf(read: ReadRow, match: GalaxyMatch | undefined, source: SourceMatch): ParsedRow {
  const galaxy = match && match.kind !== 'none' ? { slug: match.kind === 'held' ? match.slug : null, name: match.name, isNew: match.kind === 'new' } : null
  const values = read.measurements.map(measurementWords)
  const reading = galaxy && values.length > 0 ? [galaxyWords(read, match), ...values, sourceWords(read, source)].filter((w) => w !== '').join(', ') : null
  return { reading, galaxy, newSource: source.kind === 'new' ? source.key : null }
}

function galaxyWords(read: ReadRow, match: GalaxyMatch | undefined): string {
  if (!match || match.kind === 'none') return read.galaxy
  const isNew = match.kind === 'new' ? ' (new)' : ''
  return match.byPositionArcsec === null ? `${match.name}${isNew}` : `${match.name}${isNew}, taken for the "${read.galaxy}" of the table, ${angleWords(match.byPositionArcsec)} away`
}

function sourceWords(read: ReadRow, source: SourceMatch): string {
  if (source.kind === 'new') return `${read.source} (new source)`
  return source.kind === 'held' ? source.label : read.source
}

/** "distance modulus 26.37 ± 0.05 mag, Cepheids" */
export function measurementWords(m: RowMeasurement): string {
  const q = quantity(m.quantity)
  const unit = m.unit === '' ? q.unit : m.unit
  return [`${labelInSentence(q.label)} ${measureWords({ ...m, unit: q.kind === 'text' ? '' : unit })}`, ...(m.method === null ? [] : [method(m.method).label])].join(', ')
}

/** A measurement stands once: not twice in the table, and not again when the catalogue holds it. */
async function markDuplicates(knex: Knex, outcomes: readonly RowOutcome[]): Promise<void> {
  const held = new Set<string>()
  const galaxies = outcomes.flatMap((o) => (o.match?.kind === 'held' ? o.match.id : []))
  for (const m of await measurementsOfGalaxies(knex, galaxies)) held.add(sameness(`${m.galaxyId}`, `${m.sourceId}`, m))
  const seen = new Map<string, number>()
  // What is drafted already counts first, wherever it stands.
  for (const o of [...outcomes.filter((o) => o.row.change !== null), ...outcomes.filter((o) => o.row.change === null)]) {
    if (o.row.leftOut !== null || o.match === undefined || o.match.kind === 'none' || o.source.kind === 'none') continue
    const galaxy = o.match.kind === 'held' ? `${o.match.id}` : o.match.key
    const source = o.source.kind === 'held' ? `${o.source.id}` : o.source.key
    for (const m of o.read.measurements) {
      const stated = statedFields({ ...m, sourceId: 1 }, null)
      const same = sameness(galaxy, source, { quantity: m.quantity, value: stated.value as number | null, textValue: m.textValue, method: m.method })
      const words = measurementWords(m)
      const first = seen.get(same)
      if (o.row.change !== null) {
        seen.set(same, o.row.number)
        continue
      }
      if (o.match.kind === 'held' && held.has(same)) o.problems.push({ column: null, message: `The catalogue holds this measurement already: ${o.match.name}, ${words}. Leave the row out.` })
      else if (first !== undefined) o.problems.push({ column: null, message: `The same measurement as row ${first}: ${words}. Leave one of them out.` })
      else seen.set(same, o.row.number)
    }
  }
}

function sameness(galaxy: string, source: string, m: { quantity: string; value: number | null; textValue: string | null; method: string | null }): string {
  return JSON.stringify([galaxy, source, m.quantity, m.value === null ? m.textValue : Number(m.value.toPrecision(9)), m.method])
}
