import { useEffect, useRef, useState } from 'react'
import { useNavigate } from 'react-router-dom'
import type { SubmissionAnswer, SubmissionSummary } from '../../../core/schema/submissions.ts'
import { movesScale } from '../../../core/schema/changes.ts'
import { useEffectOf } from '../../api/effect.ts'
import type { Decision } from '../../api/submissions.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { StateBadge } from '../../components/badge.tsx'
import { Button } from '../../components/button.tsx'
import { EffectView } from '../../components/curation/effect-view.tsx'
import { EffectWait } from '../../components/curation/effect-wait.tsx'
import { Remarks } from '../../components/curation/remarks.tsx'
import { Timeline } from '../../components/curation/timeline.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { notify } from '../../components/toast.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted, formatDayTime } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { ChangesOnBench } from './changes-on-bench.tsx'
import { DecisionForm } from './decision-form.tsx'

export type Verdict = Decision['verdict']

interface BenchProps {
  submission: SubmissionAnswer
  queue: readonly SubmissionSummary[]
  onReread: () => Promise<unknown>
}

/** One submission under review: what it changes, what that would do, what the checks say, and the decision. */
export function Bench({ submission, queue, onReread }: BenchProps) {
  const { id, items, may } = submission
  const navigate = useNavigate()
  const heading = useRef<HTMLHeadingElement>(null)
  const [verdict, setVerdict] = useState<Verdict | null>(null)
  const [at, setAt] = useState(0)
  const effect = useEffectOf(id, `${submission.lockVersion}`, submission.state === 'submitted' && items.length > 0)
  useDocumentTitle(`Review: ${submission.title}`)

  const place = queue.findIndex((s) => s.id === id)
  const goTo = (next: SubmissionSummary | undefined): void => {
    if (next) void navigate(paths.reviewOf(next.id))
  }
  const step = (by: 1 | -1): void => {
    const next = at + by
    if (next >= 0 && next < items.length) setAt(next)
    else goTo(queue[place + by])
  }
  const decide = (next: Verdict): void => setVerdict(next)
  const isReady = effect.data !== undefined

  useActions([
    { name: 'review.approve', label: 'Approve', keys: 'a', group: 'Review', when: may.review && isReady, perform: () => decide('approve') },
    { name: 'review.return', label: 'Return to its author', keys: 'r', group: 'Review', when: may.review, perform: () => decide('return') },
    { name: 'review.reject', label: 'Reject', keys: 'x', group: 'Review', when: may.review, perform: () => decide('reject') },
    { name: 'review.next', label: 'Next change, then next submission', keys: 'j', group: 'Review', keysOnly: true, perform: () => step(1) },
    { name: 'review.previous', label: 'Previous change, then previous submission', keys: 'k', group: 'Review', keysOnly: true, perform: () => step(-1) },
    { name: 'review.following', label: 'Next submission', keys: ']', group: 'Review', when: place >= 0 && place + 1 < queue.length, perform: () => goTo(queue[place + 1]) },
    { name: 'review.preceding', label: 'Previous submission', keys: '[', group: 'Review', when: place > 0, perform: () => goTo(queue[place - 1]) },
  ])

  // Coming here from another submission, readers begin at its title.
  useEffect(() => {
    heading.current?.focus({ preventScroll: true })
  }, [])

  const decided = (answer: SubmissionAnswer): void => {
    const rest = queue.filter((s) => s.id !== id)
    const next = rest[Math.min(Math.max(place, 0), rest.length - 1)]
    const what = answer.state === 'approved' ? `Approved as revision ${answer.revision ?? ''}.` : answer.state === 'returned' ? 'Returned to its author.' : 'Rejected.'
    notify(`${what} ${rest.length === 0 ? 'Nothing is left.' : `${rest.length} left.`}`, { tone: 'good', action: { label: 'Show it', onPress: () => void navigate(paths.submission(id)) } })
    setVerdict(null)
    void navigate(next ? paths.reviewOf(next.id) : paths.review)
  }

  return (
    <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
      <header>
        <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
          <h1 ref={heading} tabIndex={-1} className="min-w-0 text-xl tracking-[-0.01em] outline-none sm:text-2xl">{submission.title}</h1>
          {may.review && (
            <div className="flex flex-wrap gap-2.5">
              <Button keys="x" onPress={() => decide('reject')}>Reject</Button>
              <Button keys="r" onPress={() => decide('return')}>Return</Button>
              <Button kind="primary" keys="a" isDisabled={!isReady} onPress={() => decide('approve')}>Approve</Button>
            </div>
          )}
        </div>
        <p className="mt-1.5 flex flex-wrap items-center gap-x-2 text-muted figures">
          <StateBadge state={submission.state} />
          <span>by {submission.author.name}</span>
          {submission.submittedAt && <span>· {formatDayTime(submission.submittedAt)}</span>}
          <span>· {formatCounted(submission.changes, 'change')}</span>
          <span>· base revision {submission.baseRevision}</span>
          <span>· version {submission.version}</span>
        </p>
        {submission.summary && <p className="prose-measure mt-3 whitespace-pre-line">{submission.summary}</p>}
      </header>
      <WhyNot submission={submission} />
      {verdict && may.review && (
        <DecisionForm key={verdict} submission={submission} effect={effect.data} verdict={verdict} onClose={() => setVerdict(null)} onDecided={decided} onReread={onReread} />
      )}
      <ChangesOnBench items={items} at={at} onAt={setAt} />
      {submission.state === 'submitted' && (
        <Sheet title="Effect before approval" actions={effect.data && <span className="text-sm text-muted">on revision {effect.data.revision}</span>}>
          {effect.isError ? (
            <FailedState error={effect.error} onRetry={() => void effect.refetch()} safe="The submission waits on, and nothing was decided." />
          ) : effect.data ? (
            <EffectView effect={effect.data} ofScale={submission.actions.some(movesScale)} />
          ) : (
            <EffectWait progress={effect.progress} />
          )}
        </Sheet>
      )}
      {submission.overlaps.length > 0 && (
        <Sheet title="Also being changed">
          <ul className="grid gap-2">
            {submission.overlaps.map((o) => (
              <li key={`${o.submission} ${o.subject}`}>
                <Link to={paths.reviewOf(o.submission)}>{o.title}</Link> <span className="text-muted">{o.subject}</span>
              </li>
            ))}
          </ul>
        </Sheet>
      )}
      <div className="grid items-start gap-5 xl:grid-cols-2">
        <Sheet title="Remarks"><Remarks submission={submission} /></Sheet>
        <Sheet title="What happened"><Timeline entries={submission.timeline} /></Sheet>
      </div>
    </div>
  )
}

/** Where a decision is not this reader's to take, the reason. */
function WhyNot({ submission }: { submission: SubmissionAnswer }) {
  const { mayNot, state, revision, decidedBy, decisionNote } = submission
  const settled =
    state === 'approved' ? `Approved as revision ${revision ?? ''}${decidedBy ? ` by ${decidedBy}` : ''}.`
    : state === 'submitted' ? null
    : state === 'draft' ? 'This is a draft: there is nothing to decide before it is submitted.'
    : `This submission was ${state}${decidedBy ? ` by ${decidedBy}` : ''}: there is nothing to decide now.`
  const words = mayNot ?? settled
  if (words === null) return null
  return (
    <div className="rounded-md border border-line bg-well px-4 py-3">
      <p className="font-semibold">{words}</p>
      {decisionNote && <p className="prose-measure mt-1 whitespace-pre-line">{decisionNote}</p>}
    </div>
  )
}
