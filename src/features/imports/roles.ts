/** The roles that a column of an imported table can have, in words, and the units that go with them. */
import { QUANTITIES, quantityNamed } from '../../../core/quantities.ts'
import type { Mapping } from '../../../core/schema/imports.ts'
import { unitText } from '../../lib/format.ts'

export interface RoleOption {
  id: string
  label: string
  hint?: string
}

const PLAIN: readonly RoleOption[] = [
  { id: 'ignore', label: 'left aside' },
  { id: 'galaxy', label: 'galaxy', hint: 'any of its names' },
  { id: 'ra', label: 'right ascension', hint: 'places a new galaxy' },
  { id: 'dec', label: 'declination', hint: 'places a new galaxy' },
  { id: 'class', label: 'class', hint: 'of a new galaxy' },
  { id: 'quantity', label: 'quantity', hint: 'what the row measures' },
  { id: 'value', label: 'value', hint: 'of the row’s quantity' },
  { id: 'text', label: 'text value', hint: 'a morphological type' },
  { id: 'err', label: 'error, both ways' },
  { id: 'err_plus', label: 'error upwards' },
  { id: 'err_minus', label: 'error downwards' },
  { id: 'err_sys', label: 'systematic error' },
  { id: 'unit', label: 'unit' },
  { id: 'method', label: 'distance method' },
  { id: 'anchor', label: 'anchor' },
  { id: 'anchor_value_assumed', label: 'anchor value assumed' },
  { id: 'source', label: 'source', hint: 'citation, bibcode or DOI' },
  { id: 'locator', label: 'place in the source', hint: 'table 3, row 12' },
  { id: 'note', label: 'note', hint: 'several columns are joined' },
]

export const ROLE_OPTIONS: readonly RoleOption[] = [
  ...PLAIN,
  ...QUANTITIES.map((q) => ({ id: `value:${q.key}`, label: q.label, hint: 'a column of its values' })),
  ...QUANTITIES.filter((q) => q.kind === 'number').map((q) => ({ id: `err:${q.key}`, label: `error of ${q.label}`, hint: 'a column of its errors' })),
]

/** Stands for "as the file says, or the usual unit": a list cannot hold an empty choice. */
export const USUAL = 'usual'

/** The units to choose from for a column of this role; none where a unit means nothing. */
export function unitOptions(role: string): readonly RoleOption[] {
  const named = /^(?:value|err):(.+)$/.exec(role)?.[1]
  const q = named === undefined ? undefined : quantityNamed(named)
  const units = q ? q.units.map((u) => u.unit) : role === 'value' ? [...new Set(QUANTITIES.flatMap((each) => each.units.map((u) => u.unit)))] : []
  const known = units.filter((u) => u !== '')
  if (known.length === 0) return []
  const usual = q ? (q.unit ? `usual (${unitText(q.unit)})` : 'none') : 'as the row says'
  return [{ id: USUAL, label: usual }, ...known.map((u) => ({ id: u, label: unitText(u) }))]
}

/** A mapping with one column changed. */
export function withColumn(mapping: Mapping, at: number, part: Partial<Mapping['columns'][number]>): Mapping {
  return { ...mapping, columns: mapping.columns.map((c, i) => (i === at ? { ...c, ...part } : c)) }
}

/** A mapping with some of what holds for every row changed. */
export function withConstants(mapping: Mapping, part: Partial<Mapping['constants']>): Mapping {
  return { ...mapping, constants: { ...mapping.constants, ...part } }
}
