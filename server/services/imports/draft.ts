/** Good rows become the changes of a draft; bad ones stay for mending, and the next draft takes up only what no draft has yet. */
import type { Knex } from 'knex'
import { raw } from 'objection'
import { nameKey } from '../../../core/names.ts'
import type { ChangeInput, GalaxyRef } from '../../../core/schema/changes.ts'
import { BadInput, StateConflict } from '../../http/errors.ts'
import type { Reader, Services } from '../../http/route.ts'
import { ImportModel } from '../../models/import.ts'
import { SubmissionModel } from '../../models/submission.ts'
import { record } from '../audit.ts'
import { currentRevision } from '../changes/current.ts'
import { insertMany } from '../changes/insert-many.ts'
import { changesOf } from '../changes/types.ts'
import type { Base } from '../changes/types.ts'
import { columnsOf, insertDraft } from '../submissions/drafts.ts'
import { changesOfSubmissions, findSubmission, personOf } from '../submissions/load.ts'
import type { SubmissionRow } from '../submissions/load.ts'
import { keepSources } from './match-sources.ts'
import type { RowOutcome } from './read-rows.ts'
import { findImport, reread, rowsOf } from './store.ts'
import type { ImportRecord } from './store.ts'

/** Sources of two imports at a time must not be made twice. */
const SOURCES_LOCK = 7_118_203_003

/**
 * While the last draft of this import is still a draft, further rows join it; once it has been submitted they make another one.
 *
 * @throws BadInput when no row is ready
 */
export async function draftOfImport(services: Services, reader: Reader, id: number, input: { title: string; summary: string }): Promise<{ submission: number; changes: number; left: number }> {
  const person = personOf(reader).id
  return services.knex.transaction(async (trx) => {
    await trx.raw('SELECT pg_advisory_xact_lock(?)', [SOURCES_LOCK])
    const kept = await findImport(trx, id, reader, true)
    // Read anew: galaxies and sources may have come into the catalogue since.
    const outcomes = await reread(trx, kept, await rowsOf(trx, id))
    const open = outcomes.filter((o) => o.row.change === null && o.row.leftOut === null)
    const ready = open.filter((o) => o.problems.length === 0 && o.read.measurements.length > 0)
    if (ready.length === 0) throw new BadInput(`No row is ready to be drafted: ${open.length === 0 ? 'all are in a draft or left out' : 'mend their problems first, or leave them out'}. Nothing was changed.`)

    const last = await lastDraft(trx, kept, reader)
    if (last && last.state !== 'draft') await requireNothingPending(trx, last, ready)
    const submission = last?.state === 'draft' ? last.id : await insertDraft(trx, person, input)
    const changes = await writeChanges(trx, id, submission, ready, person)
    await ImportModel.query(trx).findById(id).patch({ submission })
    await SubmissionModel.query(trx)
      .findById(submission)
      .patch({ updatedAt: raw('now()'), lockVersion: raw('lock_version + 1') })
    await record(trx, person, 'import.draft', `import:${id}`, { submission, changes, rows: ready.length })
    return { submission, changes, left: open.length - ready.length }
  })
}

/** The submission that earlier rows went to, while it is open. */
async function lastDraft(trx: Knex.Transaction, kept: ImportRecord, reader: Reader): Promise<SubmissionRow | undefined> {
  if (kept.submission === null) return undefined
  const row = await findSubmission(trx, kept.submission, reader, true)
  return ['draft', 'submitted', 'returned'].includes(row.state) ? row : undefined
}

/** A galaxy that a waiting submission adds would be added twice. */
async function requireNothingPending(trx: Knex.Transaction, last: SubmissionRow, ready: readonly RowOutcome[]): Promise<void> {
  const pending = new Set(changesOf(await changesOfSubmissions(trx, [last.id]), 'galaxy.add').map((c) => nameKey(c.payload.designation)))
  const both = ready.find((o) => o.match?.kind === 'new' && pending.has(o.match.key))
  if (!both) return
  throw new StateConflict(
    `Submission ${last.id}, made from this table, adds ${both.read.galaxy} and waits for review. Draft these rows when it has been decided on, or withdraw it. Nothing was changed.`,
  )
}

