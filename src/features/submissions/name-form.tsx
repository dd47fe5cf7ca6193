import { useState } from 'react'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import { GalaxyPicker, type PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { SourcePicker, type PickedSource } from '../../components/curation/source-picker.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'

const schema = changePayloadSchemas['name.add']

/** Adds a further name of a galaxy. */
export function NameForm({ change, onSave, isSaving, error }: ChangeFormProps<'name.add'>) {
  const before = change ? schema.parse(change.payload) : null
  const asked = useGalaxyAsked()
  const [galaxy, setGalaxy] = useState<PickedGalaxy | null>(change?.galaxy ?? asked)
  const [name, setName] = useState(before?.name ?? '')
  const [source, setSource] = useState<PickedSource | null>(before?.sourceId ? { id: before.sourceId, label: `source ${before.sourceId}` } : null)
  const [tried, setTried] = useState(false)
  const ref = galaxy ? { slug: galaxy.slug } : before && 'change' in before.galaxy ? before.galaxy : undefined
  const parsed = schema.safeParse({ galaxy: ref, name, sourceId: source?.id ?? null })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const save = async (): Promise<void> => {
    setTried(true)
    if (!parsed.success) return
    if ((await onSave({ action: 'name.add', payload: parsed.data })) && !change) {
      setName('')
      setTried(false)
    }
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        <GalaxyPicker value={galaxy} onChange={setGalaxy} error={tried && !ref ? 'Choose the galaxy.' : undefined} autoFocus={!change && !asked} />
        <TextField label="Name" value={name} onChange={setName} error={errorAt(issues, error, 'name')} />
      </div>
      <SourcePicker value={source} onChange={setSource} />
    </ChangeFormFrame>
  )
}
