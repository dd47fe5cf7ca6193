/** Overrides set and cleared: one in force for each galaxy and subject. */
import type { OverrideSubject } from '../../../core/schema/changes.ts'
import type { Application } from './apply.ts'
import { overrideKey, overridesNow } from './current-scale.ts'
import { insertMany } from './insert-many.ts'
import type { StoredChangeOf } from './types.ts'

export async function applyOverrides(application: Application, changes: readonly StoredChangeOf<'override.set'>[]): Promise<void> {
  await endOverrides(application, changes)
  await insertMany(
    application.trx,
    'overrides',
    changes.map((c) => ({ galaxy: galaxyIn(c), about: c.payload.about, choice: JSON.stringify(c.payload.choice), reason: c.payload.reason, revFrom: application.revision })),
  )
}

/** What somebody else cleared meanwhile stays cleared. */
export async function applyClearedOverrides(application: Application, changes: readonly StoredChangeOf<'override.clear'>[]): Promise<void> {
  await endOverrides(application, changes)
}

async function endOverrides({ trx, revision, touched }: Application, changes: readonly { id: number; galaxy: number | null; payload: { about: OverrideSubject } }[]): Promise<void> {
  const held = await overridesNow(trx, changes.map(galaxyIn))
  const ended = changes.flatMap((c) => held.get(overrideKey(c.galaxy, c.payload.about))?.versionId ?? [])
  if (ended.length > 0) await trx('overrides').whereRaw('id = ANY(?)', [ended]).update({ revTo: revision })
  for (const c of changes) touched.add(galaxyIn(c))
}

function galaxyIn(c: { id: number; galaxy: number | null }): number {
  if (c.galaxy === null) throw new Error(`change ${c.id} overrides nothing that is held`)
  return c.galaxy
}
