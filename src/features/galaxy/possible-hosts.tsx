import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { Link } from '../../components/link.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { formatNumber } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

/** Whose satellite the galaxy may be, its distance and theirs being as uncertain as they are. */
export function PossibleHosts({ galaxy, at }: { galaxy: GalaxyAnswer; at: string | null }) {
  if (galaxy.possibleHosts.length === 0) return null
  const bound = galaxy.possibleHosts.reduce((sum, h) => sum + h.probability, 0)
  const rows = [...galaxy.possibleHosts, { slug: '', name: 'nobody: in the field', probability: Math.max(0, 1 - bound) }]
  return (
    <Sheet title="Possible hosts">
      <ul>
        {rows.map((h) => (
          <li key={h.slug} className="border-b border-line px-2.5 py-1.5 last:border-b-0">
            <div className="flex items-baseline justify-between gap-4">
              {h.slug === '' ? <span className="text-muted">{h.name}</span> : <Link look="quiet" to={withQuery(paths.galaxy(h.slug), { at })}>{h.name}</Link>}
              <span className="figures">{formatNumber(h.probability, 2)}</span>
            </div>
            <div aria-hidden className="mt-1 h-1 bg-well"><div className={`h-1 ${h.slug === '' ? 'bg-edge' : 'bg-accent'}`} style={{ width: `${(100 * h.probability).toFixed(1)}%` }} /></div>
          </li>
        ))}
      </ul>
      <p className="mt-2 text-xs text-muted">Fraction of draws from the distance errors in which it is a satellite of each; the error of the common scale moves all alike.</p>
    </Sheet>
  )
}
