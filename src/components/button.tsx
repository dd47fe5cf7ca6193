import type { ReactNode } from 'react'
import { Button as AriaButton, type ButtonProps as AriaButtonProps } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'
import { KeyHint } from './key-hint.tsx'

export type ButtonKind = 'primary' | 'quiet' | 'danger' | 'plain'

export interface ButtonProps extends Omit<AriaButtonProps, 'className' | 'style' | 'children'> {
  /** One primary action a screen; `plain` has no border. */
  kind?: ButtonKind
  size?: 'small' | 'medium'
  icon?: ReactNode
  /** Shown beside the word; the shortcut itself is an action's (src/app/actions). */
  keys?: string
  children: ReactNode
  className?: string
}

const LOOKS: Record<ButtonKind, string> = {
  primary: 'border-accent bg-accent text-on-accent data-hovered:bg-accent-strong data-hovered:border-accent-strong',
  quiet: 'border-edge bg-sheet text-ink data-hovered:border-ink data-hovered:bg-well',
  danger: 'border-stop bg-sheet text-stop data-hovered:bg-stop-soft',
  plain: 'border-transparent bg-transparent text-ink data-hovered:bg-well',
}

/** The looks alone, for links that look like buttons. */
export function buttonLook(kind: ButtonKind, size: 'small' | 'medium' = 'medium'): string {
  return classNames(
    'inline-flex items-center justify-center gap-2 rounded-md border font-sans text-sm font-medium whitespace-nowrap no-underline select-none',
    size === 'small' ? 'min-h-7 px-2.5' : 'min-h-9 px-4',
    LOOKS[kind],
    'data-disabled:opacity-55 data-disabled:cursor-not-allowed data-pending:opacity-75',
  )
}

export function Button({ kind = 'quiet', size = 'medium', icon, keys, children, className, ...rest }: ButtonProps) {
  return (
    <AriaButton {...rest} className={classNames(buttonLook(kind, size), className)}>
      {({ isPending }) => (
        <>
          {icon}
          {children}
          {isPending && <span aria-hidden className="size-3.5 animate-spin rounded-full border-2 border-current border-r-transparent" />}
          {keys && <KeyHint keys={keys} />}
        </>
      )}
    </AriaButton>
  )
}
