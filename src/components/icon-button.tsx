import type { ReactNode } from 'react'
import { Button as AriaButton, type ButtonProps as AriaButtonProps } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { Tooltip } from './tooltip.tsx'

export interface IconButtonProps extends Omit<AriaButtonProps, 'className' | 'style' | 'children'> {
  /** The button's name, said by readers and shown on hover. */
  label: string
  icon: ReactNode
  keys?: string
  size?: 'small' | 'medium'
  className?: string
}

export function IconButton({ label, icon, keys, size = 'medium', className, ...rest }: IconButtonProps) {
  return (
    <Tooltip text={label} keys={keys}>
      <AriaButton
        {...rest}
        aria-label={label}
        className={classNames(
          'inline-flex shrink-0 items-center justify-center rounded-md border border-transparent text-muted data-hovered:bg-well data-hovered:text-ink data-pressed:bg-line data-disabled:opacity-50',
          size === 'small' ? 'size-7' : 'size-9',
          className,
        )}
      >
        {icon}
      </AriaButton>
    </Tooltip>
  )
}
