/** Batch entry: upload a table, say what its columns hold, mend its rows. */
import { guessMapping } from '../../../core/formats/guess-mapping.ts'
import { quantityNamed } from '../../../core/quantities.ts'
import type { ImportAnswer, ImportRow, Mapping } from '../../../core/schema/imports.ts'
import { folderStore } from '../../gateways/file-store.ts'
import { BadInput, NotFound, StateConflict } from '../../http/errors.ts'
import type { FieldError } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { ImportModel } from '../../models/import.ts'
import { ImportRowModel } from '../../models/import-row.ts'
import { record } from '../audit.ts'
import { sourcesById } from '../changes/current.ts'
import { insertMany } from '../changes/insert-many.ts'
import { personOf } from '../submissions/load.ts'
import { readTable } from './read-table.ts'
import { answerOfImport, findImport, importsOf, reread, rowsOf } from './store.ts'
import type { ImportRecord, KeptRow } from './store.ts'

export interface Upload {
  name: string
  bytes: Uint8Array
}

/** Keeps the file and its rows, and guesses what the columns hold. */
export async function createImport(services: Services, reader: Reader, upload: Upload | undefined): Promise<ImportAnswer> {
  if (!upload) throw new BadInput('No file came with this request. Nothing was kept.', [{ path: 'file', message: 'Choose a CSV or TSV file.' }])
  const person = personOf(reader)
  const table = await readTable(upload.bytes)
  const store = folderStore(services.config.uploadsFolder)
  const stored = await store.put(upload.bytes)
  try {
    return await services.knex.transaction(async (trx) => {
      const made = await ImportModel.query(trx).insert({
        owner: person.id, fileName: fileName(upload.name), format: table.format, bytes: stored.bytes, sha256: stored.sha256, storeKey: stored.key,
        headers: table.headers, mapping: guessMapping(table.headers, table.rows.slice(0, 50)),
      })
      await insertMany(trx, 'importRows', table.rows.map((raw, i) => ({ import: made.id, number: i + 1, raw: JSON.stringify(raw) })))
      const kept = await findImport(trx, made.id, reader)
      await reread(trx, kept, await rowsOf(trx, made.id))
      await record(trx, person.id, 'import.create', `import:${made.id}`, { file: kept.fileName, sha256: stored.sha256, rows: table.rows.length })
      return answerOfImport(trx, kept)
    })
  } catch (error) {
    await store.remove(stored.key)
    throw error
  }
}

/** What people called the file, without folders and control characters; it is shown and never used as a path. */
function fileName(sent: string): string {
  const last = sent.split(/[\\/]/).pop() ?? ''
  const clean = last.replace(/\p{C}/gu, '').trim().slice(0, 200)
  return clean === '' ? 'table' : clean
}

export async function listImports(services: Services, reader: Reader): Promise<ImportAnswer[]> {
  const records = await importsOf(services.knex, personOf(reader).id)
  const answers: ImportAnswer[] = []
  for (const r of records) answers.push(await answerOfImport(services.knex, r))
  return answers
}

export async function getImport(services: Services, reader: Reader, id: number): Promise<ImportAnswer> {
  return answerOfImport(services.knex, await findImport(services.knex, id, reader))
}

/** All rows are read anew under the mapping. */
export async function patchMapping(services: Services, reader: Reader, id: number, mapping: Mapping): Promise<ImportAnswer> {
  return services.knex.transaction(async (trx) => {
    const before = await findImport(trx, id, reader, true)
    await checkMapping(trx, before, mapping)
    const kept = { ...before, mapping }
    await ImportModel.query(trx).findById(id).patch({ mapping })
    await reread(trx, kept, await rowsOf(trx, id))
    return answerOfImport(trx, kept)
  })
}

