import { useEffect, useState } from 'react'
import { useForm, type UseFormReturn } from 'react-hook-form'
import { changePayloadSchemas, type GalaxyRef } from '../../../core/schema/changes.ts'
import type { ChangeAnswer, SubmissionAnswer } from '../../../core/schema/submissions.ts'
import { GalaxyPicker, type PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { Select } from '../../components/select.tsx'
import { useKeptForm } from '../../lib/kept-form.ts'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'
import { measurementBody, typedFrom } from './measurement-body.ts'
import { BLANK_MEASUREMENT, MeasurementFields, type TypedMeasurement } from './measurement-fields.tsx'

interface Typed {
  galaxy: PickedGalaxy | null
  /** Id of the change that adds the galaxy, where it is new. */
  newGalaxy: number | null
  measurement: TypedMeasurement
}

const schema = changePayloadSchemas['measurement.add']

/** Adds one measurement. Method, anchor and source stay for the next one. */
export function MeasurementForm({ submission, change, onSave, isSaving, error }: ChangeFormProps<'measurement.add'>) {
  const { kept, keep } = useKeptForm<Typed>(`submission.${submission.id}.measurement.${change?.id ?? 'new'}`)
  const preset = useGalaxyAsked()
  const form = useForm<Typed>({ defaultValues: kept ?? (change ? typedChange(change) : { galaxy: preset, newGalaxy: null, measurement: BLANK_MEASUREMENT }) })
  const [tried, setTried] = useState(false)
  const typed = form.watch()
  const ref: GalaxyRef | null = typed.newGalaxy !== null ? { change: typed.newGalaxy } : typed.galaxy ? { slug: typed.galaxy.slug } : null
  const body = measurementBody(typed.measurement)
  // A source still to be chosen must not hide what else is wrong: its own field says so.
  const parsed = schema.safeParse({ galaxy: ref ?? undefined, measurement: { ...body, sourceId: body.sourceId || 1 } })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  useEffect(() => {
    const watching = form.watch((value) => keep(value as Typed))
    return () => watching.unsubscribe()
  }, [form, keep])
  const added = submission.items.filter((c) => c.action === 'galaxy.add')

  const save = async (): Promise<void> => {
    setTried(true)
    if (!parsed.success || !ref || !typed.measurement.source) return
    const taken = await onSave({ action: 'measurement.add', payload: parsed.data })
    if (!taken) return
    keep(null)
    setTried(false)
    if (!change) form.reset({ ...typed, measurement: { ...typed.measurement, value: '', errPlus: '', errMinus: '', errSys: '', textValue: '', locator: '', note: '' } })
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        <GalaxyPicker key={typed.galaxy?.slug ?? 'none'} value={typed.galaxy} onChange={(galaxy) => { form.setValue('galaxy', galaxy); if (galaxy) form.setValue('newGalaxy', null) }} error={tried && !ref ? 'Choose the galaxy.' : errorAt(issues, error, 'galaxy', 'galaxy.slug')} autoFocus={!change && !preset} />
        {added.length > 0 && <NewGalaxySelect added={added} value={typed.newGalaxy} onChange={(id) => { form.setValue('newGalaxy', id); if (id !== null) form.setValue('galaxy', null) }} />}
      </div>
      <MeasurementFields form={form as unknown as UseFormReturn<{ measurement: TypedMeasurement }>} errorOf={(field) => (field === 'sourceId' && tried && !typed.measurement.source ? 'Choose the source.' : errorAt(issues, error, `measurement.${field}`))} />
    </ChangeFormFrame>
  )
}

function NewGalaxySelect({ added, value, onChange }: { added: SubmissionAnswer['items']; value: number | null; onChange: (id: number | null) => void }) {
  return (
    <Select
      label="or a galaxy new in this draft"
      options={[{ id: 'none', label: 'none' }, ...added.map((c) => ({ id: String(c.id), label: c.subject }))]}
      value={value === null ? 'none' : String(value)}
      onChange={(id) => onChange(id === 'none' ? null : Number(id))}
    />
  )
}

function typedChange(change: ChangeAnswer): Typed {
  const payload = schema.parse(change.payload)
  return {
    galaxy: 'slug' in payload.galaxy ? { slug: payload.galaxy.slug, name: change.galaxy?.name ?? payload.galaxy.slug } : null,
    newGalaxy: 'change' in payload.galaxy ? payload.galaxy.change : null,
    measurement: typedFrom(payload.measurement, change.standing?.source ?? `source ${payload.measurement.sourceId}`),
  }
}
