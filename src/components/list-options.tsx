/** The rows of a drop-down list, the same for Select and ComboBox. */
import { Check } from 'lucide-react'
import { ListBoxItem, Text } from 'react-aria-components'

export interface Option {
  id: string
  label: string
  hint?: string
}

export const listPopover = 'min-w-(--trigger-width) max-w-[min(28rem,92vw)] rounded-md border border-line bg-sheet p-1 shadow-float'
export const listBox = 'max-h-80 overflow-y-auto outline-none'

export function ListOption({ option }: { option: Option }) {
  return (
    <ListBoxItem
      id={option.id}
      textValue={option.label}
      className="flex min-h-8 cursor-pointer items-center gap-2 rounded-sm px-3 py-1 text-ink outline-none data-focused:bg-well data-selected:font-semibold"
    >
      {({ isSelected }) => (
        <>
          <span className="flex min-w-0 flex-1 flex-col">
            <Text slot="label">{option.label}</Text>
            {option.hint && (
              <Text slot="description" className="text-xs font-normal text-muted">
                {option.hint}
              </Text>
            )}
          </span>
          {isSelected && <Check size={14} aria-hidden className="shrink-0" />}
        </>
      )}
    </ListBoxItem>
  )
}
