/** Other open submissions that touch the same things, so that two people do not find out at the approval. */
import type { Knex } from 'knex'
import { nameKey } from '../../../core/names.ts'
import { CHANGE_ACTIONS, movesScale } from '../../../core/schema/changes.ts'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { presentChange, vocabularyOf } from '../changes/present.ts'
import { changesOf } from '../changes/types.ts'
import type { StoredChange } from '../changes/types.ts'

/** Enough to see what is going on. */
const MOST_SHOWN = 50

/** Those that this person may know of: submitted or returned ones, and his own drafts. */
export async function overlapsOf(knex: Knex, submission: number, changes: readonly StoredChange[], person: number): Promise<SubmissionAnswer['overlaps']> {
  const galaxies = [...new Set(changes.flatMap((c) => c.galaxy ?? []))]
  const added = changesOf(changes, 'galaxy.add')
  const scale = changes.some((c) => movesScale(c.action))
  if (galaxies.length === 0 && added.length === 0 && !scale) return []
  const rows = (await knex('changes as c')
    .join('submissions as s', 's.id', 'c.submission')
    .select('c.id', 'c.submission', 'c.position', 'c.action', 'c.payload', 'c.base', 'c.galaxy', 's.title')
    .where('c.submission', '<>', submission)
    .where((open) => void open.whereIn('s.state', ['submitted', 'returned']).orWhere({ 's.state': 'draft', 's.author': person }))
    .where((touching) => {
      void touching.whereRaw('c.galaxy = ANY(?)', [galaxies])
      if (added.length > 0) void touching.orWhere({ 'c.action': 'galaxy.add' })
      if (scale) void touching.orWhereIn('c.action', CHANGE_ACTIONS.filter(movesScale))
    })
    .orderBy(['c.submission', 'c.position'])) as (StoredChange & { title: string })[]

  const mine = new Set(added.map((c) => nameKey(c.payload.designation)))
  const targets = new Set(changes.map((c) => targetOf(c)))
  const same = rows.filter((c) => (c.action === 'galaxy.add' ? mine.has(nameKey(c.payload.designation)) : targets.has(targetOf(c)))).slice(0, MOST_SHOWN)
  const vocabulary = await vocabularyOf(knex, same)
  return same.map((c) => ({ submission: c.submission, title: c.title, subject: presentChange(c, vocabulary).subject }))
}

/** Two changes overlap when they move the same galaxy's own fields, its names, its host, its values of one quantity, one anchor or the policy. */
function targetOf(c: StoredChange): string {
  switch (c.action) {
    case 'measurement.add':
    case 'measurement.replace':
      return `${c.galaxy} ${c.payload.measurement.quantity}`
    case 'measurement.exclude':
    case 'measurement.restore':
      return `${c.galaxy} ${String(c.base?.fields['quantity'])}`
    case 'name.add':
      return `${c.galaxy} name ${nameKey(c.payload.name)}`
    case 'galaxy.amend':
      return `${c.galaxy} galaxy`
    case 'galaxy.add':
      return `new ${nameKey(c.payload.designation)}`
    case 'override.set':
    case 'override.clear':
      return `${c.galaxy} ${c.payload.about}`
    case 'anchor.set':
      return `anchor ${c.payload.key}`
    case 'policy.set':
      return 'policy'
  }
}
