import type { ScaleLinear } from 'd3-scale'
import { classNames } from '../lib/class-names.ts'

export interface DotWhiskerRowData {
  id: string
  label: string
  /** Below the label, small: the method. */
  subLabel?: string
  value: number
  /** Errors, not negative; one alone stands for both. */
  plus?: number | null
  minus?: number | null
  /** At the right: "31 %", or why it has none: "lower tier". */
  weight?: string
  /** Whether it entered the adopted value. */
  used: boolean
}

export interface DotWhiskerRowProps {
  row: DotWhiskerRowData
  top: number
  height: number
  width: number
  isNarrow: boolean
  scale: ScaleLinear<number, number>
  /** Room for the label, px. */
  labelWidth: number
}

/** About how wide a letter is, for cutting a label that has no room. */
const LETTER = 7.2

function cut(text: string, room: number): string {
  const letters = Math.floor(room / LETTER)
  return text.length > letters ? `${text.slice(0, Math.max(1, letters - 1)).trimEnd()}…` : text
}

export function DotWhiskerRow({ row, top, height, width, isNarrow, scale, labelWidth }: DotWhiskerRowProps) {
  const middle = isNarrow ? top + height - 14 : top + height / 2
  const up = row.plus ?? row.minus
  const down = row.minus ?? row.plus
  const ink = row.used ? 'fill-ink' : 'fill-muted'
  const words = isNarrow ? (
    <>
      <text x={0} y={top + 22} fontSize={15} className={ink}>
        {cut(row.label, width * 0.55)}
        {row.subLabel && (
          <tspan dx={8} fontSize={13} className="fill-muted">
            {cut(row.subLabel, width - LETTER * (Math.min(row.label.length, (width * 0.55) / LETTER) + (row.weight?.length ?? 0) + 3))}
          </tspan>
        )}
      </text>
      {row.weight && (
        <text x={width} y={top + 22} fontSize={14} textAnchor="end" className={classNames('figures', ink)}>
          {row.weight}
        </text>
      )}
    </>
  ) : (
    <>
      <text x={0} y={middle + (row.subLabel ? -1 : 5)} fontSize={15.5} className={ink}>
        {cut(row.label, labelWidth)}
      </text>
      {row.subLabel && (
        <text x={0} y={middle + 16} fontSize={13} className="fill-muted">
          {cut(row.subLabel, labelWidth)}
        </text>
      )}
      {row.weight && (
        <text x={width} y={middle + 5} fontSize={14.5} textAnchor="end" className={classNames('figures', ink)}>
          {row.weight}
        </text>
      )}
    </>
  )
  return (
    <g>
      <title>{row.label}</title>
      {words}
      {up != null && down != null && (
        <line
          x1={scale(row.value - down)}
          x2={scale(row.value + up)}
          y1={middle}
          y2={middle}
          strokeWidth={2}
          strokeDasharray={row.used ? undefined : '4 3'}
          className={row.used ? 'stroke-ink' : 'stroke-muted'}
        />
      )}
      <circle cx={scale(row.value)} cy={middle} r={6} strokeWidth={2} className={row.used ? 'fill-ink stroke-ink' : 'fill-sheet stroke-muted'} />
    </g>
  )
}