async function checkMapping(trx: Parameters<typeof reread>[0], { headers }: ImportRecord, mapping: Mapping): Promise<void> {
  const errors: FieldError[] = []
  if (mapping.columns.length !== headers.length) {
    errors.push({ path: 'mapping.columns', message: `The table has ${headers.length} columns; the mapping speaks of ${mapping.columns.length}.` })
  }
  const first = new Map<string, number>()
  mapping.columns.forEach(({ role, unit }, i) => {
    const path = `mapping.columns.${i}`
    const before = first.get(role)
    if (role !== 'ignore' && role !== 'note' && before !== undefined) {
      errors.push({ path: `${path}.role`, message: `Columns ${before + 1} and ${i + 1} cannot both hold this.` })
    }
    first.set(role, i)
    const q = role.startsWith('value:') ? quantityNamed(role.slice('value:'.length)) : undefined
    if (q && unit !== '' && !q.units.some((u) => u.unit === unit || u.names.includes(unit.toLowerCase()))) {
      errors.push({ path: `${path}.unit`, message: `${q.label} is given in ${q.units.map((u) => u.unit || 'no unit').join(' or ')}, not in "${unit}".` })
    }
  })
  const wide = mapping.columns.some((c) => c.role.startsWith('value:'))
  if (wide && first.has('value')) {
    errors.push({ path: `mapping.columns.${first.get('value')}.role`, message: 'A table has either one column of values, or a column for each quantity, not both.' })
  }
  const { sourceId, anchor } = mapping.constants
  if (sourceId !== null && !(await sourcesById(trx, [sourceId])).has(sourceId)) errors.push({ path: 'mapping.constants.sourceId', message: 'There is no such source.' })
  if (anchor !== null && !(await trx('anchors').select('key').where({ key: anchor }).whereNull('revTo').first())) {
    errors.push({ path: 'mapping.constants.anchor', message: `The scale has no anchor "${anchor}".` })
  }
  if (mapping.constants.anchorValueAssumed !== null && anchor === null) {
    errors.push({ path: 'mapping.constants.anchor', message: 'Name the anchor whose value was assumed.' })
  }
  if (errors.length > 0) throw new BadInput('The mapping was not changed. Mend what is named here.', errors)
}

export async function readImportRows(
  services: Services,
  reader: Reader,
  id: number,
  query: { only: 'bad' | 'ok' | 'all'; offset: number; limit: number },
): Promise<{ rows: ImportRow[]; total: number }> {
  const { knex } = services
  await findImport(knex, id, reader)
  const chosen = knex('importRows')
    .where({ import: id })
    .modify((q) => {
      if (query.only === 'bad') void q.whereNull('leftOut').whereRaw(`problems <> '[]'`)
      if (query.only === 'ok') void q.whereNull('leftOut').whereRaw(`problems = '[]'`)
    })
  const counted = (await chosen.clone().count('* as total').first()) as { total: number } | undefined
  const rows = (await chosen.clone().select('number', 'raw', 'parsed', 'problems', 'leftOut').orderBy('number').offset(query.offset).limit(query.limit)) as KeptRow[]
  return {
    rows: rows.map((r) => ({ number: r.number, raw: r.raw, reading: r.parsed?.reading ?? null, galaxy: r.parsed?.galaxy ?? null, problems: r.problems, leftOut: r.leftOut })),
    total: counted?.total ?? 0,
  }
}

/** Mends cells, or leaves the row out with a reason. Other rows may follow: a duplicate that goes makes the other one good. */
export async function patchRow(
  services: Services,
  reader: Reader,
  id: number,
  number: number,
  patch: { cells?: string[] | undefined; leftOut?: string | null | undefined },
): Promise<ImportAnswer> {
  return services.knex.transaction(async (trx) => {
    const kept = await findImport(trx, id, reader, true)
    const rows = await rowsOf(trx, id)
    const row = rows.find((r) => r.number === number)
    if (!row) throw new NotFound(`Import ${id} has no row ${number}.`)
    if (row.change !== null) throw new StateConflict(`Row ${number} is in submission ${kept.submission ?? ''} already: change it there.`)
    if (patch.cells && patch.cells.length !== kept.headers.length) {
      throw new BadInput('The row was not changed.', [{ path: 'cells', message: `A row of this table has ${kept.headers.length} cells; ${patch.cells.length} were sent.` }])
    }
    if (patch.cells?.some((cell) => cell.includes('\u0000'))) throw new BadInput('The row was not changed.', [{ path: 'cells', message: 'A cell holds a NUL character.' }])
    row.raw = patch.cells?.map((cell) => cell.trim()) ?? row.raw
    row.leftOut = patch.leftOut === undefined ? row.leftOut : patch.leftOut
    await ImportRowModel.query(trx).findById([id, number]).patch({ raw: row.raw, leftOut: row.leftOut })
    await reread(trx, kept, rows)
    return answerOfImport(trx, kept)
  })
}
