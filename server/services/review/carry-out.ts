/** What an approval does to the catalogue, up to but without its commit: the approval commits it, the preview rolls it back. */
import type { Knex } from 'knex'
import { StateConflict } from '../../http/errors.ts'
import { applyChanges } from '../changes/apply.ts'
import type { Applied } from '../changes/apply.ts'
import { conflictsOf } from '../changes/conflicts.ts'
import { currentRevision } from '../changes/current.ts'
import { presentChange, vocabularyOf } from '../changes/present.ts'
import type { StoredChange } from '../changes/types.ts'
import { checksOf, stopsIn } from '../submissions/checks-context.ts'
import { computeRevision } from '../revision/compute.ts'
import type { RevisionPlan } from '../revision/plan.ts'

export interface CarriedOut {
  /** The catalogue it was done to. */
  before: number
  revision: number
  applied: Applied
  /** null when the scale changed: then everything is computed anew (scale-effect.ts, and rebuildCatalogue). */
  plan: RevisionPlan | null
}

/** Needs the catalogue's lock. @throws StateConflict when the ground has moved under a change */
export async function carryOut(trx: Knex.Transaction, submission: { author: number }, changes: readonly StoredChange[]): Promise<CarriedOut> {
  const vocabulary = await vocabularyOf(trx, changes)
  const subjects = new Map(changes.map((c) => [c.id, presentChange(c, vocabulary).subject]))
  const conflicts = await conflictsOf(trx, changes, subjects, vocabulary)
  if (conflicts.length > 0) {
    throw new StateConflict('The catalogue has moved since this submission was made. Nothing was changed: where the two differ, its author has to keep one or the other.', conflicts)
  }
  // What the checks would not have let pass may have come about since: the same value, entered by somebody else.
  const stops = stopsIn(changes, await checksOf(trx, changes, vocabulary), subjects)
  if (stops.length > 0) {
    throw new StateConflict(
      'A check stops this submission as the catalogue stands now. Nothing was changed: its author has to mend or remove what is named here.',
      stops.map((s) => ({ change: s.change, subject: s.subject, field: 'Check', base: null, theirs: s.sentence, yours: null, by: null, revision: null })),
    )
  }
  const before = await currentRevision(trx)
  const revision = before + 1
  const applied = await applyChanges(trx, submission, changes, revision)
  const plan = applied.scaleChanged ? null : await computeRevision(trx, { revision, touched: applied.touched })
  return { before, revision, applied, plan }
}
