import { ArrowDown, ArrowUp } from 'lucide-react'
import { Button, Focusable } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { isNumeric, type DataColumn, type SortState } from './data-column.ts'
import { Tooltip } from './tooltip.tsx'
import { Subscripted } from './subscripted.tsx'
import { Unit } from './unit.tsx'

export interface DataTableHeadProps<Row> {
  columns: readonly DataColumn<Row>[]
  sort: SortState | null
  onSort: (column: DataColumn<Row>) => void
}

export function DataTableHead<Row>({ columns, sort, onSort }: DataTableHeadProps<Row>) {
  return (
    <thead>
      <tr>
        {columns.map((column, index) => {
          const sorted = sort?.key === column.key ? sort.direction : undefined
          return (
            <th
              key={column.key}
              scope="col"
              aria-sort={column.sortable ? (sorted ?? 'none') : undefined}
              className={classNames(
                'sticky top-0 border-b border-edge bg-sheet px-3 py-1.5 align-bottom text-xs font-semibold whitespace-nowrap text-muted',
                index === 0 ? 'left-0 z-30 border-r border-r-line' : 'z-20',
                isNumeric(column) ? 'text-right' : 'text-left',
              )}
            >
              <HeadCell column={column} sorted={sorted} onSort={onSort} />
            </th>
          )
        })}
      </tr>
    </thead>
  )
}

/** As tall as a head with a button, so that all stand on one line. */
const PLAIN_HEAD = 'inline-flex min-h-6 max-w-full items-center gap-1'

interface HeadCellProps<Row> {
  column: DataColumn<Row>
  sorted: SortState['direction'] | undefined
  onSort: (column: DataColumn<Row>) => void
}

function HeadCell<Row>({ column, sorted, onSort }: HeadCellProps<Row>) {
  const words = (
    <>
      <span className="truncate"><Subscripted text={column.header} /></span>
      {column.unit && <span className="font-normal"><Unit unit={column.unit} /></span>}
    </>
  )
  if (!column.sortable) {
    const plain = <span className={PLAIN_HEAD}>{words}</span>
    if (!column.help) return plain
    return (
      <Tooltip text={column.help} placement="bottom">
        <Focusable>
          <span tabIndex={-1} role="note" className={PLAIN_HEAD}>
            {words}
          </span>
        </Focusable>
      </Tooltip>
    )
  }
  const Arrow = sorted === 'descending' ? ArrowDown : ArrowUp
  const button = (
    <Button
      onPress={() => onSort(column)}
      className={classNames(
        'group inline-flex min-h-6 max-w-full items-center gap-1 rounded-sm font-semibold data-hovered:text-ink',
        isNumeric(column) && 'flex-row-reverse',
        sorted && 'text-ink',
      )}
    >
      <span className="inline-flex min-w-0 items-baseline gap-1">{words}</span>
      <Arrow size={12} aria-hidden className={classNames('shrink-0', !sorted && 'opacity-0 group-data-focus-visible:opacity-60 group-data-hovered:opacity-60')} />
    </Button>
  )
  return column.help ? (
    <Tooltip text={column.help} placement="bottom">
      {button}
    </Tooltip>
  ) : (
    button
  )
}
