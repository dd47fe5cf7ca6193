import { useState } from 'react'
import { changePayloadSchemas, OVERRIDE_SUBJECTS, type OverrideSubject } from '../../../core/schema/changes.ts'
import { GalaxyPicker, type PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { Select } from '../../components/select.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'
import { SUBJECT_OPTIONS, useSubjectAsked } from './override-form.tsx'

const schema = changePayloadSchemas['override.clear']

/** Takes an override back: the policy, or the rule of hosts, decides again. */
export function ClearOverrideForm({ change, onSave, isSaving, error }: ChangeFormProps<'override.clear'>) {
  const asked = useGalaxyAsked()
  const subjectAsked = useSubjectAsked()
  const before = change ? schema.parse(change.payload) : null
  const [galaxy, setGalaxy] = useState<PickedGalaxy | null>(change?.galaxy ?? asked)
  const [about, setAbout] = useState<OverrideSubject>(before?.about ?? subjectAsked ?? 'distance_modulus')
  const [reason, setReason] = useState(before?.reason ?? '')
  const [tried, setTried] = useState(false)
  const parsed = schema.safeParse({ galaxy: { slug: galaxy?.slug ?? '' }, about, reason })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const save = async (): Promise<void> => {
    setTried(true)
    if (parsed.success) await onSave({ action: 'override.clear', payload: parsed.data })
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      {!change && (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
          <GalaxyPicker value={galaxy} onChange={setGalaxy} autoFocus={!galaxy} error={tried && !galaxy ? 'Choose the galaxy.' : errorAt([], error, 'galaxy.slug')} />
          <Select label="Override of its" options={SUBJECT_OPTIONS} value={about} onChange={(id) => setAbout(OVERRIDE_SUBJECTS.find((s) => s === id) ?? about)} error={errorAt([], error, 'about')} />
        </div>
      )}
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help="Why the policy is right after all" />
    </ChangeFormFrame>
  )
}
