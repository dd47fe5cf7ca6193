import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names.ts'

export interface SheetProps {
  title?: ReactNode
  /** At the right of the title. */
  actions?: ReactNode
  children: ReactNode
  as?: 'section' | 'div' | 'li' | 'article'
  level?: 2 | 3
  /** Outlined in the accent: the one that is open. */
  selected?: boolean
  /** Without inner padding below the title, for tables. */
  flush?: boolean
  className?: string
}

/** A sheet of paper on the page: one subject, with its title. */
export function Sheet({ title, actions, children, as: Element = 'section', level = 2, selected, flush, className }: SheetProps) {
  const Heading = level === 2 ? 'h2' : 'h3'
  return (
    <Element className={classNames('rounded-lg border bg-sheet', selected ? 'border-accent' : 'border-line', flush ? '' : 'p-4 sm:p-6', className)}>
      {(title || actions) && (
        <div className={classNames('flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1', flush ? 'px-4 pt-4 pb-3 sm:px-6' : 'mb-3')}>
          {title ? <Heading className="text-lg">{title}</Heading> : <span />}
          {actions && <div className="-my-1.5 flex flex-wrap items-center gap-2">{actions}</div>}
        </div>
      )}
      {children}
    </Element>
  )
}
