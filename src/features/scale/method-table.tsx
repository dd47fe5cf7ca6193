import { method } from '../../../core/methods.ts'
import type { MethodPolicy } from '../../../core/scale/policy.ts'
import type { MethodCount, ScaleAnswer } from '../../../core/schema/scale.ts'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'

type MethodRow = MethodPolicy & { count: MethodCount | undefined; anchor: string | null }

const COLUMNS: readonly DataColumn<MethodRow>[] = [
  { key: 'method', header: 'Method', text: (m) => method(m.method).label, sortable: true, width: 230 },
  { key: 'tier', header: 'Tier', text: (m) => m.tier, decimals: 0, sortable: true, width: 70, help: 'The best tier present decides; lower tiers are shown and not used' },
  { key: 'systematic', header: 'Systematic', unit: 'mag', text: (m) => m.systematic, decimals: 2, sortable: true, width: 100, help: 'Systematic error of the method on the catalogue’s scale' },
  { key: 'unscaled', header: 'Scale unknown', unit: 'mag', text: (m) => m.unscaled, decimals: 2, sortable: true, width: 120, help: 'Added in quadrature when the authors do not state the anchor value they assumed' },
  { key: 'defaultError', header: 'Error if none', unit: 'mag', text: (m) => m.defaultError, decimals: 2, sortable: true, width: 110, help: 'Stands in for a missing error bar' },
  { key: 'used', header: 'Used', text: (m) => m.count?.measurementsUsed ?? 0, decimals: 0, sortable: true, width: 70, help: 'Measurements that enter an adopted distance' },
  { key: 'held', header: 'Held', text: (m) => m.count?.measurements ?? 0, decimals: 0, sortable: true, width: 70, help: 'Measurements held, used or not' },
  { key: 'galaxiesUsed', header: 'Galaxies', text: (m) => m.count?.galaxiesUsed ?? 0, decimals: 0, sortable: true, width: 90, help: 'Galaxies whose adopted distance uses it' },
  { key: 'anchor', header: 'Hangs on', text: (m) => m.anchor, sortable: true, width: 190 },
]

/** Every method's rule, with what it carries. */
export function MethodTable({ scale }: { scale: ScaleAnswer }) {
  const rows = scale.policy.methods
    .map((m): MethodRow => ({ ...m, count: scale.methods.find((c) => c.method === m.method), anchor: scale.anchors.find((a) => a.methods.includes(m.method))?.label ?? null }))
    .sort((a, b) => a.tier - b.tier)
  return (
    <section className="min-w-0">
      <SectionHeading note={scale.policy.name}>Methods</SectionHeading>
      <DataTable label="Methods" columns={COLUMNS} rows={rows} rowKey={(m) => m.method} fileName="methods" maxHeight="none" />
    </section>
  )
}
