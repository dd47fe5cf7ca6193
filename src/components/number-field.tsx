import { ChevronDown, ChevronUp } from 'lucide-react'
import { Button, Group, Input, NumberField as AriaNumberField } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, FieldNotes, fieldFrame, fieldInput, type FieldWords } from './field.tsx'

export interface NumberFieldProps extends FieldWords {
  /** Null while empty. */
  value: number | null
  onChange: (value: number | null) => void
  onBlur?: () => void
  unit?: string
  /** At most so many decimals are kept; 3 by default. */
  decimals?: number
  min?: number
  max?: number
  step?: number
  name?: string
  isRequired?: boolean
  isDisabled?: boolean
  className?: string
}

const STEPPER = 'flex h-1/2 w-6 items-center justify-center text-muted data-hovered:bg-well data-hovered:text-ink data-disabled:opacity-40'

/** A number with its unit. For values pasted with an error (`27.78 ± 0.05`) use a TextField and the readers of core/formats. */
export function NumberField({ label, hideLabel, help, error, value, onChange, unit, decimals = 3, min, max, step, className, isRequired, ...rest }: NumberFieldProps) {
  return (
    <AriaNumberField
      {...rest}
      value={value ?? Number.NaN}
      onChange={(next) => onChange(Number.isNaN(next) ? null : next)}
      minValue={min}
      maxValue={max}
      step={step}
      isRequired={isRequired}
      validationBehavior="aria"
      isInvalid={error !== undefined}
      formatOptions={{ maximumFractionDigits: decimals, useGrouping: false }}
      className={classNames('block', className)}
    >
      <FieldLabel label={label} hideLabel={hideLabel} isRequired={isRequired} />
      <Group className={fieldFrame}>
        <Input className={fieldInput} />
        {unit && <span className="pr-2 pl-1 whitespace-nowrap text-muted">{unit}</span>}
        <div className="flex h-9 flex-col border-l border-line">
          <Button slot="increment" className={STEPPER}>
            <ChevronUp size={12} aria-hidden />
          </Button>
          <Button slot="decrement" className={STEPPER}>
            <ChevronDown size={12} aria-hidden />
          </Button>
        </div>
      </Group>
      <FieldNotes help={help} error={error} />
    </AriaNumberField>
  )
}
