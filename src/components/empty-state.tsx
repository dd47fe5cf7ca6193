import type { ReactNode } from 'react'

export interface EmptyStateProps {
  /** "No drafts yet" */
  title: string
  /** What will be here, and how to begin. */
  children: ReactNode
  action?: ReactNode
}

export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <div className="flex flex-col items-start gap-2 rounded-lg border border-dashed border-edge px-6 py-8">
      <p className="font-serif text-lg font-semibold">{title}</p>
      <div className="prose-measure text-muted">{children}</div>
      {action && <div className="mt-2 flex flex-wrap gap-3">{action}</div>}
    </div>
  )
}
