import { X } from 'lucide-react'
import type { ReactNode } from 'react'
import { Button } from 'react-aria-components'
import { classNames } from '../lib/class-names.ts'

export interface ChipProps {
  children: ReactNode
  tone?: 'plain' | 'accent'
  icon?: ReactNode
  className?: string
}

const FRAME = 'inline-flex min-h-7 max-w-full items-center gap-1.5 rounded-full border bg-sheet px-3 text-sm'

/** A short fact about the thing in hand: its class, its host. */
export function Chip({ children, tone = 'plain', icon, className }: ChipProps) {
  return (
    <span className={classNames(FRAME, tone === 'accent' ? 'border-accent text-accent' : 'border-line text-ink', className)}>
      {icon}
      {children}
    </span>
  )
}

export interface RemovableChipProps {
  children: ReactNode
  onRemove: () => void
  /** Said by readers: "Remove the filter on distance". */
  removeLabel: string
}

/** A filter in force, with the way to lift it. */
export function RemovableChip({ children, onRemove, removeLabel }: RemovableChipProps) {
  return (
    <span className={classNames(FRAME, 'border-line pr-0.5 text-ink')}>
      <span className="min-w-0 truncate">{children}</span>
      <Button aria-label={removeLabel} onPress={onRemove} className="flex size-6 shrink-0 items-center justify-center rounded-full text-muted data-hovered:bg-well data-hovered:text-ink">
        <X size={14} aria-hidden />
      </Button>
    </span>
  )
}
