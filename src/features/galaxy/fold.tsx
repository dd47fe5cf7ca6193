import { ChevronRight } from 'lucide-react'
import { useState, type ReactNode } from 'react'

export interface FoldProps {
  summary: ReactNode
  children: () => ReactNode
}

/** A line that opens; what is inside is drawn only then. */
export function Fold({ summary, children }: FoldProps) {
  const [isOpen, setOpen] = useState(false)
  return (
    <details className="group border-b border-line" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="flex min-h-10 cursor-pointer list-none items-center gap-2 rounded-sm px-2 py-1.5 hover:bg-well [&::-webkit-details-marker]:hidden">
        <ChevronRight size={14} aria-hidden className="shrink-0 text-muted transition-transform group-open:rotate-90" />
        <span className="flex min-w-0 flex-1 flex-wrap items-baseline justify-between gap-x-4">{summary}</span>
      </summary>
      {isOpen && <div className="px-2 pt-1 pb-4 sm:pl-7">{children()}</div>}
    </details>
  )
}
