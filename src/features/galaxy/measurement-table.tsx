import { METHODS } from '../../../core/methods.ts'
import { quantity, QUANTITY_KEYS } from '../../../core/quantities.ts'
import type { GalaxyAnswer, MeasurementAnswer, Reason } from '../../../core/schema/catalogue.ts'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import { useScale } from '../../api/scale.ts'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { Link } from '../../components/link.tsx'
import { formatNumber, formatPercent } from '../../lib/format.ts'
import { publishedWords } from '../../lib/published.ts'
import { paths } from '../../paths.ts'
import { changeAddress } from './change-links.ts'

export interface MeasurementTableProps {
  galaxy: GalaxyAnswer
  measurements: readonly MeasurementAnswer[]
  at: string | null
  /** With the ways to mend and exclude. */
  canWrite: boolean
}

const LEFT_OUT_WHEN_EMPTY: readonly string[] = ['anchor', 'note']

/** Every measurement held, of all quantities, as published. */
export function MeasurementTable({ galaxy, measurements, at, canWrite }: MeasurementTableProps) {
  const scale = useScale(at)
  const rows = [...measurements].sort((a, b) => QUANTITY_KEYS.indexOf(a.quantity) - QUANTITY_KEYS.indexOf(b.quantity) || b.source.year - a.source.year || a.id - b.id)
  return (
    <DataTable
      label={`Measurements of ${galaxy.designation}`}
      columns={columnsFor(galaxy, scale.data?.anchors ?? [], canWrite).filter(({ key, text }) => !LEFT_OUT_WHEN_EMPTY.includes(key) || rows.some((m) => text(m) !== null))}
      rows={rows}
      rowKey={(m) => String(m.id)}
      countText={`${rows.length} measurements`}
      fileName={`${galaxy.slug}-measurements`}
      empty={<EmptyState title="No measurements yet">Every approved value with its source will be listed here.</EmptyState>}
    />
  )
}

function columnsFor(galaxy: GalaxyAnswer, anchors: ScaleAnswer['anchors'], canWrite: boolean): DataColumn<MeasurementAnswer>[] {
  const reasons = new Map<number, Reason>(galaxy.adopted.flatMap((one) => one.reasons.map((reason): [number, Reason] => [reason.measurementId, reason])))
  const columns: DataColumn<MeasurementAnswer>[] = [
    { key: 'quantity', header: 'Quantity', text: (m) => quantity(m.quantity).label, sortable: true, width: 190 },
    { key: 'published', header: 'Published', text: publishedWords, width: 180, help: 'As the source gives it, in its own unit' },
    { key: 'method', header: 'Method', text: methodWords, sortable: true, width: 180 },
    { key: 'anchor', header: 'Anchor assumed', text: (m) => anchorWords(m, anchors), width: 210, help: 'The reference value that the distance hangs on, as its authors took it' },
    { key: 'source', header: 'Source', text: (m) => m.source.label, sortable: true, width: 180, render: (m) => <Link look="quiet" to={paths.source(m.source.id)}>{m.source.label}</Link> },
    { key: 'locator', header: 'Where in it', text: (m) => m.locator, width: 110 },
    { key: 'use', header: 'Use', text: (m) => wordsOfUse(m, reasons.get(m.id)), sortable: true, width: 220 },
    { key: 'note', header: 'Note', text: (m) => m.note, width: 180 },
    { key: 'revision', header: 'Revision', text: (m) => m.revision, decimals: 0, sortable: true, width: 90 },
  ]
  if (!canWrite) return columns
  return [
    ...columns,
    {
      key: 'change', header: 'Change', text: () => null, width: 150,
      render: (m) => (
        <span className="inline-flex gap-3">
          <Link to={changeAddress(galaxy, 'measurement.replace', m.id)} aria-label={`Mend the ${quantity(m.quantity).label.toLowerCase()} of ${m.source.label}`}>Mend</Link>
          {m.excludedReason === null ? (
            <Link to={changeAddress(galaxy, 'measurement.exclude', m.id)} aria-label={`Exclude the ${quantity(m.quantity).label.toLowerCase()} of ${m.source.label}`}>Exclude</Link>
          ) : (
            <Link to={changeAddress(galaxy, 'measurement.restore', m.id)} aria-label={`Restore the ${quantity(m.quantity).label.toLowerCase()} of ${m.source.label}`}>Restore</Link>
          )}
        </span>
      ),
    },
  ]
}

const CONVENTIONS = { true: 'true reddening', sfd: 'of the SFD map' } as const

function methodWords(m: MeasurementAnswer): string | null {
  if (m.method) return METHODS.find((method) => method.key === m.method)?.label ?? m.method
  return m.convention ? CONVENTIONS[m.convention] : null
}

function anchorWords(m: MeasurementAnswer, anchors: ScaleAnswer['anchors']): string | null {
  if (m.anchor === null) return null
  const label = anchors.find((anchor) => anchor.key === m.anchor)?.label ?? m.anchor
  return m.anchorValueAssumed === null ? `${label}, value not stated` : `${label} ${formatNumber(m.anchorValueAssumed, 3)}`
}

function wordsOfUse(m: MeasurementAnswer, reason: Reason | undefined): string {
  if (m.excludedReason !== null) return `excluded: ${m.excludedReason}`
  if (!reason) return 'not used'
  return reason.used ? `used, ${formatPercent(reason.weight)}` : reason.reason
}
