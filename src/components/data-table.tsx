import { useVirtualizer } from '@tanstack/react-virtual'
import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type ReactNode } from 'react'
import { classNames } from '../lib/class-names.ts'
import { copyText } from '../lib/clipboard.ts'
import { formatCounted } from '../lib/format.ts'
import { useLocalSetting } from '../lib/local-setting.ts'
import { saveBlob } from '../lib/picture-export.ts'
import { ROW_HEIGHT_PX, rowDensitySetting } from '../lib/row-density.ts'
import { rowsToTsv, sortRows, type DataColumn, type SortState } from './data-column.ts'
import { DataTableHead } from './data-table-head.tsx'
import { DataTableRow } from './data-table-row.tsx'
import { DataTableTools } from './data-table-tools.tsx'

export type { DataColumn, SortState } from './data-column.ts'

export interface DataTableProps<Row> {
  /** What the table is, for readers: "Galaxies". */
  label: string
  columns: readonly DataColumn<Row>[]
  rows: readonly Row[]
  rowKey: (row: Row) => string
  /** With `onSortChange` the rows come sorted (by the server); without, the table sorts them itself. */
  sort?: SortState | null
  onSortChange?: (sort: SortState) => void
  /** Enter or double click on a row. */
  onRowAction?: (row: Row) => void
  onRowHover?: (row: Row | null) => void
  selectedKey?: string | null
  isLoading?: boolean
  /** Shown when there are no rows. */
  empty?: ReactNode
  /** CSS height above which the table scrolls within itself. */
  maxHeight?: string
  /** At the left of the table's own tools. */
  toolbar?: ReactNode
  /** Instead of "412 rows". */
  countText?: string
  /** The last rows are near: load more. */
  onReachEnd?: () => void
  /** With a name (no ending) the rows can be saved as TSV. */
  fileName?: string
  /** Row count, row height, copying and saving; true unless said otherwise. */
  showTools?: boolean
}

/** Beyond so many rows only those in sight are drawn. */
const VIRTUAL_FROM = 200
const END_MARGIN_ROWS = 20
const DEFAULT_NUMBER_WIDTH = 104
const DEFAULT_TEXT_WIDTH = 168

/**
 * The table of the whole site: a native table with sticky head and first column. One tab stop; arrows, Page keys, Home and End
 * move from row to row, Left and Right scroll, Enter opens, Ctrl C copies the row.
 */
