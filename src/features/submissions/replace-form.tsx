import { useState } from 'react'
import { useForm, type UseFormReturn } from 'react-hook-form'
import { useSearchParams } from 'react-router-dom'
import { quantity } from '../../../core/quantities.ts'
import type { MeasurementAnswer } from '../../../core/schema/catalogue.ts'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import { useMeasurements } from '../../api/galaxies.ts'
import type { PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'
import { measurementBody, typedFrom } from './measurement-body.ts'
import { MeasurementFields, type TypedMeasurement } from './measurement-fields.tsx'
import { MeasurementPicker } from './measurement-picker.tsx'

const schema = changePayloadSchemas['measurement.replace']

/** Mends an entry: a slip in what was typed. (A newer word of the authors is a new measurement.) */
export function ReplaceForm(props: ChangeFormProps<'measurement.replace'>) {
  const [search] = useSearchParams()
  const asked = useGalaxyAsked()
  const { change } = props
  const before = change ? schema.parse(change.payload) : null
  const [galaxy, setGalaxy] = useState<PickedGalaxy | null>(asked)
  const [chosen, setChosen] = useState<MeasurementAnswer | null>(null)
  const wanted = Number(search.get('measurement')) || null
  const held = useMeasurements(galaxy?.slug ?? '')
  const target = chosen ?? held.data?.measurements.find((m) => m.id === wanted) ?? null
  if (change && before) {
    return <Mend {...props} measurementId={before.measurementId} start={typedFrom(before.measurement, change.standing?.source ?? `source ${before.measurement.sourceId}`)} startReason={before.reason} />
  }
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      <MeasurementPicker galaxy={galaxy} onGalaxy={setGalaxy} value={target?.id ?? null} onChange={setChosen} />
      {target && <Mend key={target.versionId} {...props} measurementId={target.id} start={typedAnswer(target)} startReason="" />}
    </div>
  )
}

interface MendProps extends ChangeFormProps<'measurement.replace'> {
  measurementId: number
  start: TypedMeasurement
  startReason: string
}

function Mend({ measurementId, start, startReason, change, onSave, isSaving, error }: MendProps) {
  const form = useForm<{ measurement: TypedMeasurement }>({ defaultValues: { measurement: start } })
  const [reason, setReason] = useState(startReason)
  const [tried, setTried] = useState(false)
  const parsed = schema.safeParse({ measurementId, measurement: measurementBody(form.watch('measurement')), reason })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const save = async (): Promise<void> => {
    setTried(true)
    if (parsed.success) await onSave({ action: 'measurement.replace', payload: parsed.data })
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      <MeasurementFields form={form as UseFormReturn<{ measurement: TypedMeasurement }>} errorOf={(field) => errorAt(issues, error, `measurement.${field}`)} />
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help="What was wrong with the entry" />
    </ChangeFormFrame>
  )
}

/** A held measurement as it was published, in the form's fields. */
function typedAnswer(m: MeasurementAnswer): TypedMeasurement {
  const published = m.published ?? { value: m.value ?? 0, errPlus: m.errPlus, errMinus: m.errMinus, errSys: m.errSys, unit: quantity(m.quantity).unit }
  const isText = m.textValue !== null
  return typedFrom(
    {
      quantity: m.quantity, value: isText ? null : published.value, errPlus: published.errPlus, errMinus: published.errMinus, errSys: published.errSys, unit: published.unit,
      textValue: m.textValue, limitFlag: m.limitFlag, method: m.method, anchor: m.anchor, anchorValueAssumed: m.anchorValueAssumed, convention: m.convention,
      sourceId: m.source.id, locator: m.locator, note: m.note, supersedes: m.supersedes,
    },
    m.source.label,
  )
}
