import { ChevronDown } from 'lucide-react'
import { useState } from 'react'
import { NavLink } from 'react-router-dom'
import type { SubmissionSummary } from '../../../core/schema/submissions.ts'
import { Badge } from '../../components/badge.tsx'
import { classNames } from '../../lib/class-names.ts'
import { formatAge, formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'

/** What waits for this reader, the oldest first. Folds into one line above the bench on narrow screens. */
export function Queue({ queue, open }: { queue: readonly SubmissionSummary[]; open: string }) {
  const [unfolded, setUnfolded] = useState(false)
  const heading = `Waiting, ${queue.length}`
  return (
    <nav aria-label="Submissions that wait" className="lg:sticky lg:top-20">
      <h2 className="mb-3 hidden text-lg lg:block">{heading}</h2>
      <button
        type="button"
        aria-expanded={unfolded}
        onClick={() => setUnfolded(!unfolded)}
        className="flex min-h-10 w-full items-center justify-between rounded-md border border-edge bg-sheet px-4 font-serif text-base font-semibold lg:hidden"
      >
        {heading}
        <ChevronDown size={18} aria-hidden className={classNames('text-muted', unfolded && 'rotate-180')} />
      </button>
      <ol className={classNames('gap-2.5 lg:grid lg:max-h-[calc(100dvh-9rem)] lg:overflow-y-auto lg:p-0.5', unfolded ? 'mt-3 grid' : 'hidden')}>
        {queue.length === 0 && <li className="text-muted">Nothing waits for you.</li>}
        {queue.map((s) => {
          const isOpen = String(s.id) === open
          return (
            <li key={s.id}>
              <NavLink
                to={paths.reviewOf(s.id)}
                aria-current={isOpen ? 'page' : undefined}
                onClick={() => setUnfolded(false)}
                className={classNames('block rounded-lg border bg-sheet px-4 py-3 text-ink no-underline hover:border-ink', isOpen ? 'border-accent' : 'border-line')}
              >
                <span className="block leading-snug font-semibold">{s.title}</span>
                <span className="block text-sm text-muted">
                  {s.author.name} · {formatAge(s.submittedAt)}
                </span>
                <span className="mt-0.5 flex flex-wrap gap-x-3 text-sm">
                  <span className="text-muted">{formatCounted(s.changes, 'change')}</span>
                  {s.cautions > 0 && <Badge tone="caution" shape="mark">{formatCounted(s.cautions, 'caution')}</Badge>}
                  {s.conflicts > 0 && <Badge tone="stop" shape="cross">{formatCounted(s.conflicts, 'conflict')}</Badge>}
                </span>
              </NavLink>
            </li>
          )
        })}
      </ol>
    </nav>
  )
}