export function DataTable<Row>(props: DataTableProps<Row>) {
  const { label, columns, rows, rowKey, onSortChange, onRowAction, onRowHover, selectedKey, isLoading, empty, maxHeight = '72vh', toolbar, countText, onReachEnd, fileName, showTools = true } = props
  const [density] = useLocalSetting(rowDensitySetting)
  const rowHeight = ROW_HEIGHT_PX[density]
  const scroller = useRef<HTMLDivElement>(null)
  const [ownSort, setOwnSort] = useState<SortState | null>(props.sort ?? null)
  const [current, setCurrent] = useState(0)
  const sort = onSortChange ? (props.sort ?? null) : ownSort

  const shown = useMemo(() => {
    const column = !onSortChange && sort ? columns.find((candidate) => candidate.key === sort.key) : undefined
    return column && sort ? sortRows(rows, column, sort.direction) : rows
  }, [rows, columns, sort, onSortChange])

  const isVirtual = shown.length > VIRTUAL_FROM
  const virtualizer = useVirtualizer({
    count: shown.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => rowHeight,
    overscan: 12,
    enabled: isVirtual,
  })
  useEffect(() => virtualizer.measure(), [rowHeight, virtualizer])

  const items = isVirtual ? virtualizer.getVirtualItems() : null
  const first = items ? (items[0]?.index ?? 0) : 0
  const last = items ? (items.at(-1)?.index ?? -1) : shown.length - 1
  const visible = shown.slice(first, last + 1)
  const spaceAbove = items ? (items[0]?.start ?? 0) : 0
  const spaceBelow = items ? virtualizer.getTotalSize() - (items.at(-1)?.end ?? 0) : 0
  const active = Math.min(current, Math.max(0, shown.length - 1))
  // The row that holds the tab stop must exist even when it is scrolled out of sight.
  const tabStop = active >= first && active <= last ? active : first

  const nearEnd = shown.length > 0 && last >= shown.length - END_MARGIN_ROWS
  useEffect(() => {
    if (isVirtual && nearEnd) onReachEnd?.()
  }, [isVirtual, nearEnd, shown.length, onReachEnd])

  function sortBy(column: DataColumn<Row>): void {
    const direction = sort?.key === column.key && sort.direction === 'ascending' ? 'descending' : 'ascending'
    const next: SortState = { key: column.key, direction }
    if (onSortChange) onSortChange(next)
    else setOwnSort(next)
  }

  function moveTo(index: number): void {
    const target = Math.min(shown.length - 1, Math.max(0, index))
    setCurrent(target)
    if (isVirtual) virtualizer.scrollToIndex(target, { align: 'auto' })
    requestAnimationFrame(() => scroller.current?.querySelector<HTMLElement>(`tr[data-index="${target}"]`)?.focus({ preventScroll: isVirtual }))
  }

  function onKeyDown(event: KeyboardEvent<HTMLTableElement>): void {
    if (!(event.target instanceof HTMLTableRowElement)) return
    const page = Math.max(1, Math.floor((scroller.current?.clientHeight ?? 400) / rowHeight) - 2)
    const targets: Record<string, number> = {
      ArrowDown: active + 1,
      ArrowUp: active - 1,
      PageDown: active + page,
      PageUp: active - page,
      Home: 0,
      End: shown.length - 1,
    }
    const target = targets[event.key]
    const row = shown[active]
    if (target !== undefined) moveTo(target)
    else if (event.key === 'ArrowRight') scroller.current?.scrollBy({ left: 120 })
    else if (event.key === 'ArrowLeft') scroller.current?.scrollBy({ left: -120 })
    else if (event.key === 'Enter' && row !== undefined && onRowAction) onRowAction(row)
    else if (event.key.toLowerCase() === 'c' && (event.ctrlKey || event.metaKey) && row !== undefined && String(window.getSelection()) === '') void copyText(rowsToTsv(columns, [row]), 'the row')
    else return
    event.preventDefault()
  }

  const widthOf = (column: DataColumn<Row>): number => column.width ?? (column.decimals !== undefined ? DEFAULT_NUMBER_WIDTH : DEFAULT_TEXT_WIDTH)
  const tableWidth = columns.reduce((sum, column) => sum + widthOf(column), 0)
  const isEmpty = shown.length === 0

  return (
    <div className="flex min-w-0 flex-col">
      {(showTools || toolbar) && (
        <DataTableTools
          toolbar={toolbar}
          showTools={showTools}
          count={isLoading && isEmpty ? 'Loading …' : (countText ?? formatCounted(shown.length, 'row'))}
          onCopy={isEmpty ? undefined : () => void copyText(rowsToTsv(columns, shown), `${formatCounted(shown.length, 'row')}, tab-separated`)}
          onSave={isEmpty || !fileName ? undefined : () => saveBlob(new Blob([rowsToTsv(columns, shown)], { type: 'text/tab-separated-values' }), `${fileName}.tsv`)}
        />
      )}
      {isEmpty && !isLoading && empty ? (
        empty
      ) : (
        <div ref={scroller} className="relative min-w-0 overflow-auto rounded-lg border border-line bg-sheet" style={{ maxHeight }}>
          <table
            aria-label={label}
            aria-rowcount={isVirtual ? shown.length + 1 : undefined}
            aria-busy={isLoading || undefined}
            onKeyDown={onKeyDown}
            className="w-full border-separate border-spacing-0 text-sm"
            style={isVirtual ? { tableLayout: 'fixed', minWidth: tableWidth } : undefined}
          >
            {isVirtual && (
              <colgroup>
                {columns.map((column) => (
                  <col key={column.key} style={{ width: widthOf(column) }} />
                ))}
              </colgroup>
            )}
            <DataTableHead columns={columns} sort={sort} onSort={sortBy} />
            <tbody>
              {spaceAbove > 0 && <tr aria-hidden style={{ height: spaceAbove }} />}
              {visible.map((row, offset) => (
                <DataTableRow
                  key={rowKey(row)}
                  row={row}
                  index={first + offset}
                  columns={columns}
                  height={rowHeight}
                  isTabStop={first + offset === tabStop}
                  isSelected={selectedKey != null && rowKey(row) === selectedKey}
                  isVirtual={isVirtual}
                  onFocus={setCurrent}
                  onHover={onRowHover}
                  onAction={onRowAction}
                />
              ))}
              {spaceBelow > 0 && <tr aria-hidden style={{ height: spaceBelow }} />}
              {isLoading && isEmpty && <LoadingRows columns={columns.length} height={rowHeight} />}
            </tbody>
          </table>
        </div>
      )}
    </div>
  )
}

const LOADING_ROWS = 8

function LoadingRows({ columns, height }: { columns: number; height: number }) {
  return Array.from({ length: LOADING_ROWS }, (_, row) => (
    <tr key={row} style={{ height }}>
      {Array.from({ length: columns }, (_unused, column) => (
        <td key={column} className={classNames('border-b border-line px-3', column === 0 && 'sticky left-0 bg-sheet')}>
          <div className="h-3 animate-pulse rounded-sm bg-well" style={{ width: `${50 + ((row * 7 + column * 13) % 40)}%` }} />
        </td>
      ))}
    </tr>
  ))
}
