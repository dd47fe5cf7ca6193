import { METHODS } from '../../../core/methods.ts'
import { QUANTITIES, quantity } from '../../../core/quantities.ts'
import type { Mapping } from '../../../core/schema/imports.ts'
import { fieldError } from '../../api/client.ts'
import { useScale } from '../../api/scale.ts'
import { useSource } from '../../api/sources.ts'
import { SourcePicker } from '../../components/curation/source-picker.tsx'
import { NumberField } from '../../components/number-field.tsx'
import { Select } from '../../components/select.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { unitText } from '../../lib/format.ts'
import { withConstants } from './roles.ts'

interface Props {
  mapping: Mapping
  onChange: (mapping: Mapping) => void
  error: unknown
}

const NONE = 'none'
const CONVENTIONS = [{ id: NONE, label: 'not said' }, { id: 'true', label: 'true reddening' }, { id: 'sfd', label: 'value of the SFD map' }] as const

/** What holds for every row that does not say otherwise: a paper's table seldom repeats its own citation. */
export function ConstantsEditor({ mapping, onChange, error }: Props) {
  const { constants } = mapping
  const scale = useScale()
  const set = (part: Partial<Mapping['constants']>): void => onChange(withConstants(mapping, part))
  const units = constants.quantity ? quantity(constants.quantity).units.map((u) => u.unit).filter((u) => u !== '') : []
  const anchors = scale.data?.anchors ?? []
  const holds = (role: string): boolean => mapping.columns.some((c) => c.role === role)
  const isWide = mapping.columns.some((c) => c.role.startsWith('value:'))
  return (
    <Sheet title="What holds for every row">
      <p className="prose-measure mb-4 text-muted">Unless the row says otherwise.{holds('source') ? ' The table names its sources itself.' : ''}</p>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 md:grid-cols-2 xl:grid-cols-3">
        <ConstantSource sourceId={constants.sourceId} onChange={(sourceId) => set({ sourceId })} error={fieldError(error, 'mapping.constants.sourceId')} />
        {!isWide && (
          <Select
            label="Quantity"
            options={[{ id: NONE, label: 'as the row says' }, ...QUANTITIES.map((q) => ({ id: q.key, label: q.label }))]}
            value={constants.quantity ?? NONE}
            onChange={(id) => set({ quantity: QUANTITIES.find((q) => q.key === id)?.key ?? null, unit: null })}
            error={fieldError(error, 'mapping.constants.quantity')}
          />
        )}
        {units.length > 1 && (
          <Select
            label="Unit"
            options={[{ id: NONE, label: 'as the row says' }, ...units.map((id) => ({ id, label: unitText(id) }))]}
            value={constants.unit ?? NONE}
            onChange={(id) => set({ unit: id === NONE ? null : id })}
            error={fieldError(error, 'mapping.constants.unit')}
          />
        )}
        <Select
          label="Distance method"
          options={[{ id: NONE, label: 'as the row says' }, ...METHODS.map((m) => ({ id: m.key, label: m.label }))]}
          value={constants.method ?? NONE}
          onChange={(id) => set({ method: METHODS.find((m) => m.key === id)?.key ?? null })}
          error={fieldError(error, 'mapping.constants.method')}
        />
        <Select
          label="Anchor"
          options={[{ id: NONE, label: 'as the row says' }, ...anchors.map((a) => ({ id: a.key, label: a.label }))]}
          value={constants.anchor ?? NONE}
          onChange={(id) => set(id === NONE ? { anchor: null, anchorValueAssumed: null } : { anchor: id })}
          error={fieldError(error, 'mapping.constants.anchor')}
        />
        {constants.anchor !== null && (
          <NumberField
            label="Value of it that the authors assumed"
            unit="mag"
            decimals={3}
            value={constants.anchorValueAssumed}
            onChange={(anchorValueAssumed) => set({ anchorValueAssumed })}
            error={fieldError(error, 'mapping.constants.anchorValueAssumed')}
          />
        )}
        {(constants.quantity === 'ebv' || mapping.columns.some((c) => c.role === 'value:ebv') || holds('quantity')) && (
          <Select
            label="Reddenings are"
            options={CONVENTIONS}
            value={constants.convention ?? NONE}
            onChange={(id) => set({ convention: id === NONE ? null : id })}
            error={fieldError(error, 'mapping.constants.convention')}
          />
        )}
      </div>
    </Sheet>
  )
}

function ConstantSource({ sourceId, onChange, error }: { sourceId: number | null; onChange: (id: number | null) => void; error: string | undefined }) {
  return sourceId === null ? <SourcePicker key="none" value={null} onChange={(s) => onChange(s?.id ?? null)} error={error} /> : <HeldSource key={sourceId} sourceId={sourceId} onChange={onChange} error={error} />
}

function HeldSource({ sourceId, onChange, error }: { sourceId: number; onChange: (id: number | null) => void; error: string | undefined }) {
  const source = useSource(sourceId)
  if (source.isPending) return <Skeleton lines={2} label="Reading the source" />
  return <SourcePicker value={{ id: sourceId, label: source.data?.label ?? `Source ${sourceId}` }} onChange={(s) => onChange(s?.id ?? null)} error={error} />
}
