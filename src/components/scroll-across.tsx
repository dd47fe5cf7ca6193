import { useEffect, useRef, useState, type ReactNode } from 'react'
import { classNames } from '../lib/class-names.ts'

/** A wide table on a narrow screen: it scrolls across, and those without a pointer can reach it when there is something to scroll to. */
export function ScrollAcross({ label, children, className }: { label: string; children: ReactNode; className?: string }) {
  const box = useRef<HTMLDivElement>(null)
  const [overflows, setOverflows] = useState(false)
  useEffect(() => {
    const target = box.current
    if (!target) return
    const observer = new ResizeObserver(() => setOverflows(target.scrollWidth > target.clientWidth + 1))
    observer.observe(target)
    return () => observer.disconnect()
  }, [])
  return (
    <div ref={box} role={overflows ? 'group' : undefined} aria-label={overflows ? label : undefined} tabIndex={overflows ? 0 : undefined} className={classNames('relative overflow-x-auto', className)}>
      {children}
    </div>
  )
}
