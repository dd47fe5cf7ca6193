import type { ReactNode } from 'react'
import { GALAXY_CLASSES } from '../../../core/classes.ts'
import type { Summary } from '../../../core/schema/catalogue.ts'
import { useSession } from '../../api/session.ts'
import { useSummary } from '../../api/summary.ts'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatAge, formatCount, formatDay } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { ClassCounts } from './class-counts.tsx'
import { SkyInvitation } from './sky-invitation.tsx'

/** The catalogue at a glance. */
export default function HomePage() {
  useDocumentTitle('')
  const summary = useSummary()
  const session = useSession()
  const { user } = session
  // What is shown depends on who reads: nothing is filled in before that is known, so that nothing moves.
  const ready = session.state === 'loading' ? undefined : summary.data
  return (
    <div className="page">
      <PageHeader
        title="The galaxies next door"
        intro="Distances, motions and systems of the galaxies within about 11 Mpc: every value with its source, every adopted value with its reasons."
      />
      {summary.isError ? (
        <FailedState error={summary.error} onRetry={() => void summary.refetch()} title="The catalogue cannot be read just now" safe="Nothing is lost. Files of earlier releases that you downloaded stay valid." />
      ) : summary.data?.galaxies === 0 ? (
        <EmptyState title="An empty catalogue" action={<Link look="primary" to={user ? paths.newSubmission : paths.signInFrom(paths.newSubmission)}>{user ? 'New submission' : 'Sign in to begin'}</Link>}>
          Galaxies will be here with their distances, hosts and sources. Begin with a submission: a galaxy, or a paper’s whole table.
        </EmptyState>
      ) : (
        <Glance summary={ready} signedIn={user !== null} />
      )}
    </div>
  )
}

const RECENT_SHOWN = 5
/** Two lines of text and the rule below, px. */
const LINE_HEIGHT = 59

function Glance({ summary, signedIn }: { summary: Summary | undefined; signedIn: boolean }) {
  return (
    <div className="grid gap-6 lg:grid-cols-[minmax(0,1.7fr)_minmax(0,1fr)]">
      <div className="flex min-w-0 flex-col gap-6">
        <SkyInvitation />
        <div className="grid gap-6 md:grid-cols-2">
          <Sheet title="What changed lately">
            <Room height={RECENT_SHOWN * LINE_HEIGHT}>{summary && <Recent recent={summary.recent.slice(0, RECENT_SHOWN)} />}</Room>
          </Sheet>
          {signedIn ? (
            <Sheet title="Waiting for you">
              <Room height={2 * LINE_HEIGHT}>{summary && <Waiting waiting={summary.waiting} />}</Room>
            </Sheet>
          ) : (
            <NewestRelease summary={summary} />
          )}
        </div>
      </div>
      <div className="flex min-w-0 flex-col gap-6">
        <Sheet>
          <dl className="grid grid-cols-2 gap-x-6 gap-y-4">
            <Figure label="galaxies" value={summary?.galaxies} to={paths.galaxies} />
            <Figure label="hosts" value={summary?.hosts} to={paths.hosts} />
            <Figure label="measurements" value={summary?.measurements} />
            <Figure label="sources" value={summary?.sources} to={paths.sources} />
          </dl>
        </Sheet>
        <Sheet title="By class">{summary ? <ClassCounts counts={summary.byClass} /> : <Skeleton lines={GALAXY_CLASSES.length} />}</Sheet>
        {signedIn && <NewestRelease summary={summary} />}
      </div>
    </div>
  )
}

/** Room for what comes, so that nothing below moves when it is there. */
function Room({ height, children }: { height: number; children: ReactNode }) {
  return <div style={{ minHeight: height }}>{children ?? <Skeleton height={height} />}</div>
}

const RELEASE_HEIGHT = 124

function NewestRelease({ summary }: { summary: Summary | undefined }) {
  return (
    <Sheet title="Newest release">
      <Room height={RELEASE_HEIGHT}>{summary && <Release release={summary.release} />}</Room>
    </Sheet>
  )
}

function Figure({ label, value, to }: { label: string; value: number | undefined; to?: string }) {
  return (
    <div className="flex flex-col-reverse">
      <dt className="text-muted">{to ? <Link look="quiet" to={to} className="text-muted">{label}</Link> : label}</dt>
      <dd className="figures min-h-10 font-serif text-2xl">{value === undefined ? '' : formatCount(value)}</dd>
    </div>
  )
}

function Line({ children, aside }: { children: ReactNode; aside: ReactNode }) {
  return (
    <li className="flex min-h-9 items-baseline justify-between gap-4 border-b border-line py-2">
      <span className="min-w-0">{children}</span>
      <span className="figures shrink-0 text-xs text-muted">{aside}</span>
    </li>
  )
}

function Recent({ recent }: { recent: Summary['recent'] }) {
  if (recent.length === 0) return <p className="text-muted">Every approval makes one revision and is listed here.</p>
  return (
    <ul>
      {recent.map((entry) => (
        <Line key={entry.revision} aside={formatAge(entry.at)}>
          {entry.summary}
          <span className="block text-xs text-muted">{`revision ${entry.revision}${entry.by ? `, ${entry.by}` : ''}`}</span>
        </Line>
      ))}
    </ul>
  )
}

function Waiting({ waiting }: { waiting: Summary['waiting'] }) {
  if (waiting.length === 0) return <p className="text-muted">Nothing waits for you. What is returned to you, or submitted for your review, will be here.</p>
  return (
    <ul>
      {waiting.map((entry) => (
        <Line key={entry.submission} aside={formatAge(entry.since)}>
          <Link look="quiet" to={paths.submission(entry.submission)}>
            {entry.title}
          </Link>
          <span className="block text-xs text-muted">{entry.why}</span>
        </Line>
      ))}
    </ul>
  )
}

function Release({ release }: { release: Summary['release'] }) {
  if (!release) return <p className="text-muted">No release yet. The first one will be here to download and cite.</p>
  return (
    <>
      <p className="font-serif text-lg">
        <Link look="quiet" to={paths.release(release.label)}>
          {release.label}
        </Link>
      </p>
      <p>{release.title}</p>
      <p className="figures mt-1 text-xs text-muted">{`${formatDay(release.publishedAt)}, revision ${release.revision}`}</p>
      <p className="mt-3">
        <Link to={paths.release(release.label)}>Download and cite</Link>
      </p>
    </>
  )
}
