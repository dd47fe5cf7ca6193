import type { ReactNode } from 'react'

export interface SectionHeadingProps {
  children: ReactNode
  level?: 2 | 3
  actions?: ReactNode
  note?: ReactNode
}

export function SectionHeading({ children, level = 2, actions, note }: SectionHeadingProps) {
  const Heading = level === 2 ? 'h2' : 'h3'
  return (
    <div className="mb-3 flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
      <div className="flex flex-wrap items-baseline gap-x-3">
        <Heading className={level === 2 ? 'text-lg' : 'text-base'}>{children}</Heading>
        {note && <p className="text-muted">{note}</p>}
      </div>
      {actions && <div className="flex flex-wrap items-center gap-2">{actions}</div>}
    </div>
  )
}
