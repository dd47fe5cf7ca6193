import { Check, Minus } from 'lucide-react'
import type { ReactNode } from 'react'
import { Checkbox as AriaCheckbox } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'

export interface CheckboxProps {
  children: ReactNode
  isSelected: boolean
  onChange: (isSelected: boolean) => void
  isIndeterminate?: boolean
  isDisabled?: boolean
  help?: ReactNode
  name?: string
  /** Instead of visible words, for example in a table's row. */
  'aria-label'?: string
  className?: string
}

export function Checkbox({ children, help, className, ...rest }: CheckboxProps) {
  return (
    <AriaCheckbox {...rest} className={classNames('group flex min-h-7 cursor-pointer items-start gap-2.5 py-0.5 data-disabled:opacity-55', className)}>
      {({ isSelected, isIndeterminate }) => (
        <>
          <span
            aria-hidden
            className={classNames(
              'mt-0.5 flex size-[18px] shrink-0 items-center justify-center rounded-sm border group-data-focus-visible:outline-2 group-data-focus-visible:outline-offset-2 group-data-focus-visible:outline-focus',
              isSelected || isIndeterminate ? 'border-accent bg-accent text-on-accent' : 'border-edge bg-sheet group-data-hovered:border-ink',
            )}
          >
            {isIndeterminate ? <Minus size={14} /> : isSelected ? <Check size={14} strokeWidth={3} /> : null}
          </span>
          <span>
            {children}
            {help && <span className="block text-xs text-muted">{help}</span>}
          </span>
        </>
      )}
    </AriaCheckbox>
  )
}
