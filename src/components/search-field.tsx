import { Search, X } from 'lucide-react'
import type { Ref } from 'react'
import { Button, Group, Input, SearchField as AriaSearchField } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, fieldFrame, fieldInput } from './field.tsx'

export interface SearchFieldProps {
  label: string
  value: string
  onChange: (value: string) => void
  onSubmit?: (value: string) => void
  placeholder?: string
  /** True unless said otherwise: the placeholder and the lens speak for it. */
  hideLabel?: boolean
  inputRef?: Ref<HTMLInputElement>
  className?: string
}

export function SearchField({ label, placeholder, hideLabel = true, inputRef, className, ...rest }: SearchFieldProps) {
  return (
    <AriaSearchField {...rest} className={classNames('group block', className)}>
      <FieldLabel label={label} hideLabel={hideLabel} />
      <Group className={fieldFrame}>
        <Search size={16} aria-hidden className="ml-3 shrink-0 text-muted" />
        <Input ref={inputRef} placeholder={placeholder} className={classNames(fieldInput, 'pl-2 [&::-webkit-search-cancel-button]:hidden')} />
        <Button className="flex h-9 w-9 shrink-0 items-center justify-center text-muted group-data-empty:invisible data-hovered:text-ink">
          <X size={16} aria-hidden />
        </Button>
      </Group>
    </AriaSearchField>
  )
}
