/** Reads one row of an uploaded table under a mapping: the galaxy it names, its measurements, and what is wrong with it, in words. */
import { readPosition } from '../astro/position-reader.ts'
import type { Anchor } from '../catalogue/types.ts'
import { classFromMorphology, classLabel, GALAXY_CLASSES } from '../classes.ts'
import type { GalaxyClass } from '../classes.ts'
import { methodNamed } from '../methods.ts'
import { acceptedUnit, quantity, quantityNamed } from '../quantities.ts'
import type { Quantity, QuantityKey } from '../quantities.ts'
import type { Mapping } from '../schema/imports.ts'
import { measurementInputSchema } from '../schema/measurement.ts'
import type { MeasurementForm, MeasurementInput } from '../schema/measurement.ts'
import { anchorNamed } from '../scale/anchors.ts'
import { labelInSentence } from './measure-words.ts'
import { isMissingValue, readMeasuredValue } from './measured-value.ts'
import type { MeasuredValue } from './measured-value.ts'

export interface RowProblem {
  column: string | null
  message: string
}

/** A measurement before its source is known. */
export type RowMeasurement = Omit<MeasurementInput, 'sourceId'>

export interface ReadRow {
  /** As the row names it. */
  galaxy: string
  /** Degrees, ICRS; null where the row gives none. */
  ra: number | null
  dec: number | null
  /** What the row says of its class, outright or by a morphological type. */
  galaxyClass: GalaxyClass | null
  /** The citation in the row; empty where the mapping's source holds. */
  source: string
  measurements: RowMeasurement[]
  problems: RowProblem[]
}

export interface RowContext {
  headers: readonly string[]
  mapping: Mapping
  anchors: readonly Pick<Anchor, 'key' | 'label'>[]
}

/** What people call a column: its head, or its place when it has none. */
export function columnName(headers: readonly string[], at: number): string {
  return headers[at]?.trim() || `column ${at + 1}`
}

/** A reader of rows; what follows from the mapping is worked out once. */
export function rowReader(context: RowContext): (cells: readonly string[]) => ReadRow {
  const { headers, mapping } = context
  const columns = mapping.columns.map((c, at) => ({ ...c, at, name: columnName(headers, at) }))
  const single = new Map(columns.map((c) => [c.role as string, c]))
  const notes = columns.filter((c) => c.role === 'note')
  const wide = columns.filter((c) => c.role.startsWith('value:'))

  return (cells) => {
    const problems: RowProblem[] = []
    const say = (column: string | null, message: string): void => void problems.push({ column, message })
    const cell = (role: string): string => cells[single.get(role)?.at ?? -1]?.trim() ?? ''
    const nameOf = (role: string): string | null => single.get(role)?.name ?? null
    const row: ReadRow = { galaxy: cell('galaxy'), ra: null, dec: null, galaxyClass: null, source: cell('source'), measurements: [], problems }
    if (cells.length !== headers.length) {
      say(null, `This row has ${cells.length} ${cells.length === 1 ? 'cell' : 'cells'} where the head of the table has ${headers.length}. Check for a missing or an additional separator.`)
      return row
    }
    if (row.galaxy === '') say(nameOf('galaxy'), single.has('galaxy') ? 'The row names no galaxy.' : 'No column holds the galaxy: choose it in the mapping.')
    if (row.galaxy.length > 80) say(nameOf('galaxy'), 'The name of the galaxy is longer than 80 characters.')
    takePosition(row, cell, nameOf, say)
    readClass(row, cell('class'))

    const shared = readShared(context, cell, nameOf, say)
    const note = joinNotes(notes.map((c) => ({ name: c.name, text: cells[c.at]?.trim() ?? '' })))
    const take = (q: Quantity, at: { role: string; name: string | null; unit: string; text: string; errors: Errors }): void => {
      const m = readMeasurement(context, q, at, shared, note, nameOf, say)
      if (!m) return
      row.measurements.push(m)
      if (m.textValue !== null) row.galaxyClass ??= classFromMorphology(m.textValue)
    }

    if (wide.length > 0) {
      for (const column of wide) {
        const q = quantity(column.role.slice('value:'.length))
        const text = cells[column.at]?.trim() ?? ''
        if (isMissingValue(text)) continue
        const err = cell(`err:${q.key}`)
        take(q, { role: column.role, name: column.name, unit: column.unit, text, errors: { both: err, plus: '', minus: '', sys: '', names: { both: nameOf(`err:${q.key}`), plus: null, minus: null, sys: null } } })
      }
      if (row.measurements.length === 0 && problems.length === 0) say(null, 'The row holds no value.')
      return row
    }

    const q = readQuantity(cell('quantity'), mapping.constants.quantity, nameOf('quantity'), say)
    if (!q) return row
    const fromText = q.kind === 'text' && cell('text') !== ''
    const role = fromText ? 'text' : 'value'
    const text = cell(role)
    if (isMissingValue(text)) say(nameOf(role), single.has(role) ? `The row gives no ${labelInSentence(q.label)}.` : 'No column holds the value: choose it in the mapping.')
    else {
      const names = { both: nameOf('err'), plus: nameOf('err_plus'), minus: nameOf('err_minus'), sys: nameOf('err_sys') }
      const errors = { both: cell('err'), plus: cell('err_plus'), minus: cell('err_minus'), sys: cell('err_sys'), names }
      take(q, { role, name: nameOf(role), unit: cell('unit') || (single.get(role)?.unit ?? ''), text, errors })
    }
    return row
  }
}

