import { ChevronDown } from 'lucide-react'
import { Button, ListBox, Popover, Select as AriaSelect, SelectValue } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, FieldNotes, type FieldWords } from './field.tsx'
import { ListOption, listBox, listPopover, type Option } from './list-options.tsx'

export interface SelectProps<Id extends string> extends FieldWords {
  options: readonly (Option & { id: Id })[]
  value: Id | null
  onChange: (id: Id) => void
  onBlur?: () => void
  placeholder?: string
  name?: string
  isDisabled?: boolean
  isRequired?: boolean
  className?: string
}

export function Select<Id extends string>({ label, hideLabel, help, error, options, value, onChange, placeholder = 'Choose', className, isRequired, ...rest }: SelectProps<Id>) {
  return (
    <AriaSelect
      {...rest}
      value={value}
      onChange={(key) => {
        const chosen = options.find((option) => option.id === key)
        if (chosen) onChange(chosen.id)
      }}
      placeholder={placeholder}
      isRequired={isRequired}
      validationBehavior="aria"
      isInvalid={error !== undefined}
      className={classNames('block', className)}
    >
      <FieldLabel label={label} hideLabel={hideLabel} isRequired={isRequired} />
      <Button
        className={classNames(
          'control flex w-full items-center justify-between gap-2 px-3 text-left data-disabled:opacity-60 data-hovered:border-ink',
          error !== undefined && 'border-2 border-stop',
        )}
      >
        <SelectValue className="min-w-0 flex-1 truncate data-placeholder:text-muted">{({ defaultChildren, selectedText }) => selectedText ?? defaultChildren}</SelectValue>
        <ChevronDown size={16} aria-hidden className="shrink-0 text-muted" />
      </Button>
      <FieldNotes help={help} error={error} />
      <Popover offset={4} className={listPopover}>
        <ListBox className={listBox}>
          {options.map((option) => (
            <ListOption key={option.id} option={option} />
          ))}
        </ListBox>
      </Popover>
    </AriaSelect>
  )
}
