import { useState } from 'react'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import type { ScaleAnswer } from '../../../core/schema/scale.ts'
import type { ChangeAnswer } from '../../../core/schema/submissions.ts'
import { ANCHOR_FIELDS, anchorFieldLabel } from '../../../core/scale/anchor-fields.ts'
import { useScale } from '../../api/scale.ts'
import { AnchorFields } from '../../components/curation/scale/anchor-fields.tsx'
import { NEW_ANCHOR, readAnchor, typedAnchor, type AnchorPayload } from '../../components/curation/scale/anchor-typed.ts'
import { FailedState } from '../../components/failed-state.tsx'
import { Select } from '../../components/select.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'

const schema = changePayloadSchemas['anchor.set']
const ADD = 'add'

/** Sets an anchor of the scale, or adds one. */
export function AnchorForm(props: ChangeFormProps<'anchor.set'>) {
  const scale = useScale()
  const before = props.change ? schema.parse(props.change.payload) : null
  const [chosen, setChosen] = useState<string | null>(null)
  if (scale.isError) return <FailedState error={scale.error} onRetry={() => void scale.refetch()} />
  if (!scale.data) return <Skeleton lines={5} />
  const { anchors } = scale.data
  const key = before?.key ?? chosen
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      {!before && (
        <Select
          label="Anchor"
          options={[...anchors.map((a) => ({ id: a.key, label: a.label })), { id: ADD, label: 'A new anchor' }]}
          value={chosen ?? ''}
          onChange={setChosen}
          placeholder="Choose"
        />
      )}
      {key !== null && <Fields key={key} {...props} anchors={anchors} held={anchors.find((a) => a.key === key)} />}
    </div>
  )
}

function Fields({ held, anchors, change, onSave, isSaving, error }: ChangeFormProps<'anchor.set'> & { held: ScaleAnswer['anchors'][number] | undefined; anchors: ScaleAnswer['anchors'] }) {
  const before = change ? schema.parse(change.payload) : null
  const [typed, setTyped] = useState(() => (change && before && held ? typedAnchor(onTopOf(held, before, change)) : before ? typedAnchor(before) : held ? typedAnchor(held) : NEW_ANCHOR))
  const [reason, setReason] = useState(before?.reason ?? '')
  const [tried, setTried] = useState(false)
  const parsed = readAnchor(typed, reason, anchors.map((a) => a.key))
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const save = async (): Promise<void> => {
    setTried(true)
    if (parsed.success) await onSave({ action: 'anchor.set', payload: parsed.data })
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      <AnchorFields typed={typed} onChange={setTyped} held={held} anchors={anchors} errorOf={(field) => errorAt(issues, error, field)} />
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help="Why this value should be believed" />
    </ChangeFormFrame>
  )
}

/** What others moved since the change was made stays as they left it: only what this change moves is proposed again. */
function onTopOf(held: ScaleAnswer['anchors'][number], before: AnchorPayload, change: ChangeAnswer): AnchorPayload {
  const moved = new Set(change.diff.map((d) => d.field))
  const kept = ANCHOR_FIELDS.filter((field) => !moved.has(anchorFieldLabel(field)))
  return { ...before, ...Object.fromEntries(kept.map((field) => [field, held[field]])) }
}