type Say = (column: string | null, message: string) => void
type Cell = (role: string) => string
type NameOf = (role: string) => string | null

interface Errors {
  both: string
  plus: string
  minus: string
  sys: string
  names: Record<'both' | 'plus' | 'minus' | 'sys', string | null>
}

function takePosition(row: ReadRow, cell: Cell, nameOf: NameOf, say: Say): void {
  const [ra, dec] = [cell('ra'), cell('dec')]
  if (isMissingValue(ra) && isMissingValue(dec)) return
  if (isMissingValue(ra) || isMissingValue(dec)) return say(nameOf(isMissingValue(ra) ? 'ra' : 'dec'), 'A position needs both right ascension and declination.')
  const parts = (text: string): number => text.split(/[^\d.]+/).filter((part) => part !== '').length
  if (parts(ra) !== parts(dec)) return say(nameOf('dec'), `Right ascension "${ra}" and declination "${dec}" are not written alike: both in degrees, or both with minutes and seconds.`)
  const read = readPosition(`${ra} ${dec}`)
  if (!read.ok) return say(nameOf(/declination/i.test(read.error) || (!/right ascension/i.test(read.error) && read.error.includes(`"${dec}"`)) ? 'dec' : 'ra'), read.error)
  row.ra = read.ra
  row.dec = read.dec
}

function readClass(row: ReadRow, text: string): void {
  if (isMissingValue(text)) return
  row.galaxyClass = GALAXY_CLASSES.find((c) => c === text.toLowerCase() || classLabel(c) === text.toLowerCase()) ?? classFromMorphology(text)
}

function readQuantity(text: string, constant: QuantityKey | null, name: string | null, say: Say): Quantity | undefined {
  if (text === '' && constant !== null) return quantity(constant)
  const found = quantityNamed(text)
  if (!found) say(name, text === '' ? 'The row does not say which quantity it gives: choose one for all rows, or the column that names it.' : `"${text}" is no quantity that the catalogue keeps. Rename it, or leave the row out.`)
  return found
}

/** What a distance says of its method and anchor. */
interface Shared {
  method: RowMeasurement['method']
  anchor: string | null
  anchorValueAssumed: number | null
  locator: string | null
}

function readShared(context: RowContext, cell: Cell, nameOf: NameOf, say: Say): Shared {
  const { constants } = context.mapping
  const methodText = cell('method')
  const method = isMissingValue(methodText) ? undefined : methodNamed(methodText)
  if (!isMissingValue(methodText) && !method) say(nameOf('method'), `"${methodText}" is no distance method that the catalogue knows.`)
  const anchorText = cell('anchor')
  const anchor = isMissingValue(anchorText) ? undefined : anchorNamed(context.anchors, anchorText)
  if (!isMissingValue(anchorText) && !anchor) say(nameOf('anchor'), `The scale has no anchor "${anchorText}".`)
  const assumedText = cell('anchor_value_assumed')
  const assumed = readMeasuredValue(assumedText)
  if (assumed.kind === 'unreadable') say(nameOf('anchor_value_assumed'), assumed.why)
  const useConstant = isMissingValue(anchorText)
  return {
    method: (method?.key as RowMeasurement['method']) ?? constants.method,
    anchor: anchor?.key ?? (useConstant ? constants.anchor : null),
    anchorValueAssumed: assumed.kind === 'value' ? assumed.value : useConstant ? constants.anchorValueAssumed : null,
    locator: cell('locator').slice(0, 120) || null,
  }
}

