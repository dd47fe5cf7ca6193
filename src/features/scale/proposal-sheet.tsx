import type { ReactNode } from 'react'
import type { SubmissionSummary } from '../../../core/schema/submissions.ts'
import { ProblemNote } from '../../components/failed-state.tsx'
import { Select } from '../../components/select.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { titleOf, type Proposal, type ReadProposal } from './proposal.ts'

export interface ProposalSheetProps {
  typed: Proposal
  onChange: (typed: Proposal) => void
  read: ReadProposal
  /** Own drafts that hold nothing but changes of the scale. */
  drafts: readonly SubmissionSummary[]
  /** Whether somebody tried to save it: then what is missing is named. */
  tried: boolean
  error: unknown
  children: ReactNode
}

const NEW = 'new'

/** What would change, why, and into which draft it goes; beside the fields, and always in sight. */
export function ProposalSheet({ typed, onChange, read, drafts, tried, error, children }: ProposalSheetProps) {
  const wrong = read.proposed.filter((p) => p.body === null)
  return (
    <Sheet title="What you propose" className="lg:sticky lg:top-20">
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
        {read.proposed.length === 0 ? (
          <p className={tried ? 'text-stop' : 'text-muted'}>Nothing differs from the scale in force yet. Change a value and it is listed here.</p>
        ) : (
          <ul className="grid gap-2">
            {read.proposed.filter((p) => p.key !== 'policy').map((p) => <li key={p.key}>{p.label}</li>)}
            {read.differences.map((d) => (
              <li key={d.path} className="figures">
                {d.label}: <del className="text-muted">{d.before ?? 'none'}</del> → <strong className="font-semibold">{d.after ?? 'none'}</strong>
              </li>
            ))}
            {wrong.length > 0 && <li className="text-stop">{wrong.map((p) => p.label).join(', ')}: a field is not right yet. It is marked beside it.</li>}
          </ul>
        )}
        <TextArea
          label="Reason"
          rows={3}
          value={typed.reason}
          onChange={(reason) => onChange({ ...typed, reason })}
          help="Kept with the change for ever: why the new values should be believed"
          error={tried && typed.reason.trim().length < 3 ? 'Give the reason, in a few words at least.' : undefined}
        />
        {drafts.length > 0 && (
          <Select
            label="Into"
            options={[{ id: NEW, label: 'A new submission' }, ...drafts.map((d) => ({ id: String(d.id), label: d.title, hint: `draft ${d.id}` }))]}
            value={typed.draft === null ? NEW : String(typed.draft)}
            onChange={(id) => onChange({ ...typed, draft: id === NEW ? null : Number(id) })}
          />
        )}
        {typed.draft === null && (
          <TextField label="Title of the submission" value={typed.title} onChange={(title) => onChange({ ...typed, title })} placeholder={titleOf(read.proposed)} help="What the approver sees in the queue; made from the changes when left empty" />
        )}
        {error ? <ProblemNote error={error} safe="What you typed is kept on this page and on this device." /> : null}
        <div className="flex flex-wrap gap-2">{children}</div>
        <p className="text-sm text-muted">What you type is kept on this device until it is saved.</p>
      </div>
    </Sheet>
  )
}
