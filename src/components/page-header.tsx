import type { ReactNode } from 'react'
import { Breadcrumbs, type Crumb } from './breadcrumbs.tsx'

export interface PageHeaderProps {
  title: ReactNode
  /** Quiet words after the title: "412 galaxies within 11 Mpc · release 2026.2". */
  aside?: ReactNode
  breadcrumbs?: readonly Crumb[]
  /** Chips and facts below the title. */
  chips?: ReactNode
  /** Buttons at the right, one primary at most. */
  actions?: ReactNode
  /** One or two sentences below. */
  intro?: ReactNode
}

/** The head of a page with its one `h1`. */
export function PageHeader({ title, aside, breadcrumbs, chips, actions, intro }: PageHeaderProps) {
  return (
    <header className="mb-5">
      {breadcrumbs && breadcrumbs.length > 0 && <Breadcrumbs items={breadcrumbs} />}
      <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
        <div className="flex min-w-0 flex-wrap items-baseline gap-x-4 gap-y-1">
          <h1 className="text-xl tracking-[-0.01em] sm:text-2xl">{title}</h1>
          {aside && <p className="figures text-muted">{aside}</p>}
        </div>
        {actions && <div className="flex flex-wrap items-center gap-3">{actions}</div>}
      </div>
      {intro && <p className="prose-measure mt-2 text-base text-muted">{intro}</p>}
      {chips && <div className="mt-2 flex flex-wrap items-center gap-2">{chips}</div>}
    </header>
  )
}
