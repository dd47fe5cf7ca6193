import { useState } from 'react'
import { formatPosition } from '../../../core/astro/position-format.ts'
import { readPosition } from '../../../core/astro/position-reader.ts'
import { GALAXY_CLASSES, GALAXY_STATUSES, classLabel, type GalaxyClass, type GalaxyStatus } from '../../../core/classes.ts'
import type { GalaxyAnswer } from '../../../core/schema/catalogue.ts'
import { changePayloadSchemas } from '../../../core/schema/changes.ts'
import { useGalaxy } from '../../api/galaxies.ts'
import { GalaxyPicker, type PickedGalaxy } from '../../components/curation/galaxy-picker.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Select } from '../../components/select.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'
import { ChangeFormFrame } from './change-form-frame.tsx'
import type { ChangeFormProps } from './change-forms.tsx'
import { errorAt } from './form-errors.ts'
import { useGalaxyAsked } from './galaxy-asked.ts'

const schema = changePayloadSchemas['galaxy.amend']

/** Amends what the catalogue says of a galaxy itself: designation, position, class, status, note. Only what differs is sent. */
export function AmendForm(props: ChangeFormProps<'galaxy.amend'>) {
  const asked = useGalaxyAsked()
  const [galaxy, setGalaxy] = useState<PickedGalaxy | null>(props.change?.galaxy ?? asked)
  const query = useGalaxy(galaxy?.slug ?? '', null)
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-4">
      {!props.change && <GalaxyPicker value={galaxy} onChange={setGalaxy} autoFocus={!asked} />}
      {galaxy && query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} />}
      {galaxy && query.isPending && <Skeleton lines={5} />}
      {galaxy && query.data && <Fields key={query.data.slug} {...props} galaxy={query.data} />}
    </div>
  )
}

interface Typed {
  designation: string
  position: string
  class: GalaxyClass
  status: GalaxyStatus
  note: string
}

function Fields({ galaxy, change, onSave, isSaving, error }: ChangeFormProps<'galaxy.amend'> & { galaxy: GalaxyAnswer }) {
  const before = change ? schema.parse(change.payload) : null
  const holds: Typed = { designation: galaxy.designation, position: `${galaxy.ra} ${galaxy.dec}`, class: galaxy.class, status: galaxy.status, note: galaxy.note ?? '' }
  const [typed, setTyped] = useState<Typed>({
    designation: before?.set.designation ?? holds.designation,
    position: before?.set.ra === undefined && before?.set.dec === undefined ? holds.position : `${before.set.ra ?? galaxy.ra} ${before.set.dec ?? galaxy.dec}`,
    class: before?.set.class ?? holds.class,
    status: before?.set.status ?? holds.status,
    note: before?.set.note ?? holds.note,
  })
  const [reason, setReason] = useState(before?.reason ?? '')
  const [tried, setTried] = useState(false)
  const set = (part: Partial<Typed>): void => setTyped({ ...typed, ...part })
  const position = readPosition(typed.position)
  const moved = position.ok && typed.position !== holds.position
  const parsed = schema.safeParse({
    galaxy: { slug: galaxy.slug },
    set: {
      ...(typed.designation !== holds.designation && { designation: typed.designation }),
      ...(moved && { ra: position.ra, dec: position.dec }),
      ...(typed.class !== holds.class && { class: typed.class }),
      ...(typed.status !== holds.status && { status: typed.status }),
      ...(typed.note !== holds.note && { note: typed.note.trim() || null }),
    },
    reason,
  })
  const issues = tried && !parsed.success ? parsed.error.issues : []
  const save = async (): Promise<void> => {
    setTried(true)
    if (parsed.success && position.ok) await onSave({ action: 'galaxy.amend', payload: parsed.data })
  }
  return (
    <ChangeFormFrame save={save} isNew={!change} isSaving={isSaving} error={error}>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        <TextField label="Designation" value={typed.designation} onChange={(designation) => set({ designation })} error={errorAt(issues, error, 'set.designation')} />
        <TextField label="Position, ICRS" value={typed.position} onChange={(text) => set({ position: text })} error={position.ok ? errorAt(issues, error, 'set.ra', 'set.dec') : position.error} reading={moved ? `Read as ${formatPosition(position.ra, position.dec)}` : undefined} />
        <Select label="Class" options={GALAXY_CLASSES.map((id) => ({ id, label: classLabel(id) }))} value={typed.class} onChange={(id) => set({ class: GALAXY_CLASSES.find((c) => c === id) ?? typed.class })} />
        <Select label="Status" options={GALAXY_STATUSES.map((id) => ({ id, label: id }))} value={typed.status} onChange={(id) => set({ status: GALAXY_STATUSES.find((s) => s === id) ?? typed.status })} />
      </div>
      <TextArea label="Note" rows={2} value={typed.note} onChange={(note) => set({ note })} error={errorAt(issues, error, 'set.note')} />
      <TextField label="Reason" value={reason} onChange={setReason} error={errorAt(issues, error, 'reason')} help="Why it should be changed" />
      {errorAt(issues, error, 'set') && <p className="text-sm text-stop">{errorAt(issues, error, 'set')}</p>}
    </ChangeFormFrame>
  )
}
