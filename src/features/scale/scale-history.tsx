import type { ScaleHistory } from '../../../core/schema/scale.ts'
import { useScaleHistory } from '../../api/scale.ts'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { ScrollAcross } from '../../components/scroll-across.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { formatDayTime } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'
import { useCan } from '../../api/session.ts'

/** How the scale came to be: who changed what, and when. */
export function ScaleHistoryList({ at }: { at: string | null }) {
  const query = useScaleHistory(at)
  return (
    <section className="min-w-0">
      <SectionHeading>How it came to be</SectionHeading>
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />}
      {query.isPending && <Skeleton lines={4} />}
      {query.data && (
        <ol className="grid grid-cols-[minmax(0,1fr)] gap-4">
          {query.data.entries.map((entry) => <Entry key={entry.revision} entry={entry} />)}
        </ol>
      )}
    </section>
  )
}

function Entry({ entry }: { entry: ScaleHistory['entries'][number] }) {
  const mayReadAny = useCan('catalogue.read-current')
  return (
    <li className="rounded-lg border border-line bg-sheet px-4 py-3">
      <p className="flex flex-wrap items-baseline gap-x-3">
        {entry.submission === null ? <span className="font-semibold">{entry.summary}</span> : <Link to={paths.submission(entry.submission)}>{entry.summary}</Link>}
        <span className="text-sm text-muted">
          {mayReadAny ? <Link look="quiet" to={withQuery(paths.scale, { at: entry.revision })}>revision {entry.revision}</Link> : `revision ${entry.revision}`}
          {` · ${formatDayTime(entry.at)}`}
          {entry.by && ` · approved by ${entry.by}`}
        </span>
      </p>
      <ScrollAcross label={`What revision ${entry.revision} changed`}>
        <table className="mt-2 border-collapse figures text-sm">
          <tbody>
            {entry.changes.map((c) => (
              <tr key={`${c.subject} ${c.field}`}>
                <th scope="row" className="py-0.5 pr-4 text-left font-normal text-muted">{c.subject}</th>
                <td className="py-0.5 pr-4">{c.field}</td>
                <td className="py-0.5">
                  {c.before !== null && <><del className="text-muted">{c.before}</del> → </>}
                  {c.after === null ? <span className="text-muted">none</span> : c.before === null ? c.after : <strong className="font-semibold">{c.after}</strong>}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollAcross>
    </li>
  )
}
