import { useState } from 'react'
import { useNavigate, useSearchParams } from 'react-router-dom'
import { movesScale } from '../../../core/schema/changes.ts'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import { useProposeScale, useScale } from '../../api/scale.ts'
import { useCan } from '../../api/session.ts'
import { useSubmissions } from '../../api/submissions.ts'
import { Button } from '../../components/button.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { notify } from '../../components/toast.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { useKeptForm } from '../../lib/kept-form.ts'
import { paths } from '../../paths.ts'
import { NO_PROPOSAL, readProposal, titleOf, type Proposal } from './proposal.ts'
import { ProposalFields } from './proposal-fields.tsx'
import { ProposalSheet } from './proposal-sheet.tsx'

/** Proposes a change of the scale: anchors and policy in one form, which becomes a draft whose effect is shown before anybody approves it. */
export default function ProposePage() {
  useDocumentTitle('Propose a change of the scale')
  const query = useScale()
  const mayWrite = useCan('submission.write')
  return (
    <div className="page">
      <PageHeader
        title="Propose a change of the scale"
        breadcrumbs={[{ label: 'Scale', href: paths.scale }]}
        intro="Nothing moves yet: what you propose becomes a draft, which shows the whole catalogue moving before a second person approves it."
      />
      {!mayWrite ? (
        <p>Proposing is for curators, approvers and stewards. Ask a steward for one of these roles.</p>
      ) : query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} />
      ) : query.data ? (
        <ProposalForm scale={query.data} />
      ) : (
        <Skeleton height={520} />
      )}
    </div>
  )
}

function ProposalForm({ scale }: { scale: ScaleAnswer }) {
  const navigate = useNavigate()
  const [search] = useSearchParams()
  const { kept, keep } = useKeptForm<Proposal>('scale.proposal')
  const [typed, setTyped] = useState<Proposal>(kept ?? NO_PROPOSAL)
  const [tried, setTried] = useState(false)
  const drafts = useSubmissions({ mine: true, state: 'draft' })
  const set = (next: Proposal): void => {
    setTyped(next)
    keep(next)
  }
  const propose = useProposeScale((draft) => set({ ...typed, draft }))
  const read = readProposal(typed, scale)
  const complete = read.proposed.length > 0 && read.proposed.every((p) => p.body !== null) && typed.reason.trim().length >= 3
  const save = (): void => {
    setTried(true)
    if (!complete) return
    propose.mutate(
      { draft: typed.draft, title: typed.title.trim() || titleOf(read.proposed), changes: read.proposed.flatMap((p) => p.body ?? []) },
      {
        onSuccess: (submission) => {
          keep(null)
          notify('The draft is saved. Below the changes stands what they would do.', { tone: 'good' })
          void navigate(paths.submission(submission.id))
        },
      },
    )
  }
  const scaleDrafts = (drafts.data?.submissions ?? []).filter((s) => s.actions.every(movesScale))
  return (
    <form
      className="grid grid-cols-[minmax(0,1fr)] items-start gap-6 lg:grid-cols-[minmax(0,1fr)_22rem]"
      onSubmit={(event) => {
        event.preventDefault()
        save()
      }}
    >
      <ProposalFields scale={scale} typed={typed} onChange={set} read={read} tried={tried} sent={propose.error} open={search.get('anchor')} />
      <ProposalSheet typed={typed} onChange={set} read={read} drafts={scaleDrafts} tried={tried} error={propose.error}>
        <Button type="submit" kind="primary" isPending={propose.isPending}>Save as a draft and see the effect</Button>
        {(read.proposed.length > 0 || typed.reason !== '') && (
          <Button
            onPress={() => {
              setTyped(NO_PROPOSAL)
              setTried(false)
              propose.reset()
              keep(null)
            }}
          >
            Begin again
          </Button>
        )}
      </ProposalSheet>
    </form>
  )
}
