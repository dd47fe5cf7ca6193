/** Measurements added, mended, excluded and restored: a measurement keeps its id through all its versions. */
import type { Measurement } from '../../../core/catalogue/types.ts'
import type { Application } from './apply.ts'
import { galaxyOf } from './apply.ts'
import { measurementsById } from './current.ts'
import { heldFields, publishedOf, statedFields } from './fields.ts'
import type { MeasurementFields } from './fields.ts'
import { insertMany } from './insert-many.ts'
import type { StoredChangeOf } from './types.ts'

export async function applyNewMeasurements(application: Application, changes: readonly StoredChangeOf<'measurement.add'>[]): Promise<number> {
  const rows = changes.map((c) => {
    const { measurement } = c.payload
    return rowOf(application, galaxyOf(application, c), statedFields(measurement, null), publishedOf(measurement))
  })
  await insertMany(application.trx, 'measurements', rows)
  return rows.length
}

export async function applyReplacements(application: Application, changes: readonly StoredChangeOf<'measurement.replace'>[]): Promise<number> {
  const held = await measurementsById(application.trx, changes.map((c) => c.payload.measurementId))
  return writeVersions(
    application,
    changes.map((c) => {
      const now = heldIn(held, c.payload.measurementId)
      return { now, fields: statedFields(c.payload.measurement, now.excludedReason), published: publishedOf(c.payload.measurement) }
    }),
  )
}

export async function applyExclusions(application: Application, changes: readonly StoredChangeOf<'measurement.exclude'>[]): Promise<number> {
  const held = await measurementsById(application.trx, changes.map((c) => c.payload.measurementId))
  return writeVersions(
    application,
    changes.map((c) => {
      const now = heldIn(held, c.payload.measurementId)
      return { now, fields: { ...heldFields(now), excludedReason: c.payload.reason }, published: now.published }
    }),
  )
}

/** What somebody else restored meanwhile is left alone. */
export async function applyRestorations(application: Application, changes: readonly StoredChangeOf<'measurement.restore'>[]): Promise<number> {
  const held = await measurementsById(application.trx, changes.map((c) => c.payload.measurementId))
  return writeVersions(
    application,
    changes
      .map((c) => heldIn(held, c.payload.measurementId))
      .filter((now) => now.excludedReason !== null)
      .map((now) => ({ now, fields: { ...heldFields(now), excludedReason: null }, published: now.published })),
  )
}

function heldIn(held: ReadonlyMap<number, Measurement>, id: number): Measurement {
  const found = held.get(id)
  if (!found) throw new Error(`measurement ${id} is not held`)
  return found
}

async function writeVersions(application: Application, versions: readonly { now: Measurement; fields: MeasurementFields; published: Measurement['published'] }[]): Promise<number> {
  if (versions.length === 0) return 0
  const { trx, revision } = application
  await trx('measurements').whereRaw('id = ANY(?)', [versions.map((v) => v.now.versionId)]).update({ revTo: revision })
  await insertMany(
    trx,
    'measurements',
    versions.map((v) => ({ lineage: v.now.id, ...rowOf(application, v.now.galaxyId, v.fields, v.published) })),
  )
  for (const v of versions) application.touched.add(v.now.galaxyId)
  return versions.length
}

function rowOf(application: Application, galaxy: number, fields: MeasurementFields, published: Measurement['published']): Record<string, unknown> {
  const { sourceId, ...rest } = fields
  return {
    galaxy, ...rest, source: sourceId, published: published === null ? null : JSON.stringify(published), enteredBy: application.author, revFrom: application.revision,
  }
}
