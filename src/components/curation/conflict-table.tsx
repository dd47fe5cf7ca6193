import type { Conflict } from '../../../core/problem.ts'
import { ScrollAcross } from '../scroll-across.tsx'

/** Where the ground moved under a change: what it was made from, what holds now and by whom, what it proposes. */
export function ConflictTable({ conflicts }: { conflicts: readonly Conflict[] }) {
  const words = (value: Conflict['base']): string => (value === null ? 'nothing' : String(value))
  return (
    <ScrollAcross label="Conflicts" className="mt-4 rounded-md border border-caution bg-caution-soft p-3">
      <p className="font-semibold">The catalogue has moved on since this was written</p>
      <table className="mt-2 w-full border-collapse figures text-sm">
        <thead className="text-left">
          <tr>
            <th scope="col" className="pr-3 font-semibold">field</th>
            <th scope="col" className="px-3 font-semibold">it was</th>
            <th scope="col" className="px-3 font-semibold">it is now</th>
            <th scope="col" className="px-3 font-semibold">proposed</th>
            <th scope="col" className="px-3 font-semibold">moved by</th>
          </tr>
        </thead>
        <tbody>
          {conflicts.map((c) => (
            <tr key={`${c.change} ${c.field}`}>
              <th scope="row" className="py-1 pr-3 text-left font-normal">{c.field}</th>
              <td className="px-3 py-1">{words(c.base)}</td>
              <td className="px-3 py-1 font-semibold">{words(c.theirs)}</td>
              <td className="px-3 py-1">{words(c.yours)}</td>
              <td className="px-3 py-1">{[c.by, c.revision === null ? null : `revision ${c.revision}`].filter(Boolean).join(', ') || 'unknown'}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollAcross>
  )
}
