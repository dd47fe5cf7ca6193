import type { ReactNode } from 'react'

/** The small ribbon that the demonstration wears on every page. */
export function Ribbon({ children }: { children: ReactNode }) {
  return <span className="inline-flex min-h-6 items-center rounded-full border border-accent bg-accent-soft/50 px-2.5 text-xs whitespace-nowrap text-accent">{children}</span>
}
