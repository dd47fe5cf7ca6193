import { useState } from 'react'
import { columnOf } from '../../../core/columns.ts'
import { chosenRange, ranging, type Filter } from '../../../core/filters/filter.ts'
import type { Facets } from '../../../core/schema/catalogue.ts'
import { RangeSlider } from '../slider.tsx'
import { formatCounted, unitText } from '../../lib/format.ts'

type Histogram = Facets['histograms'][string]

export interface RangeFacetProps {
  column: string
  histogram: Histogram
  filter: Filter
  onChange: (filter: Filter) => void
}

const STEPS_WANTED = 200
const HEIGHT = 36

/** A step of 1, 2 or 5 times a power of ten that divides a range into about 200. */
function stepOf(lo: number, hi: number): number {
  const rough = (hi - lo || 1) / STEPS_WANTED
  const power = 10 ** Math.floor(Math.log10(rough))
  return power * (rough / power < 1.5 ? 1 : rough / power < 3.5 ? 2 : rough / power < 7.5 ? 5 : 10)
}

/** How one number is spread over what the other filters leave, and the range that it is held to. */
export function RangeFacet({ column, histogram, filter, onChange }: RangeFacetProps) {
  const { lo, hi, counts, missing } = histogram
  const step = stepOf(lo, hi)
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9))
  const tidy = (value: number): number => Number(value.toFixed(decimals))
  const chosen = chosenRange(filter, column)
  const least = tidy(Math.min(Math.floor(lo / step) * step, chosen?.lo ?? Infinity))
  const most = tidy(Math.max(Math.ceil(hi / step) * step, chosen?.hi ?? -Infinity))
  const held: [number, number] = [chosen?.lo ?? least, chosen?.hi ?? most]
  const [dragged, setDragged] = useState<[number, number] | null>(null)
  const shown = dragged ?? held
  const { label = column, unit = '' } = columnOf(column) ?? {}
  return (
    <div>
      <Bars histogram={histogram} shown={shown} />
      <RangeSlider
        label={label}
        unit={unit === '' ? undefined : unitText(unit)}
        value={shown}
        min={least}
        max={most}
        step={step}
        decimals={decimals}
        onChange={setDragged}
        onChangeEnd={([from, to]) => {
          setDragged(null)
          onChange(ranging(filter, column, { lo: from <= least ? null : tidy(from), hi: to >= most ? null : tidy(to) }))
        }}
      />
      {missing > 0 && <p className="text-xs text-muted">{`${formatCounted(missing, 'galaxy', 'galaxies')} of ${missing + counts.reduce((sum, n) => sum + n, 0)} without a value`}</p>}
    </div>
  )
}

function Bars({ histogram: { lo, hi, counts }, shown }: { histogram: Histogram; shown: readonly [number, number] }) {
  const most = Math.max(1, ...counts)
  const width = (hi - lo) / counts.length
  return (
    <svg aria-hidden viewBox={`0 0 ${counts.length} ${HEIGHT}`} preserveAspectRatio="none" className="mx-2 mb-1 block h-9 w-[calc(100%-1rem)]">
      {counts.map((count, i) => {
        const middle = lo + (i + 0.5) * width
        const inside = middle >= shown[0] && middle <= shown[1]
        const height = count === 0 ? 0 : Math.max(1.5, (HEIGHT * count) / most)
        return <rect key={i} x={i + 0.08} width={0.84} y={HEIGHT - height} height={height} className={inside ? 'fill-ink/70' : 'fill-line'} />
      })}
    </svg>
  )
}
