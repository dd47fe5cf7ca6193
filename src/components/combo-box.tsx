import { ChevronDown } from 'lucide-react'
import { Button, ComboBox as AriaComboBox, Group, Input, ListBox, Popover } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { FieldLabel, FieldNotes, fieldFrame, fieldInput, type FieldWords } from './field.tsx'
import { ListOption, listBox, listPopover, type Option } from './list-options.tsx'

export interface ComboBoxProps extends FieldWords {
  options: readonly Option[]
  value: string | null
  onChange: (id: string | null) => void
  onBlur?: () => void
  /** With `onInputChange` the options are found elsewhere (on the server) and shown as they come. */
  inputValue?: string
  onInputChange?: (text: string) => void
  allowsCustom?: boolean
  isLoading?: boolean
  /** Said in the list when nothing fits. */
  nothing?: string
  name?: string
  placeholder?: string
  isDisabled?: boolean
  isRequired?: boolean
  autoFocus?: boolean
  className?: string
}

const everything = (): boolean => true

export function ComboBox({
  label,
  hideLabel,
  help,
  error,
  options,
  value,
  onChange,
  inputValue,
  onInputChange,
  allowsCustom,
  isLoading,
  nothing = 'Nothing fits.',
  placeholder,
  className,
  isRequired,
  ...rest
}: ComboBoxProps) {
  return (
    <AriaComboBox
      {...rest}
      value={value}
      onChange={(key) => onChange(key === null ? null : String(key))}
      {...(inputValue !== undefined && { inputValue })}
      onInputChange={onInputChange}
      defaultFilter={onInputChange ? everything : undefined}
      allowsCustomValue={allowsCustom}
      // Before anything is typed into a search there is nothing to say.
      allowsEmptyCollection={inputValue === undefined || inputValue.trim() !== ''}
      menuTrigger="focus"
      isRequired={isRequired}
      validationBehavior="aria"
      isInvalid={error !== undefined}
      className={classNames('block', className)}
    >
      <FieldLabel label={label} hideLabel={hideLabel} isRequired={isRequired} />
      <Group className={fieldFrame}>
        <Input placeholder={placeholder} className={fieldInput} />
        <Button className="flex h-9 w-9 shrink-0 items-center justify-center text-muted data-hovered:text-ink">
          <ChevronDown size={16} aria-hidden />
        </Button>
      </Group>
      <FieldNotes help={help} error={error} />
      <Popover offset={4} className={listPopover}>
        <ListBox className={listBox} renderEmptyState={() => <p className="px-3 py-2 text-muted">{isLoading ? 'Looking …' : nothing}</p>}>
          {options.map((option) => (
            <ListOption key={option.id} option={option} />
          ))}
        </ListBox>
      </Popover>
    </AriaComboBox>
  )
}
