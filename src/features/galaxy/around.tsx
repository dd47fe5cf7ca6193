import { GAP } from '../../../core/spaces.ts'
import { classLabel, GALAXY_CLASSES } from '../../../core/classes.ts'
import { columnOf } from '../../../core/columns.ts'
import { METHODS } from '../../../core/methods.ts'
import type { GalaxyAnswer, History } from '../../../core/schema/catalogue.ts'
import { useHistory, useNeighbours } from '../../api/galaxies.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { formatDay, formatNumber, MISSING } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

/** Every designation, the preferred one first. */
export function Names({ galaxy }: { galaxy: GalaxyAnswer }) {
  return (
    <Sheet title="Names">
      <ul>
        {galaxy.names.map((name) => (
          <li key={name.name} className="flex items-baseline justify-between gap-4 border-b border-line px-2.5 py-1.5 last:border-b-0">
            <span className={name.preferred ? 'font-semibold' : undefined}>{name.name}</span>
            <span className="text-xs text-muted">{name.preferred ? 'preferred' : (name.source ?? '')}</span>
          </li>
        ))}
      </ul>
    </Sheet>
  )
}

/** The nearest galaxies in three dimensions. */
export function Neighbours({ slug, at }: { slug: string; at: string | null }) {
  const query = useNeighbours(slug, at)
  const found = query.data?.neighbours
  return (
    <Sheet title="Neighbours">
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} />}
      {query.isPending && <Skeleton lines={6} />}
      {found?.length === 0 && <p className="text-muted">Neighbours need a distance: none is adopted yet.</p>}
      {found && found.length > 0 && (
        <ul>
          {found.map((n) => (
            <li key={n.slug} className="flex items-baseline justify-between gap-4 border-b border-line px-2.5 py-1.5 last:border-b-0">
              <Link look="quiet" to={withQuery(paths.galaxy(n.slug), { at })} className="inline-flex items-center gap-2">
                <ClassMark galaxyClass={n.class} />
                {n.name}
              </Link>
              <span className="figures whitespace-nowrap">
                {`${formatNumber(n.separation, 0)}${GAP}kpc`}
              </span>
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  )
}

/** What changed of the galaxy, revision by revision, newest first. */
export function GalaxyHistory({ slug, mayReadAny }: { slug: string; mayReadAny: boolean }) {
  const query = useHistory(slug)
  return (
    <Sheet title="History">
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} />}
      {query.isPending && <Skeleton lines={4} />}
      <ol className="grid gap-4">
        {query.data?.entries.map((entry) => (
          <li key={entry.revision} className="border-l-2 border-line pl-3">
            <p>
              <strong className="font-semibold">{entry.summary}</strong>
            </p>
            <p className="figures text-xs text-muted">{[`revision ${entry.revision}`, formatDay(entry.at), entry.by, entry.release && `first in release ${entry.release}`].filter(Boolean).join(' · ')}</p>
            <Changes changes={entry.changes} />
            <p className="mt-1 flex flex-wrap gap-x-4 text-xs">
              {(mayReadAny || entry.release) && <Link to={withQuery(paths.galaxy(slug), { at: mayReadAny ? entry.revision : entry.release })}>As it was then</Link>}
              {entry.submission !== null && mayReadAny && <Link to={paths.submission(entry.submission)}>The submission</Link>}
            </p>
          </li>
        ))}
      </ol>
    </Sheet>
  )
}

function Changes({ changes }: { changes: History['entries'][number]['changes'] }) {
  // What was there before nothing was: the first entry says only what the galaxy began with.
  const told = changes.filter(({ column }) => columnOf(column) && !['slug', 'ra', 'dec', 'updated_at', 'revision'].includes(column))
  if (told.length === 0) return null
  return (
    <ul className="mt-1 text-xs">
      {told.map(({ column, before, after }) => (
        <li key={column} className="figures">
          <span className="text-muted">{columnOf(column)?.label}: </span>
          {before === null ? shown(column, after) : `${shown(column, before)} → ${shown(column, after)}`}
        </li>
      ))}
    </ul>
  )
}

function shown(column: string, value: string | number | null): string {
  if (value === null) return MISSING
  const found = columnOf(column)
  if (typeof value === 'number') return `${formatNumber(value, found?.decimals ?? 2)}${found?.unit ? GAP + found.unit : ''}`
  if (column === 'class') return classLabel(GALAXY_CLASSES.find((one) => one === value) ?? 'unknown')
  return METHODS.find((method) => column === 'distance_method' && method.key === value)?.label ?? value
}
