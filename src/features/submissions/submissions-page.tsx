import { useNavigate, useSearchParams } from 'react-router-dom'
import { SUBMISSION_STATES, type SubmissionSummary } from '../../../core/schema/submissions.ts'
import { useCan } from '../../api/session.ts'
import { useSubmissions } from '../../api/submissions.ts'
import { useActions } from '../../app/actions/use-actions.ts'
import { Badge, StateBadge } from '../../components/badge.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Select } from '../../components/select.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatAge, formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'

/** Only these are checked: of what has been decided on, checks are history. */
const OPEN: readonly string[] = ['draft', 'submitted', 'returned']

const COLUMNS: readonly DataColumn<SubmissionSummary>[] = [
  { key: 'title', header: 'Submission', text: (s) => s.title, render: (s) => <Link to={paths.submission(s.id)}>{s.title}</Link>, sortable: true, width: 320 },
  { key: 'state', header: 'State', text: (s) => s.state, render: (s) => <StateBadge state={s.state} />, sortable: true, width: 130 },
  { key: 'changes', header: 'Changes', text: (s) => s.changes, decimals: 0, sortable: true, width: 100 },
  {
    key: 'cautions', header: 'Checks', text: (s) => s.cautions + s.conflicts, sortable: true, width: 160,
    render: (s) =>
      s.conflicts > 0 ? <Badge tone="stop" shape="cross">{formatCounted(s.conflicts, 'conflict')}</Badge>
      : s.cautions > 0 ? <Badge tone="caution" shape="mark">{formatCounted(s.cautions, 'caution')}</Badge>
      : OPEN.includes(s.state) ? <Badge tone="good" shape="tick">in order</Badge>
      : <span className="text-muted">decided</span>,
  },
  { key: 'author', header: 'Author', text: (s) => s.author.name, sortable: true, width: 150 },
  { key: 'updatedAt', header: 'Last touched', text: (s) => s.updatedAt, render: (s) => formatAge(s.updatedAt), sortable: true, width: 130 },
  { key: 'revision', header: 'Revision', text: (s) => s.revision, decimals: 0, sortable: true, width: 100 },
]

/** My drafts and what became of them; everybody's submitted work. */
export default function SubmissionsPage() {
  useDocumentTitle('Submissions')
  const navigate = useNavigate()
  const [search, setSearch] = useSearchParams()
  const mayWrite = useCan('submission.write')
  const mine = search.get('whose') !== 'all'
  const state = search.get('state') ?? ''
  const query = useSubmissions({ mine: mine || undefined, state: state || undefined })
  useActions([{ name: 'submissions.new', label: 'New submission', keys: 'n', group: 'Submissions', when: mayWrite, perform: () => void navigate(paths.newSubmission) }])
  const set = (key: string, value: string): void =>
    setSearch((now) => {
      const next = new URLSearchParams(now)
      if (value) next.set(key, value)
      else next.delete(key)
      return next
    })
  return (
    <div className="page">
      <PageHeader
        title="Submissions"
        aside={query.data && formatCounted(query.data.submissions.length, 'submission')}
        intro="A submission is a set of proposed changes with one summary. It changes nothing until somebody else has approved it."
        actions={
          mayWrite && (
            <>
              <Link look="button" to={paths.imports}>Import a table</Link>
              <Link look="primary" to={paths.newSubmission}>New submission</Link>
            </>
          )
        }
      />
      <div className="mb-4 flex flex-wrap items-end gap-4">
        <RadioGroup label="Whose" look="chips" orientation="horizontal" options={[{ id: 'mine', label: 'mine' }, { id: 'all', label: 'everybody’s' }]} value={mine ? 'mine' : 'all'} onChange={(id) => set('whose', id === 'all' ? 'all' : '')} />
        <Select label="State" options={[{ id: 'any', label: 'any state' }, ...SUBMISSION_STATES.map((id) => ({ id, label: id }))]} value={state || 'any'} onChange={(id) => set('state', id === 'any' ? '' : String(id))} />
      </div>
      {query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Your drafts are safe on the server." />
      ) : (
        <DataTable
          label="Submissions"
          columns={COLUMNS}
          rows={query.data?.submissions ?? []}
          rowKey={(s) => String(s.id)}
          isLoading={query.isPending}
          onRowAction={(s) => void navigate(paths.submission(s.id))}
          empty={
            <EmptyState title={state ? `Nothing ${state}` : mine ? 'You have no submissions yet' : 'No submissions yet'}>
              {mine && mayWrite ? 'Begin with one measurement, or import a whole table of a paper.' : 'What curators submit appears here.'}
            </EmptyState>
          }
        />
      )}
    </div>
  )
}
