import { Navigate, useParams } from 'react-router-dom'
import { useCan, useSession } from '../../api/session.ts'
import { useSubmission, useSubmissions } from '../../api/submissions.ts'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { paths } from '../../paths.ts'
import { Bench } from './bench.tsx'
import { Queue } from './queue.tsx'

/** The approver's queue, and the bench on which one submission lies. Without an id the oldest that waits is on the bench. */
export default function ReviewPage() {
  const { id } = useParams()
  const mayReview = useCan('submission.review')
  const session = useSession()
  useDocumentTitle('Review')
  if (session.state === 'loading') return <Waiting />
  if (!mayReview) {
    return (
      <div className="page">
        <PageHeader title="Review" />
        <EmptyState title="Reviewing is for approvers and stewards" action={session.user ? <Link look="button" to={paths.submissions}>Submissions</Link> : <Link look="primary" to={paths.signInFrom(id ? paths.reviewOf(id) : paths.review)}>Sign in</Link>}>
          Here somebody other than the author decides on what curators propose.
        </EmptyState>
      </div>
    )
  }
  return <Desk id={id} />
}

function Waiting() {
  return (
    <div className="page">
      <PageHeader title="Review" />
      <Skeleton height={420} label="Reading the queue" />
    </div>
  )
}

function Desk({ id }: { id: string | undefined }) {
  const query = useSubmissions({ review: true })
  const queue = query.data?.submissions ?? []
  if (query.isError && !query.data) {
    return (
      <div className="page">
        <PageHeader title="Review" />
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was decided." />
      </div>
    )
  }
  if (!query.data) return <Waiting />
  // The bench always has its own address: what is read must not change under the reader when the queue does.
  if (id === undefined && queue[0]) return <Navigate replace to={paths.reviewOf(queue[0].id)} />
  if (id === undefined) {
    return (
      <div className="page">
        <PageHeader title="Review" aside="nothing waits" />
        <EmptyState title="The queue is empty" action={<Link look="button" to={`${paths.submissions}?whose=all`}>All submissions</Link>}>
          What curators submit waits here, the oldest first. Your own submissions are decided on by somebody else.
        </EmptyState>
      </div>
    )
  }
  return (
    <div className="page">
      <div className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[17rem_minmax(0,1fr)] xl:grid-cols-[20rem_minmax(0,1fr)]">
        <Queue queue={queue} open={id} />
        <OnTheBench key={id} id={id} queue={queue} />
      </div>
    </div>
  )
}

function OnTheBench({ id, queue }: { id: string; queue: Parameters<typeof Bench>[0]['queue'] }) {
  const query = useSubmission(id)
  if (query.isError && !query.data) {
    return (
      <div>
        <PageHeader title="Review" />
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was decided." />
      </div>
    )
  }
  if (!query.data) {
    return (
      <div>
        <PageHeader title="Review" />
        <Skeleton height={420} label="Reading the submission" />
      </div>
    )
  }
  return <Bench submission={query.data} queue={queue} onReread={() => query.refetch()} />
}
