import { useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { measureWords } from '../../../core/formats/measure-words.ts'
import { quantity, QUANTITIES } from '../../../core/quantities.ts'
import type { MeasurementAnswer } from '../../../core/schema/catalogue.ts'
import { changePayloadSchemas, OVERRIDE_SUBJECTS, overrideSubjectWords, type OverrideSubject } from '../../../core/schema/changes.ts'
import { useMeasurements } from '../../api/galaxies.ts'
import { Checkbox } from '../../components/checkbox.tsx'
import { GalaxyPicker, type PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Select } from '../../components/select.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'

const schema = changePayloadSchemas['override.set']

/** The subject that the link to this page names, if it does. */
export function useSubjectAsked(): OverrideSubject | null {
  const [search] = useSearchParams()
  return OVERRIDE_SUBJECTS.find((s) => s === search.get('about')) ?? null
}

/** What an override can be about, in words, the host last. */
export const SUBJECT_OPTIONS = [...QUANTITIES.map((q) => ({ id: q.key as string, label: q.label })), { id: 'host', label: 'Host' }]

/** Decides against the policy: adopts the measurements that are chosen, or assigns the host. */
export function OverrideForm({ change, onSave, isSaving, error }: ChangeFormProps<'override.set'>) {
  const asked = useGalaxyAsked()
  const subjectAsked = useSubjectAsked()
  const before = change ? schema.parse(change.payload) : null
  const [galaxy, setGalaxy] = useState<PickedGalaxy | null>(change?.galaxy ?? asked)
  const [about, setAbout] = useState<OverrideSubject>(before?.about ?? subjectAsked ?? 'distance_modulus')
  const [chosen, setChosen] = useState<readonly number[]>(before && 'measurements' in before.choice ? before.choice.measurements : [])
  const [host, setHost] = useState<PickedGalaxy | null>(before && 'host' in before.choice && before.choice.host !== null ? { slug: before.choice.host, name: before.choice.host } : null)
  const [none, setNone] = useState(before !== null && 'host' in before.choice && before.choice.host === null)
  const [reason, setReason] = useState(before?.reason ?? '')
  const [tried, setTried] = useState(false)
  const choice = about !== 'host' ? { measurements: chosen } : none ? { host: null } : { host: host?.slug }
  const parsed = schema.safeParse({ galaxy: { slug: galaxy?.slug ?? '' }, about, choice, reason })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const choiceError = tried && about !== 'host' && chosen.length === 0 ? 'Choose at least one measurement.' : tried && about === 'host' && !none && !host ? 'Choose the host, or that there is none.' : errorAt(issues, error, 'choice', 'choice.host', 'about', ...chosen.map((_, i) => `choice.measurements.${i}`))
  const save = async (): Promise<void> => {
    setTried(true)
    if (parsed.success) await onSave({ action: 'override.set', payload: parsed.data })
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      {!change && (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
          <GalaxyPicker value={galaxy} onChange={setGalaxy} autoFocus={!galaxy} error={tried && !galaxy ? 'Choose the galaxy.' : errorAt([], error, 'galaxy.slug')} />
          <Select
            label="About its"
            options={SUBJECT_OPTIONS}
            value={about}
            onChange={(id) => {
              setAbout(OVERRIDE_SUBJECTS.find((s) => s === id) ?? about)
              setChosen([])
            }}
          />
        </div>
      )}
      {galaxy && about !== 'host' && <Choices slug={galaxy.slug} about={about} chosen={chosen} onChange={setChosen} error={choiceError} />}
      {galaxy && about === 'host' && (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-3">
          <RadioGroup label="Its host" options={[{ id: 'galaxy', label: 'A galaxy' }, { id: 'none', label: 'None: it is in the field' }]} value={none ? 'none' : 'galaxy'} onChange={(id) => setNone(id === 'none')} orientation="horizontal" />
          {!none && <GalaxyPicker label="Host" value={host} onChange={setHost} error={choiceError} />}
          {none && choiceError && <p className="text-sm text-stop">{choiceError}</p>}
        </div>
      )}
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help="Shown wherever the value is: why the policy is wrong here" />
    </ChangeFormFrame>
  )
}

interface ChoicesProps {
  slug: string
  about: Exclude<OverrideSubject, 'host'>
  chosen: readonly number[]
  onChange: (ids: readonly number[]) => void
  error: string | undefined
}

function Choices({ slug, about, chosen, onChange, error }: ChoicesProps) {
  const query = useMeasurements(slug)
  if (query.isError) return <FailedState error={query.error} onRetry={() => void query.refetch()} />
  if (!query.data) return <Skeleton lines={3} />
  const held = query.data.measurements.filter((m) => m.quantity === about)
  if (held.length === 0) return <p className="text-muted">The catalogue holds no {overrideSubjectWords(about)} of this galaxy, so there is nothing to choose from. Add a measurement first.</p>
  return (
    <fieldset>
      <legend className="mb-1 text-sm text-muted">Adopt it from</legend>
      <div className="grid gap-1">
        {held.map((m) => (
          <Checkbox
            key={m.id}
            isSelected={chosen.includes(m.id)}
            isDisabled={whyNot(m) !== null && !chosen.includes(m.id)}
            onChange={(on) => onChange(on ? [...chosen, m.id] : chosen.filter((id) => id !== m.id))}
            help={[m.source.label, m.locator, whyNot(m)].filter(Boolean).join(' · ')}
          >
            {m.published ? measureWords({ ...m.published, limitFlag: m.limitFlag }) : measureWords({ ...m, unit: quantity(m.quantity).unit })}
          </Checkbox>
        ))}
      </div>
      {error && <p className="mt-1 text-sm text-stop">{error}</p>}
    </fieldset>
  )
}

function whyNot(m: MeasurementAnswer): string | null {
  if (m.excludedReason !== null) return `excluded: ${m.excludedReason}`
  return m.limitFlag === null ? null : 'a limit cannot be adopted'
}
