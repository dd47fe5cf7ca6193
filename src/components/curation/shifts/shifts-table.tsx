import type { Effect } from '../../../../core/schema/submissions.ts'
import { distanceAfter, shiftInErrors, shiftOf } from '../../../../core/shifts.ts'
import { formatSigned } from '../../../lib/format.ts'
import { paths } from '../../../paths.ts'
import type { DataColumn } from '../../data-column.ts'
import { DataTable } from '../../data-table.tsx'
import { Link } from '../../link.tsx'
import { namesIn } from '../effect-words.ts'
import { methodLabel, type ShiftRow } from './shift-words.ts'

/** Exactly which galaxies move, and by how much. */
export function ShiftsTable({ shifts, effect }: { shifts: readonly ShiftRow[]; effect: Effect }) {
  return (
    <DataTable
      label="Galaxies that move"
      columns={columnsFor(effect)}
      rows={shifts}
      rowKey={(s) => s.slug}
      countText={shifts.length < effect.counts.distancesMoved ? `${shifts.length} of ${effect.counts.distancesMoved} that move` : undefined}
      fileName="shifts"
      maxHeight="34rem"
    />
  )
}

function columnsFor(effect: Effect): DataColumn<ShiftRow>[] {
  const names = namesIn(effect)
  const hosts = new Map(effect.galaxies.flatMap((g) => {
    const change = g.changes.find((c) => c.column === 'host')
    return change ? [[g.slug, change] as const] : []
  }))
  const host = (slug: string, when: 'before' | 'after'): string | null => {
    const change = hosts.get(slug)
    if (!change) return null
    return change[when] === null ? 'none' : (names.get(String(change[when])) ?? String(change[when]))
  }
  return [
    { key: 'name', header: 'Galaxy', text: (s) => s.name, sortable: true, width: 210, render: (s) => <Link look="quiet" to={paths.galaxy(s.slug)}>{s.name}</Link> },
    { key: 'method', header: 'Method', text: (s) => methodLabel(s.method), sortable: true, width: 170 },
    { key: 'before', header: 'μ before', unit: 'mag', text: (s) => s.before, decimals: 3, sortable: true, width: 140 },
    { key: 'after', header: 'μ after', unit: 'mag', text: (s) => s.after, decimals: 3, sortable: true, width: 140 },
    { key: 'shift', header: 'Δμ', unit: 'mag', text: (s) => Number(shiftOf(s).toFixed(6)), decimals: 3, sortable: true, width: 90, render: (s) => <strong className="font-semibold">{formatSigned(shiftOf(s), 3)}</strong> },
    { key: 'errors', header: 'Δμ/σ', text: (s) => shiftInErrors(s), decimals: 2, sortable: true, width: 80, help: 'The shift in units of the error that the modulus has, both parts', render: (s) => formatSigned(shiftInErrors(s), 2) },
    { key: 'distance', header: 'D before', unit: 'Mpc', text: (s) => s.distance, decimals: 3, sortable: true, width: 140 },
    { key: 'distanceAfter', header: 'D after', unit: 'Mpc', text: distanceAfter, decimals: 3, sortable: true, width: 140 },
    { key: 'hostBefore', header: 'Host before', text: (s) => host(s.slug, 'before'), sortable: true, width: 140, help: 'Only where it changes' },
    { key: 'hostAfter', header: 'Host after', text: (s) => host(s.slug, 'after'), sortable: true, width: 140, help: 'Only where it changes' },
  ]
}
