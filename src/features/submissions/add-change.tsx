import type { SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { CHANGE_ACTIONS, movesScale, type ChangeAction } from '../../../core/schema/changes.ts'
import { Button } from '../../components/button.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { ChangeForms } from './change-forms.tsx'

const OFFERED: readonly { action: ChangeAction; label: string; title: string }[] = [
  { action: 'measurement.add', label: 'Measurement', title: 'A new measurement' },
  { action: 'galaxy.add', label: 'Galaxy', title: 'A new galaxy' },
  { action: 'name.add', label: 'Name', title: 'A further name' },
  { action: 'galaxy.amend', label: 'Amend a galaxy', title: 'What to amend' },
  { action: 'measurement.replace', label: 'Mend a measurement', title: 'Which measurement to mend' },
  { action: 'measurement.exclude', label: 'Exclude a measurement', title: 'Which measurement to exclude' },
  { action: 'measurement.restore', label: 'Restore a measurement', title: 'Which measurement to restore' },
  { action: 'override.set', label: 'Override', title: 'What to decide against the policy' },
  { action: 'override.clear', label: 'Clear an override', title: 'Which override to clear' },
  { action: 'anchor.set', label: 'Anchor', title: 'An anchor of the scale' },
  { action: 'policy.set', label: 'Policy', title: 'The adoption policy' },
]

interface AddChangeProps {
  submission: SubmissionAnswer
  /** Of the form that is open. */
  action: string | null
  onAction: (action: ChangeAction | null) => void
}

/** Chooses what to add, and adds it. */
export function AddChange({ submission, action, onAction }: AddChangeProps) {
  const open = CHANGE_ACTIONS.find((a) => a === action)
  const offered = OFFERED.find((o) => o.action === open)
  // A change of the scale is judged alone: a submission that holds one is offered no other kind, and the other way about.
  const kinds = OFFERED.filter((o) => submission.actions.every((held) => movesScale(held) === movesScale(o.action)))
  return (
    <Sheet title={offered?.title ?? 'Add a change'} actions={open && <Button size="small" onPress={() => onAction(null)}>Close</Button>}>
      <div className="flex flex-wrap gap-2" role="group" aria-label="Kinds of change">
        {kinds.map((o) => (
          <Button key={o.action} size="small" aria-pressed={o.action === open} className={o.action === open ? 'border-accent text-accent' : undefined} onPress={() => onAction(o.action)}>{o.label}</Button>
        ))}
      </div>
      {open && (
        <div className="mt-5">
          <ChangeForms key={open} submission={submission} action={open} onDone={() => undefined} />
        </div>
      )}
    </Sheet>
  )
}
