import { useState } from 'react'
import { useNavigate, useParams, useSearchParams } from 'react-router-dom'
import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { movesScale } from '../../../core/schema/changes.ts'
import { useEffectOf } from '../../api/effect.ts'
import { useDeleteSubmission, useSubmission, useTransition } from '../../api/submissions.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { StateBadge } from '../../components/badge.tsx'
import { Button } from '../../components/button.tsx'
import { EffectView } from '../../components/curation/effect-view.tsx'
import { EffectWait } from '../../components/curation/effect-wait.tsx'
import { Remarks } from '../../components/curation/remarks.tsx'
import { Timeline } from '../../components/curation/timeline.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { FailedState, ProblemNote } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { notify } from '../../components/toast.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { AddChange } from './add-change.tsx'
import { ChangeList } from './change-list.tsx'
import { SummaryEditor } from './summary-editor.tsx'

/** One submission: its changes, what they would do, what the checks say, and the next step. */
export default function SubmissionPage() {
  const { id = '' } = useParams()
  const query = useSubmission(id)
  useDocumentTitle(query.data?.title ?? 'Submission')
  const crumbs = [{ label: 'Submissions', href: paths.submissions }]
  if (query.isError) {
    return (
      <div className="page">
        <PageHeader title="Submission" breadcrumbs={crumbs} />
        <FailedState error={query.error} onRetry={() => void query.refetch()} />
      </div>
    )
  }
  if (!query.data) {
    return (
      <div className="page">
        <PageHeader title="Submission" breadcrumbs={crumbs} />
        <Skeleton height={420} />
      </div>
    )
  }
  return <SubmissionView key={query.data.id} submission={query.data} />
}

function SubmissionView({ submission }: { submission: SubmissionAnswer }) {
  const [search, setSearch] = useSearchParams()
  const adding = search.get('add')
  const { may } = submission
  return (
    <div className="page">
      <PageHeader
        title={submission.title}
        aside={`${formatCounted(submission.changes, 'change')} · made at revision ${submission.baseRevision}`}
        breadcrumbs={[{ label: 'Submissions', href: paths.submissions }]}
        chips={<StateBadge state={submission.state} />}
        actions={<Moves submission={submission} />}
      />
      {submission.state === 'returned' && submission.decisionNote && (
        <div className="mb-5 rounded-md border border-caution bg-caution-soft px-4 py-3">
          <p className="font-semibold">Returned{submission.decidedBy ? ` by ${submission.decidedBy}` : ''}</p>
          <p className="prose-measure whitespace-pre-line">{submission.decisionNote}</p>
        </div>
      )}
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-5 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
          {may.edit ? <SummaryEditor submission={submission} /> : submission.summary && <Sheet title="Summary"><p className="prose-measure whitespace-pre-line">{submission.summary}</p></Sheet>}
          <ChangeList submission={submission} />
          {may.edit && <AddChange submission={submission} action={adding} onAction={(action) => setSearch(action ? { add: action } : {}, { replace: true })} />}
          <EffectSheet submission={submission} />
        </div>
        <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
          {submission.overlaps.length > 0 && (
            <Sheet title="Also being changed">
              <ul className="grid gap-2">
                {submission.overlaps.map((o) => (
                  <li key={`${o.submission} ${o.subject}`}>
                    <Link to={paths.submission(o.submission)}>{o.title}</Link>
                    <span className="block text-sm text-muted">{o.subject}</span>
                  </li>
                ))}
              </ul>
            </Sheet>
          )}
          <Sheet title="Remarks"><Remarks submission={submission} /></Sheet>
          <Sheet title="What happened"><Timeline entries={submission.timeline} /></Sheet>
        </div>
      </div>
    </div>
  )
}

function EffectSheet({ submission }: { submission: SubmissionAnswer }) {
  const open = ['draft', 'submitted', 'returned'].includes(submission.state)
  const effect = useEffectOf(submission.id, `${submission.lockVersion}`, open && submission.changes > 0)
  if (!open) {
    return submission.revision === null ? null : (
      <Sheet title="Effect">
        <p>Approved as revision {submission.revision}.</p>
      </Sheet>
    )
  }
  return (
    <Sheet title="Effect if approved">
      {submission.changes === 0 ? (
        <p className="text-muted">The effect on the catalogue appears here with the first change.</p>
      ) : effect.isError ? (
        <FailedState error={effect.error} onRetry={() => void effect.refetch()} safe="The draft is safe." />
      ) : effect.data ? (
        <EffectView effect={effect.data} ofScale={submission.actions.some(movesScale)} />
      ) : (
        <EffectWait progress={effect.progress} />
      )}
    </Sheet>
  )
}

/** Submit, withdraw, delete: what the author may do now. */
function Moves({ submission }: { submission: SubmissionAnswer }) {
  const { may, lockVersion } = submission
  const navigate = useNavigate()
  const move = useTransition(submission.id)
  const remove = useDeleteSubmission()
  const [asking, setAsking] = useState(false)
  const submit = (): void => move.mutate({ event: 'submit', lockVersion }, { onSuccess: () => notify('Submitted. An approver will see it in the queue.', { tone: 'good' }) })
  useActions([{ name: 'submission.submit', label: 'Submit for review', keys: 'mod+Enter', group: 'Submission', when: may.submit && submission.changes > 0, perform: submit }])
  return (
    <>
      {may.review && <Link look="button" to={paths.reviewOf(submission.id)}>Review</Link>}
      {may.remove && <Button onPress={() => setAsking(true)}>Delete the draft</Button>}
      {may.withdraw && <Button isPending={move.isPending} onPress={() => move.mutate({ event: 'withdraw', lockVersion })}>Withdraw</Button>}
      {may.submit && <Button kind="primary" isDisabled={submission.changes === 0} isPending={move.isPending} onPress={submit}>Submit for review</Button>}
      {move.isError && <div className="basis-full"><ProblemNote error={move.error} /></div>}
      <Dialog
        title="Delete this draft?"
        role="alertdialog"
        size="small"
        isOpen={asking}
        onOpenChange={setAsking}
        footer={
          <>
            <Button onPress={() => setAsking(false)}>Keep it</Button>
            <Button kind="danger" isPending={remove.isPending} onPress={() => remove.mutate(submission.id, { onSuccess: () => void navigate(paths.submissions) })}>Delete</Button>
          </>
        }
      >
        <p>Its {formatCounted(submission.changes, 'change')} and remarks go with it. The catalogue itself is not touched.</p>
        {remove.isError && <ProblemNote error={remove.error} />}
      </Dialog>
    </>
  )
}
