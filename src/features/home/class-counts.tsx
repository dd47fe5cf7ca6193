import type { Summary } from '../../../core/schema/catalogue.ts'
import { classLabel } from '../../../core/classes.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import { Link } from '../../components/link.tsx'
import { formatCount } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

/** How many galaxies of each class, the most first, as bars that lead to the table. */
export function ClassCounts({ counts }: { counts: Summary['byClass'] }) {
  const sorted = counts.filter((entry) => entry.count > 0).sort((a, b) => b.count - a.count)
  const most = sorted[0]?.count ?? 1
  return (
    <ul>
      {sorted.map((entry) => (
        <li key={entry.class} className="grid min-h-8 grid-cols-[11rem_1fr_3rem] items-center gap-3">
          <Link look="quiet" to={withQuery(paths.galaxies, { class: entry.class })} className="flex min-h-6 items-center gap-2">
            <span aria-hidden className="flex">
              <ClassMark galaxyClass={entry.class} />
            </span>
            {classLabel(entry.class)}
          </Link>
          <span aria-hidden className="h-1.5 rounded-full bg-line">
            <span className="block h-full rounded-full bg-ink/70" style={{ width: `${Math.max(1, (100 * entry.count) / most)}%` }} />
          </span>
          <span className="figures text-right">{formatCount(entry.count)}</span>
        </li>
      ))}
    </ul>
  )
}