function readMeasurement(
  context: RowContext,
  q: Quantity,
  at: { role: string; name: string | null; unit: string; text: string; errors: Errors },
  shared: Shared,
  note: string | null,
  nameOf: NameOf,
  say: Say,
): RowMeasurement | undefined {
  const { constants } = context.mapping
  const form: MeasurementForm = { quantity: q.key, value: null, sourceId: 1, note, locator: shared.locator }
  if (q.kind === 'text') form.textValue = at.text
  else {
    const value = readMeasuredValue(at.text)
    if (value.kind !== 'value') {
      say(at.name, value.kind === 'unreadable' ? value.why : `The row gives no ${labelInSentence(q.label)}.`)
      return undefined
    }
    const unit = at.unit || value.unit || constants.unit || ''
    if (at.unit !== '' && value.unit !== '' && acceptedUnit(q, at.unit) !== acceptedUnit(q, value.unit)) {
      say(at.name, `The cell says ${value.unit} and the unit of the row is ${at.unit}.`)
      return undefined
    }
    Object.assign(form, { value: value.value, unit: acceptedUnit(q, unit)?.unit ?? unit, limitFlag: value.limitFlag }, readErrors(value, at.errors, say))
  }
  if (q.needsMethod) Object.assign(form, { method: shared.method, anchor: shared.anchor, anchorValueAssumed: shared.anchorValueAssumed })
  if (q.conventions) form.convention = constants.convention
  const checked = measurementInputSchema.safeParse(form)
  if (!checked.success) {
    for (const issue of checked.error.issues) say(columnOf(String(issue.path[0]), at, nameOf), wordsOf(String(issue.path[0]), issue.message))
    return undefined
  }
  const { sourceId: _placeholder, ...measurement } = checked.data
  return measurement
}

/** Columns of error bars go before error bars written beside the value. */
function readErrors(value: MeasuredValue, errors: Errors, say: Say): Pick<RowMeasurement, 'errPlus' | 'errMinus' | 'errSys'> {
  const read = (which: 'both' | 'plus' | 'minus' | 'sys'): number | null => {
    const found = readMeasuredValue(errors[which])
    if (found.kind === 'unreadable') say(errors.names[which], found.why)
    if (found.kind !== 'value') return null
    // The lower error is often written with its sign.
    return which === 'minus' ? Math.abs(found.value) : found.value
  }
  const both = read('both')
  return { errPlus: read('plus') ?? both ?? value.errPlus, errMinus: read('minus') ?? both ?? value.errMinus, errSys: read('sys') ?? value.errSys }
}

function columnOf(field: string, at: { name: string | null; errors: Errors }, nameOf: NameOf): string | null {
  if (field === 'errPlus') return at.errors.names.plus ?? at.errors.names.both ?? at.name
  if (field === 'errMinus') return at.errors.names.minus ?? at.errors.names.both ?? at.name
  if (field === 'errSys') return at.errors.names.sys ?? at.name
  const roles: Readonly<Record<string, string>> = { unit: 'unit', method: 'method', anchor: 'anchor', anchorValueAssumed: 'anchor_value_assumed', note: 'note', locator: 'locator' }
  const role = roles[field]
  return (role === undefined ? null : nameOf(role)) ?? at.name
}

function wordsOf(field: string, message: string): string {
  if (field === 'method') return 'The row names no distance method: fill the column, or choose one for all rows.'
  if (field === 'convention') return 'Say for all rows whether the colour excess is a true reddening or the value of the SFD map.'
  if (field === 'note') return 'The notes of this row are longer than 2000 characters.'
  return message
}

/** The first note stands as it is; what other columns give is named by its head. */
function joinNotes(notes: readonly { name: string; text: string }[]): string | null {
  const given = notes.filter((n) => n.text !== '')
  const said = given.map((n) => (/^(notes?|comments?|remarks?)$/i.test(n.name) ? n.text : `${n.name.replace(/_/g, ' ')}: ${n.text}`))
  return said.length === 0 ? null : said.join('; ')
}
