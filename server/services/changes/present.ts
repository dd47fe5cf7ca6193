/** Changes in words: what each is about, what holds now and what is proposed, and where a new value stands. */
import type { Knex } from 'knex'
import { rescaling } from '../../../core/adoption/rescale.ts'
import { canonicalWords, labelInSentence, measureWords } from '../../../core/formats/measure-words.ts'
import type { MeasureToPrint } from '../../../core/formats/measure-words.ts'
import { method } from '../../../core/methods.ts'
import { quantity } from '../../../core/quantities.ts'
import type { QuantityKey } from '../../../core/quantities.ts'
import type { Anchor } from '../../../core/catalogue/types.ts'
import type { MeasurementInput } from '../../../core/schema/measurement.ts'
import type { ChangeAnswer } from '../../../core/schema/submissions.ts'
import { galaxiesById, sourcesById } from './current.ts'
import type { HeldGalaxy } from './current.ts'
import { fieldLabel, fieldWords, GALAXY_FIELDS, MEASUREMENT_FIELDS, publishedOf, statedFields } from './fields.ts'
import type { MeasurementFields, Wording } from './fields.ts'
import { choiceWordsOf } from './override-words.ts'
import type { ChoiceVocabulary } from './override-words.ts'
import { anchorWords, overrideWords, policyWords } from './present-scale.ts'
import { changesOf } from './types.ts'
import type { Plain, StoredChange, StoredChangeOf } from './types.ts'

export type ChangeWords = Pick<ChangeAnswer, 'subject' | 'galaxy' | 'diff' | 'standing'>

/** What the words of many changes need, read once. */
export interface Vocabulary extends Wording, ChoiceVocabulary {
  galaxies: ReadonlyMap<number, HeldGalaxy>
  anchors: ReadonlyMap<string, Anchor>
  /** Adopted values of the galaxies touched, by galaxy and quantity. */
  adopted: ReadonlyMap<string, { value: number | null; textValue: string | null; errPlus: number | null; errMinus: number | null; errSys: number | null }>
  /** Designations of galaxies that the submissions themselves add, by change. */
  added: ReadonlyMap<number, string>
}

/** Reads what the words of these changes need. */
export async function vocabularyOf(knex: Knex, changes: readonly StoredChange[]): Promise<Vocabulary> {
  const galaxies = await galaxiesById(knex, changes.flatMap((c) => c.galaxy ?? []))
  const sources = await sourcesById(knex, changes.flatMap(sourcesNamed))
  const anchors = (await knex('anchors').select('key', 'label', 'kind', 'methods', 'value', 'err', 'source').whereNull('revTo')) as Anchor[]
  const adopted = (await knex('adoptedValues')
    .select('galaxy', 'quantity', 'value', 'textValue', 'errPlus', 'errMinus', 'errSys')
    .whereRaw('galaxy = ANY(?)', [[...galaxies.keys()]])
    .whereNull('revTo')) as { galaxy: number; quantity: string; value: number | null; textValue: string | null; errPlus: number | null; errMinus: number | null; errSys: number | null }[]
  return {
    ...(await choiceWordsOf(knex, changesOf(changes, 'override.set').map((c) => c.payload.choice))),
    galaxies,
    sources,
    anchors: new Map(anchors.map((a) => [a.key, a])),
    adopted: new Map(adopted.map((a) => [`${a.galaxy} ${a.quantity}`, a])),
    added: new Map(changes.flatMap((c) => (c.action === 'galaxy.add' ? [[c.id, c.payload.designation] as const] : []))),
  }
}

function sourcesNamed(c: StoredChange): number[] {
  if (c.action === 'measurement.add') return [c.payload.measurement.sourceId]
  const was = Number(c.base?.fields['sourceId'] ?? 0)
  if (c.action === 'measurement.replace') return [c.payload.measurement.sourceId, was]
  if (c.action === 'measurement.exclude' || c.action === 'measurement.restore') return [was]
  return c.action === 'name.add' && c.payload.sourceId !== null ? [c.payload.sourceId] : []
}

