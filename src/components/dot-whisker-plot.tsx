import type { ScaleLinear } from 'd3-scale'
import type { ReactNode } from 'react'
import { formatMeasure, formatNumber } from '../lib/format.ts'
import { useWidth } from '../lib/use-width.ts'
import { linearAxis } from './axis.ts'
import { DataTable, type DataColumn } from './data-table.tsx'
import { DotWhiskerRow, type DotWhiskerRowData } from './dot-whisker-row.tsx'
import { PlotFrame } from './plot-frame.tsx'

export type { DotWhiskerRowData } from './dot-whisker-row.tsx'

export interface DotWhiskerPlotProps {
  title: string
  rows: readonly DotWhiskerRowData[]
  /** The adopted value as a line, its error as a band behind. */
  band?: { value: number; lo: number; hi: number; label: string }
  axis: { label: string; unit: string; decimals?: number }
  /** Instead of the sentence made from the rows. */
  alt?: string
  fileName: string
  note?: ReactNode
  level?: 2 | 3
}

const TOP = 12
const AXIS_HEIGHT = 56
const NARROW_BELOW = 560

/** Values of one quantity, row under row, with their errors, and the adopted value behind. Used ones are filled, others open and dashed. */
export function DotWhiskerPlot({ title, rows, band, axis, alt, fileName, note, level }: DotWhiskerPlotProps) {
  const [frame, width] = useWidth<HTMLDivElement>(720)
  const isNarrow = width < NARROW_BELOW
  const decimals = axis.decimals ?? 2
  const rowHeight = isNarrow ? 60 : 44
  const left = isNarrow ? 8 : Math.min(260, Math.round(width * 0.3))
  const right = width - (isNarrow ? 8 : 104)
  const ends = rows.flatMap((row) => [row.value - (row.minus ?? row.plus ?? 0), row.value + (row.plus ?? row.minus ?? 0)]).concat(band ? [band.lo, band.hi] : [])
  const { scale, ticks } = linearAxis(Math.min(...ends), Math.max(...ends), left, right)
  const bottom = TOP + rows.length * rowHeight
  const height = bottom + AXIS_HEIGHT
  // Where labels stand above their rows, the band is drawn beside the marks only, so that no word lies on it.
  const bandPieces = isNarrow ? rows.map((_, index): [number, number] => [TOP + index * rowHeight + 30, TOP + (index + 1) * rowHeight + 2]) : [[TOP - 4, bottom + 4] satisfies [number, number]]
  const axisWords = axis.unit ? `${axis.label} / ${axis.unit}` : axis.label

  if (rows.length === 0) return null
  return (
    <PlotFrame title={title} fileName={fileName} note={note} level={level} alt={alt ?? inWords(rows, band, axis.label, axis.unit, decimals)} table={<Numbers title={title} rows={rows} unit={axis.unit} decimals={decimals} />}>
      <div ref={frame} className="w-full">
        <svg aria-hidden width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block max-w-full font-sans">
          {band && bandPieces.map(([from, to]) => <AdoptedBand key={from} band={band} from={from} to={to} scale={scale} />)}
          {rows.map((row, index) => (
            <DotWhiskerRow key={row.id} row={row} top={TOP + index * rowHeight} height={rowHeight} width={width} isNarrow={isNarrow} scale={scale} labelWidth={left - 12} />
          ))}
          {ticks.map((tick) => (
            <g key={tick.text}>
              <line x1={tick.at} x2={tick.at} y1={bottom + 12} y2={bottom + 17} strokeWidth={1} className="stroke-muted" />
              <text x={tick.at} y={bottom + 32} fontSize={13} textAnchor="middle" className="figures fill-muted">
                {tick.text}
              </text>
            </g>
          ))}
          <text x={(left + right) / 2} y={bottom + 52} fontSize={13.5} textAnchor="middle" className="fill-muted">
            {axisWords}
          </text>
        </svg>
      </div>
    </PlotFrame>
  )
}

interface AdoptedBandProps {
  band: { value: number; lo: number; hi: number }
  from: number
  to: number
  scale: ScaleLinear<number, number>
}

function AdoptedBand({ band, from, to, scale }: AdoptedBandProps) {
  return (
    <>
      <rect x={scale(band.lo)} y={from} width={Math.max(1, scale(band.hi) - scale(band.lo))} height={to - from} className="fill-accent opacity-15" />
      <line x1={scale(band.value)} x2={scale(band.value)} y1={from} y2={to} strokeWidth={1.6} className="stroke-accent" />
    </>
  )
}

function inWords(rows: readonly DotWhiskerRowData[], band: DotWhiskerPlotProps['band'], label: string, unit: string, decimals: number): string {
  const adopted = band ? ` ${band.label}: ${formatNumber(band.value, decimals)}, from ${formatNumber(band.lo, decimals)} to ${formatNumber(band.hi, decimals)} ${unit}.` : ''
  const values = rows.map((row) => `${row.label}${row.subLabel ? `, ${row.subLabel}` : ''}: ${formatMeasure({ ...row, unit, decimals })}, ${row.used ? 'used' : 'not used'}${row.weight ? `, ${row.weight}` : ''}`)
  return `${label}, ${rows.length} ${rows.length === 1 ? 'value' : 'values'}.${adopted} ${values.join('; ')}.`
}

function Numbers({ title, rows, unit, decimals }: { title: string; rows: readonly DotWhiskerRowData[]; unit: string; decimals: number }) {
  const columns: DataColumn<DotWhiskerRowData>[] = [
    { key: 'label', header: 'Source', text: (row) => row.label, sortable: true },
    { key: 'sub', header: 'Method', text: (row) => row.subLabel ?? null, sortable: true },
    { key: 'value', header: 'Value', unit, decimals, text: (row) => row.value, sortable: true },
    { key: 'plus', header: '+', unit, decimals, text: (row) => row.plus ?? row.minus ?? null },
    { key: 'minus', header: '−', unit, decimals, text: (row) => row.minus ?? row.plus ?? null },
    { key: 'used', header: 'Used', text: (row) => (row.used ? 'yes' : 'no'), sortable: true },
    { key: 'weight', header: 'Weight or reason', text: (row) => row.weight ?? null },
  ]
  return <DataTable label={`${title}, values`} columns={columns} rows={rows} rowKey={(row) => row.id} />
}
