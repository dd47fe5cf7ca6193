/** Whether somebody moved an override, or what one chooses, under a change. */
import type { Knex } from 'knex'
import type { OverrideChoice } from '../../../core/schema/changes.ts'
import type { Clash } from './clash.ts'
import { overrideKey, overridesNow } from './current-scale.ts'
import type { HeldOverride } from './current-scale.ts'
import { choiceText, choiceWords, choiceWordsOf } from './override-words.ts'
import type { ChoiceVocabulary } from './override-words.ts'
import { changesOf } from './types.ts'
import type { StoredChange, StoredChangeOf } from './types.ts'

type OverrideChange = StoredChangeOf<'override.set'> | StoredChangeOf<'override.clear'>

export async function clashesOfOverrides(knex: Knex, changes: readonly StoredChange[]): Promise<Clash[]> {
  const set = changesOf(changes, 'override.set')
  const deciding: OverrideChange[] = [...set, ...changesOf(changes, 'override.clear')]
  const excluding = changesOf(changes, 'measurement.exclude')
  if (deciding.length === 0 && excluding.length === 0) return []
  const held = await overridesNow(knex, [...deciding, ...excluding].flatMap((c) => c.galaxy ?? []))
  const v = await choiceWordsOf(knex, [...set.map((c) => c.payload.choice), ...[...held.values()].map((o) => o.choice), ...deciding.flatMap((c) => baseChoice(c) ?? [])])
  const restored = new Set(changesOf(changes, 'measurement.restore').map((c) => c.payload.measurementId))
  return [
    ...deciding.flatMap((c) => ofOverride(c, held.get(overrideKey(c.galaxy, c.payload.about)), v)),
    ...set.flatMap((c) => ofChoice(c, v, restored)),
    ...excluding.flatMap((c) => ofExclusion(c, held, deciding)),
  ]
}

function baseChoice(c: OverrideChange): OverrideChoice | null {
  const text = c.base?.fields['choice']
  return typeof text === 'string' ? (JSON.parse(text) as OverrideChoice) : null
}

function ofOverride(c: OverrideChange, now: HeldOverride | undefined, v: ChoiceVocabulary): Clash[] {
  if (!c.base || (now?.versionId ?? null) === c.base.versionId) return []
  const yours = c.action === 'override.set' ? choiceText(c.payload.choice) : null
  const theirs = now ? choiceText(now.choice) : null
  if (theirs === yours) return []
  const was = baseChoice(c)
  const words = (choice: OverrideChoice | null): string => (choice === null ? 'no override' : choiceWords(choice, v))
  return [{ change: c.id, field: 'Override', base: words(was), theirs: words(now?.choice ?? null), yours: words(c.action === 'override.set' ? c.payload.choice : null), revision: now?.revFrom ?? null }]
}

/** What an override names must still be there to be chosen. */
function ofChoice(c: StoredChangeOf<'override.set'>, v: ChoiceVocabulary, restored: ReadonlySet<number>): Clash[] {
  const { choice } = c.payload
  const yours = choiceWords(choice, v)
  const clash = (theirs: string, revision: number | null): Clash => ({ change: c.id, field: 'Override', base: null, theirs, yours, revision })
  if ('host' in choice) {
    const host = choice.host === null ? undefined : v.hosts.get(choice.host)
    if (choice.host !== null && !host) return [clash('the host is no longer held under that name', null)]
    return host?.status === 'withdrawn' ? [clash(`${host.designation} is withdrawn`, host.revFrom)] : []
  }
  return choice.measurements.flatMap((id): Clash[] => {
    const m = v.measurements.get(id)
    if (!m) return [clash(`measurement ${id} is no longer held`, null)]
    if (m.excludedReason !== null && !restored.has(id)) return [clash(`the measurement of ${m.sourceLabel} is excluded: ${m.excludedReason}`, m.revFrom)]
    return m.limitFlag === null ? [] : [clash(`the value of ${m.sourceLabel} is a limit`, m.revFrom)]
  })
}

/** An override that came since the exclusion was proposed adopts what it would exclude. */
function ofExclusion(c: StoredChangeOf<'measurement.exclude'>, held: ReadonlyMap<string, HeldOverride>, deciding: readonly OverrideChange[]): Clash[] {
  const about = String(c.base?.fields['quantity'] ?? '')
  if (deciding.some((d) => d.galaxy === c.galaxy && d.payload.about === about)) return []
  const override = held.get(overrideKey(c.galaxy, about))
  if (!override || !('measurements' in override.choice) || !override.choice.measurements.includes(c.payload.measurementId)) return []
  return [{ change: c.id, field: 'Override', base: null, theirs: `an override adopts it: ${override.reason}`, yours: 'excluded', revision: override.revFrom }]
}
