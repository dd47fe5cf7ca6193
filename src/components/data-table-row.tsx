import { classNames } from '../lib/class-names.ts'
import { cellText, isNumeric, type DataColumn } from './data-column.ts'
import { Missing } from './measure.tsx'

export interface DataTableRowProps<Row> {
  row: Row
  index: number
  columns: readonly DataColumn<Row>[]
  height: number
  isTabStop: boolean
  isSelected: boolean
  isVirtual: boolean
  onFocus: (index: number) => void
  onHover: ((row: Row | null) => void) | undefined
  onAction: ((row: Row) => void) | undefined
}

export function DataTableRow<Row>({ row, index, columns, height, isTabStop, isSelected, isVirtual, onFocus, onHover, onAction }: DataTableRowProps<Row>) {
  return (
    <tr
      data-index={index}
      tabIndex={isTabStop ? 0 : -1}
      aria-rowindex={isVirtual ? index + 2 : undefined}
      aria-current={isSelected || undefined}
      onFocus={(event) => {
        if (event.target === event.currentTarget) onFocus(index)
        onHover?.(row)
      }}
      onBlur={onHover && (() => onHover(null))}
      onClick={() => onFocus(index)}
      onDoubleClick={onAction && (() => onAction(row))}
      onMouseEnter={onHover && (() => onHover(row))}
      onMouseLeave={onHover && (() => onHover(null))}
      className="group scroll-mt-12 focus-visible:-outline-offset-2"
      style={{ height }}
    >
      {columns.map((column, position) => {
        const Cell = position === 0 ? 'th' : 'td'
        const text = column.render ? null : cellText(column, row)
        return (
          <Cell
            key={column.key}
            scope={position === 0 ? 'row' : undefined}
            title={isVirtual && typeof text === 'string' && text.length > 20 ? text : undefined}
            className={classNames(
              'border-b border-line px-3 font-normal whitespace-nowrap',
              isVirtual && 'overflow-hidden text-ellipsis',
              isNumeric(column) ? 'text-right figures' : 'text-left',
              position === 0 && 'sticky left-0 z-10 border-r border-r-line max-sm:max-w-[44vw] max-sm:overflow-hidden max-sm:text-ellipsis',
              isSelected ? 'bg-accent-soft' : 'bg-sheet group-hover:bg-well group-focus-visible:bg-well',
              isSelected && position === 0 && 'shadow-[inset_3px_0_0_var(--accent)]',
            )}
          >
            {column.render ? column.render(row) : (text ?? <Missing />)}
          </Cell>
        )
      })}
    </tr>
  )
}
