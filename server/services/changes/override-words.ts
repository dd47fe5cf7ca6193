/** What an override chooses, in words. */
import type { Knex } from 'knex'
import { canonicalWords } from '../../../core/formats/measure-words.ts'
import { canonicalJson } from '../../../core/submission/content.ts'
import type { OverrideChoice } from '../../../core/schema/changes.ts'
import { galaxiesBySlug, measurementsById } from './current.ts'
import type { HeldGalaxy, HeldMeasurement } from './current.ts'

/** What the words of choices need. */
export interface ChoiceVocabulary {
  measurements: ReadonlyMap<number, HeldMeasurement>
  hosts: ReadonlyMap<string, HeldGalaxy>
}

/** Reads what the words of these choices need. */
export async function choiceWordsOf(knex: Knex, choices: readonly OverrideChoice[]): Promise<ChoiceVocabulary> {
  return {
    measurements: await measurementsById(knex, choices.flatMap((c) => ('measurements' in c ? c.measurements : []))),
    hosts: await galaxiesBySlug(knex, choices.flatMap((c) => ('host' in c && c.host !== null ? [c.host] : []))),
  }
}

/** A choice in a form in which equal choices are equal texts, whatever their order. */
export function choiceText(choice: OverrideChoice): string {
  return canonicalJson('measurements' in choice ? { measurements: [...choice.measurements].sort((a, b) => a - b) } : { host: choice.host })
}

/** `from Ansel et al. 2021 (27.78 ± 0.05 mag), by an override`, `Ostrel, by an override`. */
export function choiceWords(choice: OverrideChoice, { measurements, hosts }: ChoiceVocabulary): string {
  if ('host' in choice) return `${choice.host === null ? 'none' : (hosts.get(choice.host)?.designation ?? choice.host)}, by an override`
  const named = choice.measurements.map((id) => {
    const m = measurements.get(id)
    return m ? `${m.sourceLabel} (${canonicalWords(m.quantity, m)})` : `measurement ${id}`
  })
  return `from ${named.join(', ')}, by an override`
}
