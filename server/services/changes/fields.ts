/** The fields that changes move, in words. */
import { acceptedUnit, quantity, toCanonical } from '../../../core/quantities.ts'
import type { QuantityKey } from '../../../core/quantities.ts'
import { classLabel, GALAXY_CLASSES } from '../../../core/classes.ts'
import { METHODS } from '../../../core/methods.ts'
import { numberWords } from '../../../core/formats/measure-words.ts'
import type { Galaxy, Measurement } from '../../../core/catalogue/types.ts'
import type { MeasurementInput } from '../../../core/schema/measurement.ts'
import { GAP } from '../../../core/spaces.ts'
import type { Plain } from './types.ts'

export const GALAXY_FIELDS = ['designation', 'ra', 'dec', 'class', 'status', 'note'] as const
export type GalaxyField = (typeof GALAXY_FIELDS)[number]

export const MEASUREMENT_FIELDS = [
  'quantity', 'value', 'errPlus', 'errMinus', 'errSys', 'textValue', 'limitFlag', 'method', 'anchor', 'anchorValueAssumed', 'convention', 'sourceId',
  'locator', 'note', 'excludedReason', 'supersedes',
] as const
export type MeasurementField = (typeof MEASUREMENT_FIELDS)[number]
export type MeasurementFields = Record<MeasurementField, Plain>

const LABELS: Readonly<Record<GalaxyField | MeasurementField | 'name', string>> = {
  designation: 'Designation',
  ra: 'Right ascension',
  dec: 'Declination',
  class: 'Class',
  status: 'Status',
  note: 'Note',
  quantity: 'Quantity',
  value: 'Value',
  errPlus: 'Error upwards',
  errMinus: 'Error downwards',
  errSys: 'Systematic error',
  textValue: 'Value',
  limitFlag: 'Limit',
  method: 'Method',
  anchor: 'Anchor',
  anchorValueAssumed: 'Anchor value assumed',
  convention: 'Convention',
  sourceId: 'Source',
  locator: 'Place in the source',
  excludedReason: 'Excluded',
  supersedes: 'Supersedes',
  name: 'Name',
}

/** What people read for a field: `errSys` is "Systematic error". */
export function fieldLabel(field: string): string {
  return field in LABELS ? LABELS[field as keyof typeof LABELS] : field
}

/** What is needed to say a field's value in words. */
export interface Wording {
  quantity?: QuantityKey
  sources: ReadonlyMap<number, { label: string }>
  anchors: ReadonlyMap<string, { label: string }>
}

/** A field's value in words with its unit, or null when it holds none. */
export function fieldWords(field: string, value: Plain | undefined, wording: Wording): string | null {
  if (value === null || value === undefined || value === '') return null
  const q = wording.quantity === undefined ? undefined : quantity(wording.quantity)
  const unit = q && q.unit !== '' ? `${GAP}${q.unit}` : ''
  switch (field) {
    case 'ra':
    case 'dec':
      return `${numberWords(Number(value), 5)}°`
    case 'value':
    case 'errPlus':
    case 'errMinus':
    case 'errSys':
      return `${q ? rounded(Number(value), q.decimals) : numberWords(Number(value), 0)}${unit}`
    case 'anchorValueAssumed':
      return `${numberWords(Number(value), 2)}${GAP}mag`
    case 'quantity':
      return quantity(String(value)).label
    case 'class':
      return GALAXY_CLASSES.includes(value as never) ? classLabel(value as (typeof GALAXY_CLASSES)[number]) : String(value)
    case 'method':
      return METHODS.find((m) => m.key === value)?.label ?? String(value)
    case 'anchor':
      return wording.anchors.get(String(value))?.label ?? String(value)
    case 'sourceId':
      return wording.sources.get(Number(value))?.label ?? `source ${value}`
    case 'limitFlag':
      return value === 'upper' ? 'upper limit' : 'lower limit'
    case 'convention':
      return value === 'sfd' ? 'value of the SFD map' : 'true reddening'
    case 'supersedes':
      return `measurement ${value}`
    default:
      return String(value)
  }
}

/** Two decimals more than the quantity prints, without trailing noughts: conversions leave long tails. */
function rounded(value: number, decimals: number): string {
  return numberWords(Number(value.toFixed(decimals + 2)), decimals)
}

/** The fields of a galaxy, as conflicts compare them. */
export function galaxyFields(g: Galaxy): Record<GalaxyField, Plain> {
  return { designation: g.designation, ra: g.ra, dec: g.dec, class: g.class, status: g.status, note: g.note }
}

/** The fields of a measurement that is held, as conflicts compare them. */
export function heldFields(m: Measurement): MeasurementFields {
  return {
    quantity: m.quantity, value: m.value, errPlus: m.errPlus, errMinus: m.errMinus, errSys: m.errSys, textValue: m.textValue, limitFlag: m.limitFlag,
    method: m.method, anchor: m.anchor, anchorValueAssumed: m.anchorValueAssumed, convention: m.convention, sourceId: m.sourceId, locator: m.locator,
    note: m.note, excludedReason: m.excludedReason, supersedes: m.supersedes,
  }
}

/** The fields that what a curator states becomes: values in the canonical unit of the quantity. */
export function statedFields(input: MeasurementInput, excludedReason: string | null): MeasurementFields {
  const q = quantity(input.quantity)
  const canonical = input.value === null ? { value: null, errPlus: null, errMinus: null, errSys: null } : toCanonical(q, { ...input, value: input.value })
  return {
    quantity: input.quantity, value: canonical.value, errPlus: canonical.errPlus, errMinus: canonical.errMinus, errSys: canonical.errSys,
    textValue: input.textValue, limitFlag: limitOf(input, q.units.length > 1), method: input.method, anchor: input.anchor,
    anchorValueAssumed: input.anchorValueAssumed, convention: input.convention, sourceId: input.sourceId, locator: input.locator, note: input.note,
    excludedReason, supersedes: input.supersedes,
  }
}

/** A limit turns round when the unit falls where the canonical one rises (an ellipticity of at least 0.4 is an axis ratio of at most 0.6). */
function limitOf(input: MeasurementInput, convertible: boolean): MeasurementInput['limitFlag'] {
  if (input.limitFlag === null || input.value === null || !convertible) return input.limitFlag
  const f = acceptedUnit(quantity(input.quantity), input.unit)?.toCanonical
  if (!f || f(input.value * 1.01 + 0.01) >= f(input.value)) return input.limitFlag
  return input.limitFlag === 'upper' ? 'lower' : 'upper'
}

/** What was published, kept beside the converted value; null for a text. */
export function publishedOf(input: MeasurementInput): Measurement['published'] {
  if (input.value === null) return null
  const unit = acceptedUnit(quantity(input.quantity), input.unit)?.unit ?? input.unit
  return { value: input.value, errPlus: input.errPlus, errMinus: input.errMinus, errSys: input.errSys, unit }
}
