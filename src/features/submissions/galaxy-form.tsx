import { useState } from 'react'
import { readPosition } from '../../../core/astro/position-reader.ts'
import { formatPosition } from '../../../core/astro/position-format.ts'
import { GALAXY_CLASSES, classLabel, type GalaxyClass } from '../../../core/classes.ts'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Select } from '../../components/select.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { useKeptForm } from '../../lib/kept-form.ts'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'

interface Typed {
  designation: string
  position: string
  class: GalaxyClass
  status: 'confirmed' | 'candidate'
  names: string
  note: string
}

const schema = changePayloadSchemas['galaxy.add']
const BLANK: Typed = { designation: '', position: '', class: 'unknown', status: 'confirmed', names: '', note: '' }

/** Adds a galaxy that the catalogue does not know. A position is understood in any usual form, and the reading shown back. */
export function GalaxyForm({ submission, change, onSave, isSaving, error }: ChangeFormProps<'galaxy.add'>) {
  const { kept, keep } = useKeptForm<Typed>(`submission.${submission.id}.galaxy.${change?.id ?? 'new'}`)
  const [typed, setTyped] = useState<Typed>(kept ?? (change ? typedFrom(change.payload) : BLANK))
  const [tried, setTried] = useState(false)
  const set = (part: Partial<Typed>): void => {
    const next = { ...typed, ...part }
    setTyped(next)
    keep(next)
  }
  const position = typed.position.trim() === '' ? null : readPosition(typed.position)
  const parsed = schema.safeParse({
    designation: typed.designation, ra: position?.ok ? position.ra : undefined, dec: position?.ok ? position.dec : undefined, class: typed.class,
    status: typed.status, note: typed.note.trim() || null, names: typed.names.split('\n').map((n) => n.trim()).filter((n) => n !== ''),
  })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const positionError = position && !position.ok ? position.error : tried && !position ? 'Type the position.' : errorAt(issues, error, 'ra', 'dec')
  const save = async (): Promise<void> => {
    setTried(true)
    if (!parsed.success) return
    if (!(await onSave({ action: 'galaxy.add', payload: parsed.data }))) return
    keep(null)
    setTried(false)
    if (!change) setTyped(BLANK)
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        <TextField label="Designation" value={typed.designation} onChange={(designation) => set({ designation })} error={errorAt(issues, error, 'designation')} autoFocus={!change} />
        <TextField
          label="Position, ICRS"
          value={typed.position}
          onChange={(text) => set({ position: text })}
          error={positionError}
          help="00 42 44.3 +41 16 09, or 10.6847 41.2688 in degrees"
          reading={position?.ok ? `Read as ${formatPosition(position.ra, position.dec)}` : undefined}
        />
        <Select label="Class" options={GALAXY_CLASSES.map((id) => ({ id, label: classLabel(id) }))} value={typed.class} onChange={(id) => set({ class: GALAXY_CLASSES.find((c) => c === id) ?? 'unknown' })} />
        <RadioGroup label="Status" orientation="horizontal" look="chips" options={[{ id: 'confirmed', label: 'confirmed' }, { id: 'candidate', label: 'candidate' }]} value={typed.status} onChange={(id) => set({ status: id === 'candidate' ? 'candidate' : 'confirmed' })} />
        <TextArea label="Other names" rows={3} value={typed.names} onChange={(names) => set({ names })} help="One a line" error={errorAt(issues, error, 'names')} />
        <TextArea label="Note" rows={3} value={typed.note} onChange={(note) => set({ note })} error={errorAt(issues, error, 'note')} />
      </div>
    </ChangeFormFrame>
  )
}

function typedFrom(payload: unknown): Typed {
  const p = schema.parse(payload)
  return { designation: p.designation, position: `${p.ra} ${p.dec}`, class: p.class, status: p.status === 'candidate' ? 'candidate' : 'confirmed', names: p.names.join('\n'), note: p.note ?? '' }
}
