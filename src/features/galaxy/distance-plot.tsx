import { METHODS } from '../../../core/methods.ts'
import type { GalaxyAnswer, MeasurementAnswer } from '../../../core/schema/catalogue.ts'
import { DotWhiskerPlot, type DotWhiskerRowData } from '../../components/dot-whisker-plot.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { formatPercent } from '../../lib/format.ts'
import { adoptedOf } from './adopted-words.ts'

export interface DistancePlotProps {
  galaxy: GalaxyAnswer
  measurements: readonly MeasurementAnswer[]
}

/** Every distance modulus on the catalogue's scale, by source and method, with the adopted one behind. */
export function DistancePlot({ galaxy, measurements }: DistancePlotProps) {
  const adopted = adoptedOf(galaxy, 'distance_modulus')
  const rows = plotRows(galaxy, measurements)
  if (rows.length === 0) {
    return (
      <Sheet title="Distance">
        <EmptyState title="No distance yet">Every approved distance of this galaxy will stand here with its error, beside the value that the catalogue adopts.</EmptyState>
      </Sheet>
    )
  }
  const value = adopted?.value
  return (
    <Sheet>
      <DotWhiskerPlot
        title="Distance"
        fileName={`${galaxy.slug}-distance`}
        rows={rows}
        band={value != null ? { value, lo: value - (adopted?.errMinus ?? 0), hi: value + (adopted?.errPlus ?? 0), label: 'Adopted' } : undefined}
        axis={{ label: 'distance modulus on the catalogue’s scale', unit: 'mag', decimals: 2 }}
        note={adopted && <p>{adopted.sentence}</p>}
      />
    </Sheet>
  )
}

/** Those that carry weight first, heaviest first; then the others, newest first. */
function plotRows(galaxy: GalaxyAnswer, measurements: readonly MeasurementAnswer[]): DotWhiskerRowData[] {
  const reasons = new Map(adoptedOf(galaxy, 'distance_modulus')?.reasons.map((reason) => [reason.measurementId, reason]))
  return measurements
    .filter((m) => m.quantity === 'distance_modulus' && m.value !== null)
    .map((m) => ({ m, reason: reasons.get(m.id) }))
    .sort((a, b) => (b.reason?.weight ?? 0) - (a.reason?.weight ?? 0) || b.m.source.year - a.m.source.year || a.m.id - b.m.id)
    .map(({ m, reason }) => ({
      id: String(m.id),
      label: m.source.label,
      subLabel: METHODS.find((method) => method.key === m.method)?.label,
      value: reason?.scaled ?? m.value ?? 0,
      plus: reason?.error ?? m.errPlus,
      minus: reason?.error ?? m.errMinus,
      used: reason?.used ?? false,
      weight: reason?.used ? formatPercent(reason.weight) : shortReason(reason?.reason ?? m.excludedReason),
    }))
}

/** A reason as short as the margin of the picture; the table has it in full. */
function shortReason(reason: string | null | undefined): string {
  if (!reason) return 'not used'
  return reason.split(/[:;,]| by /)[0]?.trim() ?? reason
}
