import type { HTMLInputAutoCompleteAttribute, ReactNode, Ref } from 'react'
import { Input, TextField as AriaTextField } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, FieldNotes, fieldFrame, fieldInput, type FieldWords } from './field.tsx'

export interface TextFieldProps extends FieldWords {
  value: string
  onChange: (value: string) => void
  onBlur?: () => void
  /** Shown inside the field, at its end. */
  unit?: ReactNode
  /** What was understood of the text, for example "10.6847°, +41.2688°". */
  reading?: ReactNode
  type?: 'text' | 'email' | 'password' | 'url'
  name?: string
  isRequired?: boolean
  isDisabled?: boolean
  isReadOnly?: boolean
  autoFocus?: boolean
  autoComplete?: HTMLInputAutoCompleteAttribute
  placeholder?: string
  inputRef?: Ref<HTMLInputElement>
  onKeyDown?: (event: { key: string; preventDefault(): void }) => void
  /** For identifiers and file names. */
  mono?: boolean
  className?: string
}

export function TextField({ label, hideLabel, help, error, unit, reading, inputRef, placeholder, mono, className, isRequired, autoComplete, ...rest }: TextFieldProps) {
  return (
    <AriaTextField {...rest} autoComplete={autoComplete} isRequired={isRequired} validationBehavior="aria" isInvalid={error !== undefined} className={classNames('block', className)}>
      <FieldLabel label={label} hideLabel={hideLabel} isRequired={isRequired} />
      <div className={fieldFrame}>
        <Input ref={inputRef} placeholder={placeholder} className={classNames(fieldInput, mono && 'font-mono text-xs')} />
        {unit && <span className="pr-3 pl-1 whitespace-nowrap text-muted">{unit}</span>}
      </div>
      {reading && (
        <p role="status" className="mt-1 text-xs text-good">
          {reading}
        </p>
      )}
      <FieldNotes help={help} error={error} />
    </AriaTextField>
  )
}
