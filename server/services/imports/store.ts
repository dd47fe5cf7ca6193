/** Imports and their rows as the database holds them. An import is its owner's alone. */
import type { Knex } from 'knex'
import type { RowProblem } from '../../../core/formats/import-row.ts'
import type { ImportAnswer, Mapping } from '../../../core/schema/imports.ts'
import { NotFound } from '../../http/errors.ts'
import type { Reader } from '../../http/route.ts'
import { personOf } from '../submissions/load.ts'
import { readRows } from './read-rows.ts'
import type { ParsedRow, RowOutcome, RowToRead } from './read-rows.ts'

export interface ImportRecord {
  id: number
  owner: number
  fileName: string
  format: string
  headers: string[]
  mapping: Mapping
  submission: number | null
  createdAt: Date
}

const COLUMNS = ['id', 'owner', 'fileName', 'format', 'headers', 'mapping', 'submission', 'createdAt']

/** @param lock - so that two changes of one import come one after the other. @throws NotFound */
export async function findImport(knex: Knex, id: number, reader: Reader, lock = false): Promise<ImportRecord> {
  const query = knex('imports').select(COLUMNS).where({ id, owner: personOf(reader).id }).first()
  const found = (await (lock ? query.forUpdate() : query)) as ImportRecord | undefined
  if (!found) throw new NotFound(`You have no import ${id}.`)
  return found
}

export async function importsOf(knex: Knex, owner: number): Promise<ImportRecord[]> {
  return (await knex('imports').select(COLUMNS).where({ owner }).orderBy('id', 'desc').limit(100)) as ImportRecord[]
}

export async function rowsOf(knex: Knex, id: number): Promise<RowToRead[]> {
  return (await knex('importRows').select('number', 'raw', 'leftOut', 'change').where({ import: id }).orderBy('number')) as RowToRead[]
}

const CHUNK = 2000

/** Reads all rows anew and keeps what came of each. Rows that are in a draft already keep what they were drafted as. */
export async function reread(trx: Knex.Transaction, record: ImportRecord, rows: readonly RowToRead[]): Promise<RowOutcome[]> {
  const outcomes = await readRows(trx, record.headers, record.mapping, rows)
  const open = outcomes.filter((o) => o.row.change === null)
  for (let at = 0; at < open.length; at += CHUNK) {
    const part = open.slice(at, at + CHUNK).map((o) => ({ number: o.row.number, parsed: o.parsed, problems: o.problems }))
    await trx.raw(
      `UPDATE import_rows SET parsed = new.parsed, problems = new.problems
       FROM jsonb_to_recordset(?::jsonb) AS new (number integer, parsed jsonb, problems jsonb)
       WHERE import_rows.import = ? AND import_rows.number = new.number
         AND (import_rows.parsed IS DISTINCT FROM new.parsed OR import_rows.problems IS DISTINCT FROM new.problems)`,
      [JSON.stringify(part), record.id],
    )
  }
  return outcomes
}

interface Counts {
  rows: number
  rowsOk: number
  rowsBad: number
  rowsLeftOut: number
  newGalaxies: number
  newSources: number
}

const SAMPLE_ROWS = 5

export async function answerOfImport(knex: Knex, record: ImportRecord): Promise<ImportAnswer> {
  const { rows } = (await knex.raw(
    `SELECT count(*)::int AS "rows",
       count(*) FILTER (WHERE left_out IS NULL AND problems = '[]')::int AS "rowsOk",
       count(*) FILTER (WHERE left_out IS NULL AND problems <> '[]')::int AS "rowsBad",
       count(*) FILTER (WHERE left_out IS NOT NULL)::int AS "rowsLeftOut",
       count(DISTINCT parsed #>> '{galaxy,name}') FILTER (WHERE left_out IS NULL AND problems = '[]' AND parsed #>> '{galaxy,isNew}' = 'true')::int AS "newGalaxies",
       count(DISTINCT parsed ->> 'newSource') FILTER (WHERE left_out IS NULL AND problems = '[]')::int AS "newSources"
     FROM import_rows WHERE import = ?`,
    [record.id],
  )) as { rows: Counts[] }
  const sample = (await knex('importRows').select('raw').where({ import: record.id }).orderBy('number').limit(SAMPLE_ROWS)) as { raw: string[] }[]
  const counts = rows[0] ?? { rows: 0, rowsOk: 0, rowsBad: 0, rowsLeftOut: 0, newGalaxies: 0, newSources: 0 }
  return {
    id: record.id,
    fileName: record.fileName,
    format: record.format,
    headers: record.headers,
    sample: sample.map((s) => s.raw),
    mapping: record.mapping,
    ...counts,
    submission: record.submission,
    createdAt: record.createdAt.toISOString(),
  }
}

export interface KeptRow {
  number: number
  raw: string[]
  parsed: ParsedRow | null
  problems: RowProblem[]
  leftOut: string | null
}
