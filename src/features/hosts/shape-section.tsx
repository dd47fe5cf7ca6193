import type { ReactNode } from 'react'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { GAP } from '../../../core/spaces.ts'
import { Badge } from '../../components/badge.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { formatCount, formatCounted, formatMeasure, formatNumber, formatPercent, formatSigned } from '../../lib/format.ts'
import { ShapeHistogram } from './shape-histogram.tsx'
import type { Shape } from './views.ts'

/** How flat the system is, how sure that is, and how often chance would do it. */
export function ShapeSection({ answer: { host, system } }: { answer: HostAnswer }) {
  const { shape, placed, needed } = system
  if (!shape) {
    return (
      <Sheet title="Flattening">
        <EmptyState title="Too few satellites for a shape">
          {host.distance === null
            ? `${host.name} has no approved distance, so its satellites have no places about it.`
            : `${formatCounted(placed, 'satellite')} with a distance, and a shape needs ${needed}: fewer come out flat whatever they are.`}
        </EmptyState>
      </Sheet>
    )
  }
  return (
    <Sheet>
      <div className="grid items-start gap-x-8 gap-y-6 lg:grid-cols-2">
        <div className="min-w-0">
          <h2 className="mb-3 text-lg">Flattening</h2>
          <p className="prose-measure">{shapeSentence(shape, placed)}</p>
          {shape.stretch.dominates && (
            <div className="mt-3">
              <Badge tone="caution" shape="mark">
                Distance errors rule this shape
              </Badge>
              <p className="mt-1">{stretchSentence(shape)}</p>
            </div>
          )}
          <Values shape={shape} />
          <p className="mt-3 text-sm text-muted">
            Second moments about the host, all satellites weighed alike; ratios are those of the rms extents. The ranges are the 16th and 84th percentiles of {formatCount(shape.drawn.draws)} draws of all distances, the error of the scale
            common to each draw. Distance errors stretch a remote system along the line of sight, and a survey that leaves out part of the sky can flatten one: neither is corrected for.
          </p>
        </div>
        <ShapeHistogram shape={shape} host={host} />
      </div>
    </Sheet>
  )
}

/** For a paper: "c/a = 0.42 (0.35–0.51 with the distance errors drawn) ..." */
export function shapeSentence(shape: Shape, satellites: number): string {
  const { drawn, isotropy, pole } = shape
  // Of shares of a few percent the first decimal matters, of smaller ones the second.
  const decimals = isotropy.p < 0.01 ? 2 : isotropy.p < 0.1 ? 1 : 0
  const share = isotropy.asFlat === 0 ? `fewer than ${formatPercent(1 / isotropy.reshuffles, 2)}` : formatMeasure({ value: 100 * isotropy.p, plus: 100 * isotropy.error, unit: '%', decimals })
  return (
    `c/a${GAP}=${GAP}${formatNumber(shape.minorToMajor, 2)} (${range(drawn.minorToMajor, 2)}) from ${formatCounted(satellites, 'satellite')}; ` +
    `${share} of isotropic systems with the same radii are as flat; ` +
    `rms height ${formatNumber(shape.height, 0)}${GAP}kpc (${range(drawn.height, 0)}); ` +
    `pole at SGL ${formatNumber(pole.sgl, 0)}°, SGB ${formatSigned(pole.sgb, 0)}°, within ${formatNumber(drawn.poleSpread, 0)}° in 68${GAP}% of the draws.`
  )
}

/** Why a shape is not to be believed yet. */
function stretchSentence({ stretch, extent }: Shape): string {
  const axis = stretch.alongSight === null ? '' : `, and the major axis stands ${formatNumber(stretch.alongSight, 0)}° from the line of sight`
  return (
    `Places are unsure by ${formatNumber(stretch.depthError, 0)}${GAP}kpc (rms) along the line of sight, in a system whose rms extent is ${formatNumber(extent, 0)}${GAP}kpc${axis}. ` +
    'An isotropic system would come out long and thin, too: the share of isotropic systems above does not know of these errors. The draws add them to distances that hold them already, so their range lies on the thin side.'
  )
}

function range({ lo, hi }: { lo: number; hi: number }, decimals: number): string {
  return `${formatNumber(lo, decimals)}–${formatNumber(hi, decimals)}`
}

function Values({ shape }: { shape: Shape }) {
  const { drawn, pole } = shape
  const rows: { key: string; label: ReactNode; value: string; median: string; bounds: string }[] = [
    { key: 'ca', label: <>Minor to major axis, <i>c/a</i></>, value: formatNumber(shape.minorToMajor, 2), median: formatNumber(drawn.minorToMajor.median, 2), bounds: range(drawn.minorToMajor, 2) },
    { key: 'ba', label: <>Middle to major axis, <i>b/a</i></>, value: formatNumber(shape.middleToMajor, 2), median: formatNumber(drawn.middleToMajor.median, 2), bounds: range(drawn.middleToMajor, 2) },
    { key: 'height', label: 'Rms height / kpc', value: formatNumber(shape.height, 0), median: formatNumber(drawn.height.median, 0), bounds: range(drawn.height, 0) },
    { key: 'pole', label: 'Pole, SGL and SGB / °', value: `${formatNumber(pole.sgl, 1)} ${formatSigned(pole.sgb, 1)}`, median: '', bounds: `within ${formatNumber(drawn.poleSpread, 0)}` },
  ]
  const cell = 'border-b border-line px-2 py-2 text-right figures whitespace-nowrap'
  return (
    <div className="mt-4 overflow-x-auto">
      <table className="w-full border-separate border-spacing-0 text-sm" aria-label="Flattening in numbers">
        <thead>
          <tr className="text-muted">
            <th scope="col" className="border-b border-line px-2 py-2 text-left font-normal">Quantity</th>
            <th scope="col" className={`${cell} font-normal`}>Adopted</th>
            <th scope="col" className={`${cell} font-normal`}>Median</th>
            <th scope="col" className={`${cell} font-normal`}>16–84{GAP}%</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.key}>
              <th scope="row" className="border-b border-line px-2 py-2 text-left font-normal">{row.label}</th>
              <td className={cell}>{row.value}</td>
              <td className={cell}>{row.median}</td>
              <td className={cell}>{row.bounds}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
