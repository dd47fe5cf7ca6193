import { classLabel, GALAXY_CLASSES, GALAXY_STATUSES } from '../../../core/classes.ts'
import { columnOf, DEFAULT_COLUMNS, type CatalogueRow, type Column } from '../../../core/columns.ts'
import type { Filter } from '../../../core/filters/filter.ts'
import { METHODS } from '../../../core/methods.ts'
import { StatusBadge } from '../../components/badge.tsx'
import { ClassMark } from '../../components/class-mark.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { Link } from '../../components/link.tsx'
import { Measure } from '../../components/measure.tsx'
import { formatDay } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

/** Errors drawn with a value, from further columns: bounds, or one error for both sides. */
const ERRORS: Readonly<Record<string, { lo: string; hi: string } | { error: string }>> = {
  distance: { lo: 'distance_lo', hi: 'distance_hi' },
  host_sep: { lo: 'host_sep_lo', hi: 'host_sep_hi' },
  dm: { error: 'dm_err' },
  v_hel: { error: 'v_hel_err' },
}

const WIDTHS: Readonly<Record<string, number>> = {
  name: 184, class: 156, distance: 136, host_sep: 140, dm: 136, v_hel: 140, distance_method: 160, morphology: 100, status: 124, updated_at: 116,
  host: 128, main_disturber: 128, host_relation: 96, host_probability: 76, tidal_index: 84, abs_v: 92, abs_b: 92, abs_k: 92, v_lg: 110, n_measurements: 84,
}
/** Decimals in the table where the registry keeps more than the eye wants beside an error. */
const DECIMALS: Readonly<Record<string, number>> = { distance: 2, ra: 4, dec: 4 }

/** The columns that are shown: those chosen, or the usual ones; the name always stands first. */
export function shownColumns(filter: Filter): readonly Column[] {
  const keys = (filter.columns ?? DEFAULT_COLUMNS).filter((key) => key !== 'name')
  return ['name', ...keys].map((key) => columnOf(key)).filter((column) => column !== undefined)
}

/** What must be asked for so that these columns can be drawn. */
export function neededColumns(columns: readonly Column[]): string[] {
  const errors = columns.flatMap(({ key }) => {
    const with_ = ERRORS[key]
    if (!with_) return []
    return 'error' in with_ ? [with_.error] : [with_.lo, with_.hi]
  })
  return [...new Set(['slug', ...columns.map(({ key }) => key), 'status', ...errors])]
}

const text = (row: CatalogueRow, key: string): string | null => {
  const value = row[key]
  return value == null ? null : String(value)
}
const number = (row: CatalogueRow, key: string): number | null => {
  const value = row[key]
  return typeof value === 'number' ? value : null
}
const gap = (a: number | null, b: number | null): number | null => (a === null || b === null ? null : Math.max(0, a - b))

export interface TableContext {
  /** Names of hosts by slug. */
  names: Readonly<Record<string, string>>
  at: string | null
}

/** A column of the registry as a column of the table. */
export function tableColumn(column: Column, context: TableContext): DataColumn<CatalogueRow> {
  const { key } = column
  const isNumber = column.type === 'real' || column.type === 'integer'
  const decimals = DECIMALS[key] ?? column.decimals
  return {
    key,
    header: column.head,
    unit: column.unit === '' ? undefined : tableUnit(column.unit),
    help: column.description,
    sortable: true,
    width: WIDTHS[key],
    decimals: isNumber ? decimals : undefined,
    text: isNumber ? (row) => number(row, key) : (row) => wordsOf(key, text(row, key), context),
    render: renderOf(key, decimals, context),
  }
}

/** The table's own spelling of units that are given as VOUnits. */
function tableUnit(unit: string): string {
  return unit.replace('arcsec**2', 'arcsec2').replace('Jy.km/s', 'Jy km/s')
}

function wordsOf(key: string, value: string | null, { names }: TableContext): string | null {
  if (value === null) return null
  if (key === 'class') return classLabel(GALAXY_CLASSES.find((one) => one === value) ?? 'unknown')
  if (key === 'distance_method') return METHODS.find((method) => method.key === value)?.label ?? value
  if (key === 'host' || key === 'main_disturber') return names[value] ?? value
  return key === 'updated_at' ? formatDay(value) : value
}

function renderOf(key: string, decimals: number, context: TableContext): DataColumn<CatalogueRow>['render'] {
  const { at } = context
  const linked = (to: (slug: string) => string) => (row: CatalogueRow) => {
    const slug = text(row, key)
    return slug === null ? <Measure value={null} /> : <Link look="quiet" to={withQuery(to(slug), { at })}>{wordsOf(key, slug, context)}</Link>
  }
  switch (key) {
    case 'name':
      return (row) => (
        <span className="inline-flex items-center gap-2">
          <Link look="quiet" to={withQuery(paths.galaxy(text(row, 'slug') ?? ''), { at })}>{text(row, 'name')}</Link>
          {row.status !== undefined && row.status !== 'confirmed' && <span className="text-xs text-muted italic">{text(row, 'status')}</span>}
        </span>
      )
    case 'class':
      return (row) => <ClassMark galaxyClass={GALAXY_CLASSES.find((one) => one === row.class) ?? 'unknown'} withLabel />
    case 'status':
      return (row) => <StatusBadge status={GALAXY_STATUSES.find((one) => one === row.status) ?? 'candidate'} />
    case 'host':
      return linked(paths.host)
    case 'main_disturber':
      return linked(paths.galaxy)
    default:
      return measured(key, decimals)
  }
}

function measured(key: string, decimals: number): DataColumn<CatalogueRow>['render'] {
  const errors = ERRORS[key]
  if (!errors) return undefined
  return (row) => {
    const value = number(row, key)
    const minus = 'error' in errors ? number(row, errors.error) : gap(value, number(row, errors.lo))
    const plus = 'error' in errors ? minus : gap(number(row, errors.hi), value)
    return <Measure value={value} plus={plus} minus={minus} decimals={decimals} />
  }
}
