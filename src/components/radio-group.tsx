import type { ReactNode } from 'react'
import { Radio, RadioGroup as AriaRadioGroup } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, FieldNotes, type FieldWords } from './field.tsx'

export interface RadioGroupProps<Id extends string> extends FieldWords {
  options: readonly { id: Id; label: ReactNode; help?: ReactNode }[]
  value: Id | null
  onChange: (id: Id) => void
  orientation?: 'horizontal' | 'vertical'
  /** `chips`: pills in a row, for a few short choices that redraw a picture. */
  look?: 'radio' | 'chips'
  isDisabled?: boolean
  className?: string
}

const CHIP =
  'inline-flex min-h-7 cursor-pointer items-center rounded-full border border-edge bg-sheet px-3 text-ink data-hovered:border-ink data-selected:border-accent data-selected:text-accent data-selected:font-semibold data-disabled:opacity-55'

export function RadioGroup<Id extends string>({ label, hideLabel, help, error, options, value, onChange, orientation = 'vertical', look = 'radio', className, ...rest }: RadioGroupProps<Id>) {
  const inRow = look === 'chips' || orientation === 'horizontal'
  return (
    <AriaRadioGroup
      {...rest}
      value={value}
      onChange={(next) => {
        const chosen = options.find((option) => option.id === next)
        if (chosen) onChange(chosen.id)
      }}
      orientation={inRow ? 'horizontal' : 'vertical'}
      validationBehavior="aria"
      isInvalid={error !== undefined}
      className={classNames('block', className)}
    >
      <FieldLabel label={label} hideLabel={hideLabel} />
      <div className={inRow ? 'flex flex-wrap gap-2' : 'flex flex-col gap-1'}>
        {options.map((option) => (
          <Radio key={option.id} value={option.id} className={look === 'chips' ? CHIP : 'group flex min-h-7 cursor-pointer items-start gap-2.5 py-0.5 data-disabled:opacity-55'}>
            {({ isSelected }) =>
              look === 'chips' ? (
                option.label
              ) : (
                <>
                  <span
                    aria-hidden
                    className={classNames(
                      'mt-0.5 flex size-[18px] shrink-0 items-center justify-center rounded-full border group-data-focus-visible:outline-2 group-data-focus-visible:outline-offset-2 group-data-focus-visible:outline-focus',
                      isSelected ? 'border-accent' : 'border-edge bg-sheet group-data-hovered:border-ink',
                    )}
                  >
                    {isSelected && <span className="size-2.5 rounded-full bg-accent" />}
                  </span>
                  <span>
                    {option.label}
                    {option.help && <span className="block text-xs text-muted">{option.help}</span>}
                  </span>
                </>
              )
            }
          </Radio>
        ))}
      </div>
      <FieldNotes help={help} error={error} />
    </AriaRadioGroup>
  )
}
