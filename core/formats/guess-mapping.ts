/** A first guess of what the columns of a table hold, from their heads and first rows; the curator corrects it. */
import { acceptedUnit, quantityNamed } from '../quantities.ts'
import type { Quantity } from '../quantities.ts'
import type { Mapping } from '../schema/imports.ts'
import { readMeasuredValue } from './measured-value.ts'

type Column = Mapping['columns'][number]

/** Heads in simplified words (lower case, letters and digits only) and the role that each means. */
const HEADS: Readonly<Record<string, readonly string[]>> = {
  galaxy: ['galaxy', 'galaxy name', 'object', 'object name', 'name', 'designation', 'target', 'id', 'main id'],
  ra: ['ra', 'ra deg', 'radeg', 'raj2000', 'ra j2000', 'ra icrs', 'right ascension', 'alpha'],
  dec: ['dec', 'dec deg', 'decdeg', 'de', 'dedeg', 'decj2000', 'dej2000', 'dec j2000', 'dec icrs', 'de icrs', 'declination', 'delta'],
  quantity: ['quantity', 'parameter', 'property', 'observable'],
  value: ['value', 'val', 'measurement', 'measured value'],
  text: ['text', 'text value'],
  err: ['err', 'error', 'uncertainty', 'sigma', 'e value', 'value err', 'value error'],
  err_plus: ['err plus', 'err up', 'err upper', 'error plus', 'upper error', 'err hi', 'e plus', 'errplus', 'positive error'],
  err_minus: ['err minus', 'err down', 'err lower', 'error minus', 'lower error', 'err lo', 'e minus', 'errminus', 'negative error'],
  err_sys: ['err sys', 'sys err', 'systematic', 'systematic error', 'error sys', 'sys'],
  unit: ['unit', 'units'],
  method: ['method', 'distance method', 'dist method'],
  anchor: ['anchor', 'zero point', 'zeropoint', 'calibration'],
  anchor_value_assumed: ['anchor value assumed', 'anchor value', 'zero point value', 'zeropoint value'],
  source: ['source', 'reference', 'ref', 'refs', 'citation', 'bibcode', 'paper', 'publication', 'doi'],
  locator: ['locator', 'table', 'page', 'place'],
  note: ['note', 'notes', 'comment', 'comments', 'remark', 'remarks', 'status', 'method as published', 'published method'],
  class: ['class', 'galaxy class'],
}

/** Only these may stand on several columns: what they hold is joined. */
const MANY = new Set(['note', 'ignore'])

/**
 * A long table has a column of quantities and one of values; a wide one has a column a quantity, its head naming it ("dm", "V (mag)", "e_dm").
 */
export function guessMapping(headers: readonly string[], sample: readonly (readonly string[])[]): Mapping {
  const words = headers.map(simplify)
  const isLong = words.some((w) => HEADS['quantity']?.includes(w)) && words.some((w) => HEADS['value']?.includes(w))
  const used = new Set<string>()
  const columns = headers.map((header, i): Column => {
    const role = isLong ? (plainRole(words[i] ?? '') ?? 'ignore') : (plainRole(words[i] ?? '') ?? wideRole(header) ?? 'ignore')
    if (used.has(role) && !MANY.has(role)) return { role: 'ignore', unit: '' }
    used.add(role)
    return { role, unit: role === 'value' || role.includes(':') ? unitOf(header, role) : '' }
  })
  if (!used.has('galaxy')) nameColumn(columns, sample)
  // An error column says nothing without the values that it belongs to.
  for (const c of columns) if (c.role.startsWith('err:') && !used.has(c.role.replace('err:', 'value:'))) c.role = 'ignore'
  return {
    columns,
    constants: { sourceId: null, quantity: null, unit: null, method: null, anchor: null, anchorValueAssumed: null, convention: null },
    addGalaxies: true,
  }
}

/** The first column that is not used yet and holds words, not numbers, is taken for the galaxy's name. */
function nameColumn(columns: Column[], sample: readonly (readonly string[])[]): void {
  const at = columns.findIndex((c, i) => c.role === 'ignore' && sample.length > 0 && sample.every((row) => readMeasuredValue(row[i] ?? '').kind === 'unreadable'))
  const column = columns[at]
  if (column) column.role = 'galaxy'
}

function plainRole(words: string): string | undefined {
  return Object.entries(HEADS).find(([, heads]) => heads.includes(words))?.[0]
}

const ERROR_HEAD = /^(?:e|err|error|sigma|sig|d|unc)[ _-]+(.+)$|^(.+?)[ _-]+(?:e|err|error|sigma|unc|uncertainty)$/i

function wideRole(header: string): string | undefined {
  const bare = header.replace(/\s*[([].*[)\]]\s*$/, '')
  const q = quantityOf(bare)
  if (q) return `value:${q.key}`
  const error = ERROR_HEAD.exec(bare)
  const of = error ? quantityOf(error[1] ?? error[2] ?? '') : undefined
  return of ? `err:${of.key}` : undefined
}

/** "dist_mpc" and "v_mag" name their quantity with the unit at the end. */
function quantityOf(words: string): Quantity | undefined {
  const own = quantityNamed(words)
  if (own) return own
  const tail = /^(.+?)[ _-]+([a-z0-9/]+)$/i.exec(words)
  const q = tail ? quantityNamed(tail[1] ?? '') : undefined
  return q && acceptedUnit(q, tail?.[2] ?? '') ? q : undefined
}

function unitOf(header: string, role: string): string {
  const q = role.includes(':') ? quantityNamed(role.slice(role.indexOf(':') + 1)) : undefined
  const written = /[([]\s*([^)\]]*?)\s*[)\]]\s*$/.exec(header)?.[1] ?? /[ _-]([a-z0-9/]+)$/i.exec(header)?.[1] ?? ''
  if (!q || written === '') return ''
  return acceptedUnit(q, written)?.unit ?? ''
}

function simplify(header: string): string {
  return header.toLowerCase().replace(/[^a-z0-9]+/g, ' ').trim()
}
