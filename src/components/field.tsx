/** What every field shares: label above, help below, the error in words beside the field. */
import { CircleAlert } from 'lucide-react'
import type { ReactNode } from 'react'
import { FieldError, Label, Text } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'

export interface FieldWords {
  label: string
  help?: ReactNode
  /** What is wrong and how to mend it; makes the field invalid. */
  error?: string
  /** The label stays for readers but is not shown. */
  hideLabel?: boolean
}

export function FieldLabel({ label, hideLabel, isRequired }: { label: string; hideLabel?: boolean; isRequired?: boolean }) {
  return (
    <Label className={hideLabel ? 'sr-only' : 'mb-1 block text-sm text-muted'}>
      {label}
      {isRequired && <span className="text-muted"> (needed)</span>}
    </Label>
  )
}

export function FieldNotes({ help, error }: { help?: ReactNode; error?: string }) {
  return (
    <>
      {help && (
        <Text slot="description" className="mt-1 block text-xs text-muted">
          {help}
        </Text>
      )}
      <FieldError className="mt-1 flex items-start gap-1.5 text-xs text-stop">
        {({ validationErrors }) => (
          <>
            <CircleAlert size={14} aria-hidden className="mt-0.5 shrink-0" />
            <span>{error ?? validationErrors.join(' ')}</span>
          </>
        )}
      </FieldError>
    </>
  )
}

/** The frame of an input with its unit inside. */
export const fieldFrame = classNames(
  'control flex w-full items-center overflow-hidden',
  'has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-focus has-[:focus-visible]:outline-offset-1',
  'has-[[data-invalid]]:border-stop has-[[data-invalid]]:border-2 has-[:disabled]:opacity-60',
)

export const fieldInput = 'min-w-0 flex-1 self-stretch bg-transparent px-3 py-1.5 outline-none figures'
