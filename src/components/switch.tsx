import type { ReactNode } from 'react'
import { Switch as AriaSwitch } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'

export interface SwitchProps {
  children: ReactNode
  isSelected: boolean
  onChange: (isSelected: boolean) => void
  isDisabled?: boolean
  help?: ReactNode
  className?: string
}

/** For what takes effect at once; a choice that is sent with a form is a Checkbox. */
export function Switch({ children, help, className, ...rest }: SwitchProps) {
  return (
    <AriaSwitch {...rest} className={classNames('group flex min-h-7 cursor-pointer items-start gap-2.5 py-0.5 data-disabled:opacity-55', className)}>
      {({ isSelected }) => (
        <>
          <span
            aria-hidden
            className={classNames(
              'mt-0.5 flex h-5 w-9 shrink-0 items-center rounded-full border px-0.5 group-data-focus-visible:outline-2 group-data-focus-visible:outline-offset-2 group-data-focus-visible:outline-focus',
              isSelected ? 'border-accent bg-accent' : 'border-edge bg-well',
            )}
          >
            <span className={classNames('size-3.5 rounded-full transition-transform duration-150', isSelected ? 'translate-x-4 bg-on-accent' : 'bg-edge')} />
          </span>
          <span>
            {children}
            {help && <span className="block text-xs text-muted">{help}</span>}
          </span>
        </>
      )}
    </AriaSwitch>
  )
}
