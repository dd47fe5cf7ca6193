import type { Ref } from 'react'
import { TextArea as AriaTextArea, TextField as AriaTextField } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, FieldNotes, fieldFrame, type FieldWords } from './field.tsx'

export interface TextAreaProps extends FieldWords {
  value: string
  onChange: (value: string) => void
  onBlur?: () => void
  name?: string
  rows?: number
  isRequired?: boolean
  isDisabled?: boolean
  autoFocus?: boolean
  placeholder?: string
  mono?: boolean
  areaRef?: Ref<HTMLTextAreaElement>
  className?: string
}

export function TextArea({ label, hideLabel, help, error, rows = 4, placeholder, mono, areaRef, className, isRequired, ...rest }: TextAreaProps) {
  return (
    <AriaTextField {...rest} isRequired={isRequired} validationBehavior="aria" isInvalid={error !== undefined} className={classNames('block', className)}>
      <FieldLabel label={label} hideLabel={hideLabel} isRequired={isRequired} />
      <div className={fieldFrame}>
        <AriaTextArea ref={areaRef} rows={rows} placeholder={placeholder} className={classNames('block w-full resize-y bg-transparent px-3 py-2 outline-none', mono && 'font-mono text-xs')} />
      </div>
      <FieldNotes help={help} error={error} />
    </AriaTextField>
  )
}
