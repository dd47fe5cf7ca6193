import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { linearAxis } from '../../components/axis.ts'
import { DataTable, type DataColumn } from '../../components/data-table.tsx'
import { PlotFrame } from '../../components/plot-frame.tsx'
import { formatCount, formatNumber } from '../../lib/format.ts'
import { useWidth } from '../../lib/use-width.ts'
import { Axes, type Box } from './axes.tsx'
import type { Shape } from './views.ts'

const MARGIN = { left: 64, right: 12, top: 26, bottom: 46 }
const INSIDE_HEIGHT = 190

/** How flat chance makes systems with these radii, and where the observed one stands among them. */
export function ShapeHistogram({ shape, host }: { shape: Shape; host: HostAnswer['host'] }) {
  const [frame, width] = useWidth<HTMLDivElement>(480)
  const { isotropy, minorToMajor, drawn } = shape
  const bins = isotropy.histogram.map((count, i) => ({ lo: i / isotropy.histogram.length, hi: (i + 1) / isotropy.histogram.length, count }))
  const box: Box = { left: MARGIN.left, right: width - MARGIN.right, top: MARGIN.top, bottom: MARGIN.top + INSIDE_HEIGHT }
  const across = linearAxis(0, 1, box.left, box.right)
  across.scale.domain([0, 1])
  const ticks = [0, 0.2, 0.4, 0.6, 0.8, 1].map((value) => ({ at: across.scale(value), text: formatNumber(value, 1) }))
  const up = linearAxis(0, 1.08 * Math.max(1, ...isotropy.histogram), box.bottom, box.top)
  const floor = up.scale(0)
  const at = across.scale(minorToMajor)
  const height = box.bottom + MARGIN.bottom
  const wide = across.scale(1 / bins.length) - across.scale(0)
  return (
    <PlotFrame
      title="Among isotropic systems"
      savedTitle={`${host.name} among isotropic systems with its radii`}
      fileName={`${host.slug}-isotropy`}
      alt={`Minor-to-major axis ratios of ${formatCount(isotropy.reshuffles)} isotropic systems with the same radii; the observed ${formatNumber(minorToMajor, 2)} is reached or passed by ${formatCount(isotropy.asFlat)} of them.`}
      table={<Numbers bins={bins} name={host.name} />}
      note={
        <p className="text-sm text-muted">
          {formatCount(isotropy.asFlat)} of {formatCount(isotropy.reshuffles)} reshuffles are as flat (filled). Each keeps the satellites’ separations and turns them to random directions. The bar above is the 16th to 84th percentile of the ratio over the draws.
        </p>
      }
    >
      <div ref={frame}>
        <svg aria-hidden width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block max-w-full font-sans">
          {bins.map((bin) =>
            bin.count === 0 ? null : (
              <rect
                key={bin.lo}
                x={across.scale(bin.lo) + 0.5}
                width={Math.max(0.5, wide - 1)}
                y={up.scale(bin.count)}
                height={floor - up.scale(bin.count)}
                className={bin.hi <= minorToMajor ? 'fill-accent stroke-accent' : 'fill-zone stroke-edge'}
                strokeWidth={1}
              />
            ),
          )}
          <line x1={at} x2={at} y1={box.top - 6} y2={box.bottom} strokeWidth={2} className="stroke-accent" />
          <line x1={across.scale(drawn.minorToMajor.lo)} x2={across.scale(drawn.minorToMajor.hi)} y1={box.top - 6} y2={box.top - 6} strokeWidth={2} className="stroke-accent" />
          <text x={at < (box.left + box.right) / 2 ? at + 6 : at - 6} y={box.top - 12} fontSize={13} textAnchor={at < (box.left + box.right) / 2 ? 'start' : 'end'} className="fill-accent">
            {host.name}: {formatNumber(minorToMajor, 2)}
          </text>
          <Axes box={box} x={{ ticks, label: 'c/a' }} y={{ ticks: up.ticks.filter((tick) => tick.at <= floor), label: 'reshuffles' }} />
        </svg>
      </div>
    </PlotFrame>
  )
}

interface Bin {
  lo: number
  hi: number
  count: number
}

function Numbers({ bins, name }: { bins: readonly Bin[]; name: string }) {
  const columns: DataColumn<Bin>[] = [
    { key: 'lo', header: 'c/a from', decimals: 3, text: (b) => b.lo },
    { key: 'hi', header: 'to', decimals: 3, text: (b) => b.hi },
    { key: 'count', header: 'Reshuffles', decimals: 0, text: (b) => b.count, sortable: true },
  ]
  return <DataTable label={`Isotropic reshuffles of the ${name} system`} columns={columns} rows={bins} rowKey={(b) => String(b.lo)} />
}
