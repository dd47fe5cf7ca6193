import { columnOf } from '../../../core/columns.ts'
import type { Effect } from '../../../core/schema/submissions.ts'
import { formatCounted, formatNumber, formatSigned, unitText } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { Link } from '../link.tsx'
import { Missing } from '../measure.tsx'

type Value = Effect['galaxies'][number]['changes'][number]['before']

/** So many galaxies are listed one by one; of the rest only the count is said. */
const LISTED = 60

/** What approving would do: every adopted and derived value that would differ, before beside after. */
export function EffectView({ effect }: { effect: Effect }) {
  const { counts } = effect
  if (effect.galaxies.length === 0 && effect.systems.length === 0) {
    return <p className="text-muted">No adopted or derived value would change.</p>
  }
  const listed = effect.galaxies.slice(0, LISTED)
  return (
    <div>
      <p className="mb-3">{sentence(counts)}</p>
      <div className="overflow-x-auto">
        <table className="w-full min-w-[36rem] border-collapse figures">
          <thead className="text-left text-sm text-muted">
            <tr className="border-b border-line">
              <th scope="col" className="py-1.5 pr-3 font-semibold">galaxy</th>
              <th scope="col" className="px-3 py-1.5 font-semibold">value</th>
              <th scope="col" className="px-3 py-1.5 text-right font-semibold">before</th>
              <th scope="col" className="px-3 py-1.5 text-right font-semibold">after</th>
              <th scope="col" className="py-1.5 pl-3 text-right font-semibold">shift</th>
            </tr>
          </thead>
          <tbody>
            {listed.flatMap((g) =>
              g.changes.map((c, i) => (
                <tr key={`${g.slug} ${c.column}`} className="border-b border-line">
                  <th scope="row" className="py-1.5 pr-3 text-left font-normal">
                    {i === 0 ? (
                      <>
                        {g.kind === 'added' ? g.name : <Link to={paths.galaxy(g.slug)} look="quiet">{g.name}</Link>}
                        {g.kind === 'added' && <span className="ml-2 text-sm text-accent">new</span>}
                      </>
                    ) : (
                      <span className="sr-only">{g.name}</span>
                    )}
                  </th>
                  <td className="px-3 py-1.5 text-muted">{c.label}</td>
                  <td className="px-3 py-1.5 text-right">{c.before === null ? <Missing /> : <del className="text-muted">{words(c.column, c.before, c.unit)}</del>}</td>
                  <td className="px-3 py-1.5 text-right font-semibold">{c.after === null ? <Missing /> : words(c.column, c.after, c.unit)}</td>
                  <td className="py-1.5 pl-3 text-right">{shift(c.column, c.before, c.after)}</td>
                </tr>
              )),
            )}
            {effect.systems.map((s) => (
              <tr key={`system ${s.slug}`} className="border-b border-line">
                <th scope="row" className="py-1.5 pr-3 text-left font-normal">{s.name} system</th>
                <td className="px-3 py-1.5 text-muted">
                  satellites
                  <span className="block text-sm">
                    {s.gained.length > 0 && `gains ${s.gained.join(', ')}`}
                    {s.gained.length > 0 && s.lost.length > 0 && '; '}
                    {s.lost.length > 0 && `loses ${s.lost.join(', ')}`}
                  </span>
                </td>
                <td className="px-3 py-1.5 text-right"><del className="text-muted">{s.before}</del></td>
                <td className="px-3 py-1.5 text-right font-semibold">{s.after}</td>
                <td className="py-1.5 pl-3 text-right">{formatSigned(s.after - s.before, 0)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {effect.galaxies.length > LISTED && <p className="mt-3 text-muted">and {formatCounted(effect.galaxies.length - LISTED, 'more galaxy', 'more galaxies')}.</p>}
    </div>
  )
}

function sentence(counts: Effect['counts']): string {
  const parts = [
    counts.measurements > 0 && formatCounted(counts.measurements, 'measurement'),
    counts.galaxiesAdded > 0 && `${formatCounted(counts.galaxiesAdded, 'galaxy', 'galaxies')} added`,
    counts.galaxiesChanged > 0 && `${formatCounted(counts.galaxiesChanged, 'galaxy', 'galaxies')} changed`,
    counts.hostsChanged > 0 && `${formatCounted(counts.hostsChanged, 'galaxy', 'galaxies')} with another host`,
  ].filter((p): p is string => p !== false)
  return parts.length === 0 ? 'Nothing would change.' : `${parts.join(', ')}.`
}

function words(column: string, value: Value, unit: string): string {
  if (typeof value !== 'number') return String(value)
  const text = formatNumber(value, columnOf(column)?.decimals ?? 2)
  return unit ? `${text}\u202f${unitText(unit)}` : text
}

function shift(column: string, before: Value, after: Value): string {
  return typeof before === 'number' && typeof after === 'number' ? formatSigned(after - before, columnOf(column)?.decimals ?? 2) : ''
}
