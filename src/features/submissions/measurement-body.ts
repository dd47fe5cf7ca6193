import { quantity } from '../../../core/quantities.ts'
import type { MeasurementForm, MeasurementInput } from '../../../core/schema/measurement.ts'
import { BLANK_MEASUREMENT, type TypedMeasurement } from './measurement-fields.tsx'
import { asTyped, typedNumber } from '../../lib/typed-number.ts'

/** What was typed, as the API takes it. An empty lower error is the same as the upper one. */
export function measurementBody(typed: TypedMeasurement): MeasurementForm {
  const q = quantity(typed.quantity)
  const isText = q.kind === 'text'
  const errPlus = isText ? null : typedNumber(typed.errPlus)
  return {
    quantity: typed.quantity,
    value: isText ? null : typedNumber(typed.value),
    errPlus,
    errMinus: isText ? null : typed.errMinus.trim() === '' ? errPlus : typedNumber(typed.errMinus),
    errSys: isText ? null : typedNumber(typed.errSys),
    unit: isText ? '' : typed.unit,
    textValue: isText ? typed.textValue : null,
    limitFlag: isText || typed.limitFlag === '' ? null : typed.limitFlag,
    method: q.needsMethod && typed.method !== '' ? (typed.method as MeasurementForm['method']) : null,
    anchor: q.needsMethod && typed.anchor !== '' ? typed.anchor : null,
    anchorValueAssumed: q.needsMethod ? typedNumber(typed.anchorValueAssumed) : null,
    convention: q.conventions && typed.convention !== '' ? typed.convention : null,
    sourceId: typed.source?.id ?? 0,
    locator: typed.locator.trim() || null,
    note: typed.note.trim() || null,
  }
}

/** A measurement as it would have been typed. @param sourceLabel - for the picker */
export function typedFrom(m: MeasurementInput, sourceLabel: string): TypedMeasurement {
  return {
    ...BLANK_MEASUREMENT,
    quantity: m.quantity,
    value: asTyped(m.value),
    errPlus: asTyped(m.errPlus),
    errMinus: m.errMinus === m.errPlus ? '' : asTyped(m.errMinus),
    errSys: asTyped(m.errSys),
    unit: m.unit,
    textValue: m.textValue ?? '',
    limitFlag: m.limitFlag ?? '',
    method: m.method ?? '',
    anchor: m.anchor ?? '',
    anchorValueAssumed: asTyped(m.anchorValueAssumed),
    convention: m.convention ?? '',
    source: { id: m.sourceId, label: sourceLabel },
    locator: m.locator ?? '',
    note: m.note ?? '',
  }
}
