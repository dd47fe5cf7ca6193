import type { ChangeAction, ChangeForm } from '../../../core/schema/changes.ts'
import type { ChangeAnswer, SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { useAddChange, usePatchChange } from '../../api/submissions.ts'
import { notify } from '../../components/toast.tsx'
import { AmendForm } from './amend-form.tsx'
import { AnchorForm } from './anchor-form.tsx'
import { ClearOverrideForm } from './clear-override-form.tsx'
import { ExcludeForm } from './exclude-form.tsx'
import { GalaxyForm } from './galaxy-form.tsx'
import { MeasurementForm } from './measurement-form.tsx'
import { NameForm } from './name-form.tsx'
import { OverrideForm } from './override-form.tsx'
import { PolicyForm } from './policy-form.tsx'
import { ReplaceForm } from './replace-form.tsx'

/** What every form of a change is given. */
export interface ChangeFormProps<A extends ChangeAction = ChangeAction> {
  submission: SubmissionAnswer
  /** The change that is edited, or undefined for a new one. */
  change?: ChangeAnswer
  /** Sends the change; resolves true when the server has taken it. */
  onSave: (body: Extract<ChangeForm, { action: A }>) => Promise<boolean>
  isSaving: boolean
  error: unknown
}

interface Props {
  submission: SubmissionAnswer
  action: ChangeAction
  change?: ChangeAnswer
  onDone: () => void
}

/** The form for one kind of change. */
export function ChangeForms({ submission, action, change, onDone }: Props) {
  const add = useAddChange(submission.id)
  const patch = usePatchChange(submission.id)
  const save = async (body: ChangeForm): Promise<boolean> => {
    try {
      if (change) await patch.mutateAsync({ change: change.id, body })
      else await add.mutateAsync(body)
      notify(change ? 'The change is saved.' : 'Added to the draft.', { tone: 'good' })
      onDone()
      return true
    } catch {
      // The problem is shown above the form's buttons; what was typed stays.
      return false
    }
  }
  const props = { submission, change, onSave: save, isSaving: add.isPending || patch.isPending, error: add.error ?? patch.error }
  if (action === 'measurement.add') return <MeasurementForm {...props} />
  if (action === 'measurement.replace') return <ReplaceForm {...props} />
  if (action === 'measurement.exclude' || action === 'measurement.restore') return <ExcludeForm action={action} {...props} />
  if (action === 'galaxy.add') return <GalaxyForm {...props} />
  if (action === 'galaxy.amend') return <AmendForm {...props} />
  if (action === 'anchor.set') return <AnchorForm {...props} />
  if (action === 'policy.set') return <PolicyForm {...props} />
  if (action === 'override.set') return <OverrideForm {...props} />
  if (action === 'override.clear') return <ClearOverrideForm {...props} />
  return <NameForm {...props} />
}
