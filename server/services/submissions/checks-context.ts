/** Gathers what the automatic checks need of the catalogue, and asks them about each change. */
import type { Knex } from 'knex'
import type { Check } from '../../../core/schema/submissions.ts'
import type { Vocabulary } from '../changes/present.ts'
import type { StoredChange } from '../changes/types.ts'
import { checksOfGalaxies } from './checks/of-galaxies.ts'
import { checksOfMeasurements } from './checks/of-measurements.ts'
import { checksOfScale } from './checks/of-scale.ts'

/** What the checks find, by change. */
export async function checksOf(knex: Knex, changes: readonly StoredChange[], vocabulary: Vocabulary): Promise<Map<number, Check[]>> {
  return new Map([...(await checksOfGalaxies(knex, changes, vocabulary)), ...(await checksOfMeasurements(knex, changes, vocabulary)), ...(await checksOfScale(knex, changes))])
}

/** The findings that forbid going on, each with the change's subject before it. */
export function stopsIn(changes: readonly StoredChange[], checks: ReadonlyMap<number, readonly Check[]>, subjects: ReadonlyMap<number, string>): { change: number; subject: string; sentence: string }[] {
  return changes.flatMap((c) =>
    (checks.get(c.id) ?? []).filter((check) => check.level === 'stop').map((check) => ({ change: c.id, subject: subjects.get(c.id) ?? '', sentence: check.sentence })),
  )
}
