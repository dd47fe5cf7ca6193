import type { UseFormReturn } from 'react-hook-form'
import { Controller } from 'react-hook-form'
import { readMeasuredValue } from '../../../core/formats/measured-value.ts'
import { METHODS } from '../../../core/methods.ts'
import { QUANTITIES, acceptedUnit, quantity, type QuantityKey } from '../../../core/quantities.ts'
import { useScale } from '../../api/scale.ts'
import { ComboBox } from '../../components/combo-box.tsx'
import { SourcePicker, type PickedSource } from '../../components/curation/source-picker.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Select } from '../../components/select.tsx'
import { TextArea } from '../../components/text-area.tsx'
import { TextField } from '../../components/text-field.tsx'

/** The fields of a measurement as they are typed. */
export interface TypedMeasurement {
  quantity: QuantityKey
  value: string
  errPlus: string
  errMinus: string
  errSys: string
  unit: string
  textValue: string
  limitFlag: '' | 'upper' | 'lower'
  method: string
  anchor: string
  anchorValueAssumed: string
  convention: '' | 'true' | 'sfd'
  source: PickedSource | null
  locator: string
  note: string
}

export const BLANK_MEASUREMENT: TypedMeasurement = {
  quantity: 'distance_modulus', value: '', errPlus: '', errMinus: '', errSys: '', unit: 'mag', textValue: '', limitFlag: '', method: '', anchor: '',
  anchorValueAssumed: '', convention: '', source: null, locator: '', note: '',
}

interface Props<Typed extends { measurement: TypedMeasurement }> {
  form: UseFormReturn<Typed>
  errorOf: (field: string) => string | undefined
}

const NONE = 'none'

/** Value, method, anchor and source of a measurement. `27.78 ± 0.05 mag` pasted into the value fills the errors and the unit. */
export function MeasurementFields({ form, errorOf }: Props<{ measurement: TypedMeasurement }>) {
  const scale = useScale()
  const typed = form.watch('measurement')
  const q = quantity(typed.quantity)
  const set = <K extends keyof TypedMeasurement>(key: K, value: TypedMeasurement[K]): void => form.setValue(`measurement.${key}` as 'measurement', value as never, { shouldDirty: true })
  const read = (text: string): void => {
    set('value', text)
    const reading = readMeasuredValue(text)
    if (!('value' in reading)) return
    const hasMore = reading.errPlus !== null || reading.errSys !== null || reading.unit !== ''
    if (!hasMore) return
    set('value', String(reading.value))
    set('errPlus', reading.errPlus === null ? '' : String(reading.errPlus))
    set('errMinus', reading.errMinus === null ? '' : String(reading.errMinus))
    if (reading.errSys !== null) set('errSys', String(reading.errSys))
    const unit = acceptedUnit(q, reading.unit)
    if (reading.unit !== '' && unit) set('unit', unit.unit)
  }
  const text = (name: 'errPlus' | 'errMinus' | 'errSys' | 'anchorValueAssumed' | 'locator' | 'textValue', label: string, extra: { unit?: string; help?: string; placeholder?: string } = {}) => (
    <Controller control={form.control} name={`measurement.${name}`} render={({ field }) => <TextField label={label} value={field.value} onChange={field.onChange} onBlur={field.onBlur} error={errorOf(name)} {...extra} />} />
  )
  const units = [...new Set(q.units.map((u) => u.unit))]
  const anchors = (scale.data?.anchors ?? []).filter((a) => typed.method === '' || a.methods.some((m) => m === typed.method))
  const anchor = scale.data?.anchors.find((a) => a.key === typed.anchor)
  return (
    <>
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        <ComboBox
          label="Quantity"
          options={QUANTITIES.map((item) => ({ id: item.key, label: item.label, hint: item.unit }))}
          value={typed.quantity}
          onChange={(key) => {
            if (!key) return
            set('quantity', key as QuantityKey)
            set('unit', quantity(key).unit)
          }}
          error={errorOf('quantity')}
        />
        {q.kind === 'text' ? (
          text('textValue', q.label, { placeholder: 'SA(s)b' })
        ) : (
          <div className="grid grid-cols-[1fr_8rem] gap-2">
            <Controller
              control={form.control}
              name="measurement.value"
              render={({ field }) => <TextField label="Value, as published" value={field.value} onChange={(t) => set('value', t)} onBlur={() => read(field.value)} error={errorOf('value')} help="Paste 27.78 ± 0.05 or 27.78 +0.06 −0.04" />}
            />
            {units.length > 1 ? (
              <Select label="Unit" options={units.map((u) => ({ id: u || NONE, label: u || 'none' }))} value={typed.unit || NONE} onChange={(id) => set('unit', id === NONE ? '' : String(id))} error={errorOf('unit')} />
            ) : (
              <div className="pt-8 text-muted">{q.unit}</div>
            )}
          </div>
        )}
      </div>
      {q.kind === 'number' && (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-4">
          {text('errPlus', 'Error +', { unit: typed.unit })}
          {text('errMinus', 'Error −', { unit: typed.unit, help: 'Empty: the same as +' })}
          {text('errSys', 'Systematic', { unit: typed.unit })}
          <Select label="Limit" options={[{ id: NONE, label: 'a value' }, { id: 'upper', label: 'upper limit' }, { id: 'lower', label: 'lower limit' }]} value={typed.limitFlag || NONE} onChange={(id) => set('limitFlag', id === 'upper' || id === 'lower' ? id : '')} />
        </div>
      )}
      {q.conventions && (
        <RadioGroup
          label="Convention"
          options={[{ id: 'true', label: 'true reddening', help: 'A_V = 3.1 E(B−V)' }, { id: 'sfd', label: 'SFD map value', help: 'A_V = 2.742 E(B−V)' }]}
          value={typed.convention}
          onChange={(id) => set('convention', id === 'sfd' ? 'sfd' : 'true')}
        />
      )}
      {q.conventions && errorOf('convention') && <p className="text-sm text-stop">{errorOf('convention')}</p>}
      {q.needsMethod && (
        <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-3">
          <ComboBox label="Method" options={METHODS.map((m) => ({ id: m.key, label: m.label }))} value={typed.method || null} onChange={(key) => set('method', key ?? '')} error={errorOf('method')} />
          <Select label="Anchor it hangs on" options={[{ id: NONE, label: 'not stated' }, ...anchors.map((a) => ({ id: a.key, label: a.label }))]} value={typed.anchor || NONE} onChange={(id) => set('anchor', id === NONE ? '' : String(id))} error={errorOf('anchor')} />
          {text('anchorValueAssumed', 'Value they assumed', { unit: 'mag', help: anchor ? `Ours is ${anchor.value.toFixed(3)}` : undefined })}
        </div>
      )}
      <SourcePicker value={typed.source} onChange={(source) => set('source', source)} error={errorOf('sourceId')} />
      <div className="grid grid-cols-[minmax(0,1fr)] gap-4 sm:grid-cols-2">
        {text('locator', 'Where in the source', { placeholder: 'table 3, row 12' })}
        <Controller control={form.control} name="measurement.note" render={({ field }) => <TextArea label="Note" rows={1} value={field.value} onChange={field.onChange} error={errorOf('note')} />} />
      </div>
    </>
  )
}
