/** Applies the changes of a submission to the versioned tables: closes the versions that end, inserts those that begin. */
import type { Knex } from 'knex'
import { movesScale } from '../../../core/schema/changes.ts'
import { applyAmendments, applyNewGalaxies, applyNewNames } from './apply-galaxies.ts'
import { applyExclusions, applyNewMeasurements, applyReplacements, applyRestorations } from './apply-measurements.ts'
import { applyClearedOverrides, applyOverrides } from './apply-overrides.ts'
import { applyAnchors, applyPolicy } from './apply-scale.ts'
import { changesOf } from './types.ts'
import type { StoredChange } from './types.ts'

export interface Applied {
  /** Galaxies whose measurements, names, overrides or own fields moved. */
  touched: number[]
  /** Anchors or the policy moved, which touches every galaxy. */
  scaleChanged: boolean
  /** The galaxy of each change that added one or spoke of an added one, by change. */
  galaxies: ReadonlyMap<number, number>
  /** How many versions of measurements began or ended. */
  measurements: number
}

/** What an application knows while it runs. */
export interface Application {
  trx: Knex.Transaction
  /** The revision that it makes. */
  revision: number
  /** Whose submission it is. */
  author: number
  /** Galaxies added so far, by the change that adds each. */
  added: Map<number, number>
  touched: Set<number>
  /** By change, where the galaxy was not known before. */
  galaxies: Map<number, number>
}

/**
 * Must run inside the transaction that holds the catalogue's lock, after conflicts have been ruled out. Galaxies come first, so that what
 * refers to them finds them.
 */
export async function applyChanges(trx: Knex.Transaction, submission: { author: number }, changes: readonly StoredChange[], revision: number): Promise<Applied> {
  const application: Application = { trx, revision, author: submission.author, added: new Map(), touched: new Set(), galaxies: new Map() }
  await applyNewGalaxies(application, changesOf(changes, 'galaxy.add'))
  await applyAmendments(application, changesOf(changes, 'galaxy.amend'))
  await applyNewNames(application, changesOf(changes, 'name.add'))
  const added = await applyNewMeasurements(application, changesOf(changes, 'measurement.add'))
  const replaced = await applyReplacements(application, changesOf(changes, 'measurement.replace'))
  const excluded = await applyExclusions(application, changesOf(changes, 'measurement.exclude'))
  const restored = await applyRestorations(application, changesOf(changes, 'measurement.restore'))
  await applyClearedOverrides(application, changesOf(changes, 'override.clear'))
  await applyOverrides(application, changesOf(changes, 'override.set'))
  await applyAnchors(application, changesOf(changes, 'anchor.set'))
  await applyPolicy(application, changesOf(changes, 'policy.set'))
  return {
    touched: [...application.touched].sort((a, b) => a - b),
    scaleChanged: changes.some((c) => movesScale(c.action)),
    galaxies: application.galaxies,
    measurements: added + replaced + excluded + restored,
  }
}

/** The galaxy that a change is about: the one recorded with it, or one that another change has just added. */
export function galaxyOf(application: Application, change: { id: number; galaxy: number | null; payload: { galaxy: { slug: string } | { change: number } } }): number {
  const ref = change.payload.galaxy
  const id = 'change' in ref ? application.added.get(ref.change) : change.galaxy
  if (id == null) throw new Error(`change ${change.id} refers to no galaxy`)
  application.touched.add(id)
  if ('change' in ref) application.galaxies.set(change.id, id)
  return id
}
