import { useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import type { PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'
import { MeasurementPicker } from './measurement-picker.tsx'

const schema = changePayloadSchemas['measurement.exclude']

type Action = 'measurement.exclude' | 'measurement.restore'

const HELP: Readonly<Record<Action, string>> = {
  'measurement.exclude': 'Shown wherever the measurement is: wrong object; superseded calibration; blended with a star',
  'measurement.restore': 'Why it should be believed after all',
}

/** Takes a measurement out of adoption, with the reason, or back into it. It stays visible either way. */
export function ExcludeForm({ action, change, onSave, isSaving, error }: ChangeFormProps<Action> & { action: Action }) {
  const [search] = useSearchParams()
  const asked = useGalaxyAsked()
  const before = change ? schema.parse(change.payload) : null
  const [galaxy, setGalaxy] = useState<PickedGalaxy | null>(change?.galaxy ?? asked)
  const [id, setId] = useState<number | null>(before?.measurementId ?? (Number(search.get('measurement')) || null))
  const [reason, setReason] = useState(before?.reason ?? '')
  const [tried, setTried] = useState(false)
  const parsed = schema.safeParse({ measurementId: id ?? undefined, reason })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const save = async (): Promise<void> => {
    setTried(true)
    if (!parsed.success) return
    if ((await onSave({ action, payload: parsed.data })) && !change) {
      setId(null)
      setReason('')
      setTried(false)
    }
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      {!change && <MeasurementPicker excluded={action === 'measurement.restore'} galaxy={galaxy} onGalaxy={setGalaxy} value={id} onChange={(m) => setId(m.id)} error={tried && id === null ? 'Choose the measurement.' : errorAt([], error, 'measurementId')} />}
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help={HELP[action]} />
    </ChangeFormFrame>
  )
}