/** One change in words. */
export function presentChange(c: StoredChange, v: Vocabulary): ChangeWords {
  const held = c.galaxy === null ? undefined : v.galaxies.get(c.galaxy)
  const galaxy = held ? { slug: held.slug, name: held.designation } : null
  const name = held?.designation ?? nameOfAdded(c, v)
  switch (c.action) {
    case 'measurement.add': {
      const { measurement } = c.payload
      return { subject: subjectOf(name, measurement), galaxy, diff: fieldDiff(null, statedFields(measurement, null), v), standing: standingOf(measurement, c.galaxy, v) }
    }
    case 'measurement.replace': {
      const { measurement, reason } = c.payload
      const was = (c.base?.fields ?? null) as MeasurementFields | null
      const diff = fieldDiff(was, statedFields(measurement, (was?.excludedReason ?? null) as string | null), v)
      return { subject: subjectOf(name, measurement), galaxy, diff: [...diff, { field: 'Reason', before: null, after: reason }], standing: standingOf(measurement, c.galaxy, v) }
    }
    case 'measurement.exclude':
    case 'measurement.restore':
      return { ...exclusionWords(c, name, v), galaxy, standing: null }
    case 'galaxy.add': {
      const diff = GALAXY_FIELDS.map((f) => ({ field: fieldLabel(f), before: null, after: fieldWords(f, c.payload[f], v) })).filter((d) => d.after !== null)
      if (c.payload.names.length > 0) diff.push({ field: 'Other names', before: null, after: c.payload.names.join(', ') })
      return { subject: `${c.payload.designation}, a new galaxy`, galaxy, diff, standing: null }
    }
    case 'galaxy.amend': {
      const diff = GALAXY_FIELDS.filter((f) => c.payload.set[f] !== undefined).map((f) => ({
        field: fieldLabel(f),
        before: fieldWords(f, c.base?.fields[f], v),
        after: fieldWords(f, c.payload.set[f], v),
      }))
      const what = diff.map((d) => d.field.toLowerCase()).join(', ')
      return { subject: `${name}, ${what}`, galaxy, diff: [...diff, { field: 'Reason', before: null, after: c.payload.reason }], standing: null }
    }
    case 'name.add': {
      const source = c.payload.sourceId === null ? [] : [{ field: 'Source', before: null, after: fieldWords('sourceId', c.payload.sourceId, v) }]
      return { subject: `${name}, another name`, galaxy, diff: [{ field: 'Name', before: null, after: c.payload.name }, ...source], standing: null }
    }
    case 'anchor.set':
      return { ...anchorWords(c), galaxy: null, standing: null }
    case 'policy.set':
      return { ...policyWords(c), galaxy: null, standing: null }
    case 'override.set':
    case 'override.clear':
      return { ...overrideWords(c, name, v), galaxy, standing: null }
  }
}

function exclusionWords(c: StoredChangeOf<'measurement.exclude'> | StoredChangeOf<'measurement.restore'>, name: string, v: Vocabulary): Pick<ChangeWords, 'subject' | 'diff'> {
  const was = c.base?.fields as MeasurementFields | undefined
  const key = was?.quantity as QuantityKey | undefined
  const value = was && key ? canonicalWords(key, was as Omit<MeasureToPrint, 'unit'>) : null
  const source = was ? fieldWords('sourceId', was.sourceId, v) : null
  const excluded = value === null ? 'excluded' : `${value}, excluded`
  const [before, after] = c.action === 'measurement.exclude' ? [value, excluded] : [excluded, value ?? 'restored']
  const earlier = c.action === 'measurement.restore' && was?.excludedReason != null ? [{ field: 'Excluded so far', before: String(was.excludedReason), after: null }] : []
  return {
    subject: `${name}, ${key ? labelInSentence(quantity(key).label) : 'measurement'}`,
    diff: [{ field: source === null ? 'Measurement' : `Measurement of ${source}`, before, after }, ...earlier, { field: 'Reason', before: null, after: c.payload.reason }],
  }
}

function nameOfAdded(c: StoredChange, v: Vocabulary): string {
  if ((c.action === 'measurement.add' || c.action === 'name.add') && 'change' in c.payload.galaxy) return v.added.get(c.payload.galaxy.change) ?? 'A new galaxy'
  return 'A galaxy'
}

function subjectOf(name: string, m: MeasurementInput): string {
  return `${name}, ${labelInSentence(quantity(m.quantity).label)}`
}

/** The fields that differ; of an addition, those that say something. */
function fieldDiff(before: MeasurementFields | null, after: MeasurementFields, v: Vocabulary): ChangeWords['diff'] {
  const words = (field: keyof MeasurementFields, value: Plain): string | null => fieldWords(field, value, { ...v, quantity: after.quantity as MeasurementInput['quantity'] })
  return MEASUREMENT_FIELDS.filter((f) => f !== 'quantity' && (before === null ? after[f] !== null : before[f] !== after[f])).map((f) => ({
    field: fieldLabel(f),
    before: before === null ? null : words(f, before[f]),
    after: words(f, after[f]),
  }))
}

function standingOf(m: MeasurementInput, galaxy: number | null, v: Vocabulary): ChangeWords['standing'] {
  const q = quantity(m.quantity)
  const stated = statedFields(m, null)
  const published = publishedOf(m)
  const anchor = m.anchor === null ? undefined : v.anchors.get(m.anchor)
  const shift = m.quantity === 'distance_modulus' ? (rescaling(m, [...v.anchors.values()]) ?? 0) : 0
  const canonical = { value: stated.value as number | null, errPlus: stated.errPlus as number | null, errMinus: stated.errMinus as number | null, errSys: stated.errSys as number | null, limitFlag: stated.limitFlag as MeasurementInput['limitFlag'] }
  const adopted = galaxy === null ? undefined : v.adopted.get(`${galaxy} ${m.quantity}`)
  return {
    quantity: q.label,
    unit: q.unit,
    published: m.textValue ?? (published ? measureWords({ ...published, limitFlag: m.limitFlag }) : null),
    scaled: canonical.value === null ? null : canonicalWords(m.quantity, { ...canonical, value: canonical.value + shift }),
    adopted: adopted ? canonicalWords(m.quantity, adopted) : null,
    source: v.sources.get(m.sourceId)?.label ?? `source ${m.sourceId}`,
    method: m.method === null ? null : method(m.method).label,
    anchor: anchor ? `${anchor.label}${m.anchorValueAssumed === null ? '' : `, ${fieldWords('anchorValueAssumed', m.anchorValueAssumed, v) ?? ''} assumed`}` : null,
  }
}