async function writeChanges(trx: Knex.Transaction, importId: number, submission: number, ready: readonly RowOutcome[], person: number): Promise<number> {
  const cited = new Map(ready.flatMap((o) => (o.read.source !== '' ? [[o.read.source, o.source] as const] : [])))
  const sourceIds = await keepSources(trx, cited, person)
  const before = await changesOfSubmissions(trx, [submission])
  const base: Base = { atRevision: await currentRevision(trx), versionId: null, fields: {} }
  let position = Math.max(0, ...before.map((c) => c.position))
  const rowOf = (input: ChangeInput, galaxy: number | null): Record<string, unknown> => {
    position += 1
    return { submission, position, ...columnsOf({ input, base, galaxy }) }
  }

  const added = new Map(changesOf(before, 'galaxy.add').map((c) => [nameKey(c.payload.designation), c.id]))
  const fresh = newGalaxies(ready).filter((g) => !added.has(g.key))
  const galaxyIds = await insertMany<number>(trx, 'changes', fresh.map((g) => rowOf(g.input, null)), 'id')
  fresh.forEach((g, i) => added.set(g.key, galaxyIds[i] ?? 0))

  const names = newNames(ready)
  await insertMany(trx, 'changes', names.map((n) => rowOf(n.input, n.galaxy)))

  const measurements = ready.flatMap((o) => {
    const ref = refOf(o, added)
    const sourceId = o.read.source === '' ? (o.source.kind === 'held' ? o.source.id : 0) : (sourceIds.get(o.read.source) ?? 0)
    return o.read.measurements.map((m) => ({
      row: o.row.number,
      change: rowOf({ action: 'measurement.add', payload: { galaxy: ref, measurement: { ...m, sourceId } } }, o.match?.kind === 'held' ? o.match.id : null),
    }))
  })
  const ids = await insertMany<number>(trx, 'changes', measurements.map((m) => m.change), 'id')
  const rows = new Map(measurements.map((m, i) => [m.row, ids[i] ?? 0]))
  await trx.raw(
    `UPDATE import_rows SET change = made.change FROM unnest(?::integer[], ?::integer[]) AS made (number, change)
     WHERE import_rows.number = made.number AND import_rows.import = ?`,
    [[...rows.keys()], [...rows.values()], importId],
  )
  return fresh.length + names.length + measurements.length
}

function refOf(o: RowOutcome, added: ReadonlyMap<string, number>): GalaxyRef {
  if (o.match?.kind === 'held') return { slug: o.match.slug }
  const change = o.match?.kind === 'new' ? added.get(o.match.key) : undefined
  if (change === undefined) throw new Error(`row ${o.row.number} has no galaxy`)
  return { change }
}

/** One addition for each galaxy that is new, with every name that the table gives it, and the class that any of its rows tells. */
function newGalaxies(ready: readonly RowOutcome[]): { key: string; input: ChangeInput }[] {
  const groups = new Map<string, RowOutcome[]>()
  for (const o of ready) if (o.match?.kind === 'new') groups.set(o.match.key, [...(groups.get(o.match.key) ?? []), o])
  return [...groups].map(([key, rows]) => {
    const named = rows.find((o) => o.read.ra !== null) ?? rows[0]
    const designation = rows[0]?.match?.kind === 'new' ? rows[0].match.name : key
    const names = [...new Set(rows.map((o) => o.read.galaxy))].filter((name) => name !== designation && nameKey(name) !== nameKey(designation))
    const payload = {
      designation,
      ra: named?.read.ra ?? 0,
      dec: named?.read.dec ?? 0,
      class: rows.find((o) => o.read.galaxyClass !== null)?.read.galaxyClass ?? ('unknown' as const),
      status: 'confirmed' as const,
      note: null,
      names,
    }
    return { key, input: { action: 'galaxy.add', payload } }
  })
}

/** A galaxy of the catalogue that a row meant by its position gets the row's name, so that the next table finds it. */
function newNames(ready: readonly RowOutcome[]): { galaxy: number; input: ChangeInput }[] {
  const names = new Map<string, { galaxy: number; input: ChangeInput }>()
  for (const o of ready) {
    if (o.match?.kind !== 'held' || o.match.byPositionArcsec === null) continue
    const key = `${o.match.id} ${nameKey(o.read.galaxy)}`
    if (names.has(key)) continue
    names.set(key, { galaxy: o.match.id, input: { action: 'name.add', payload: { galaxy: { slug: o.match.slug }, name: o.read.galaxy, sourceId: null } } })
  }
  return [...names.values()]
}
