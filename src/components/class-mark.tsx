import type { ReactNode } from 'react'
import { classLabel, type GalaxyClass } from '../../core/classes.ts'
import { classNames } from '../lib/class-names.ts'

export interface ClassMarkProps {
  galaxyClass: GalaxyClass
  /** Side in px. */
  size?: number
  /** The class in words beside it; without them the mark is named for readers only when nothing else names it. */
  withLabel?: boolean
  className?: string
}

const FULL = { fill: 'currentColor' } as const
const OPEN = { fill: 'none', stroke: 'currentColor', strokeWidth: 1.8, strokeLinejoin: 'round' } as const

/** In a square of 12: one ink, a shape of its own for every class. */
const MARKS: Record<GalaxyClass, { colour: string; shape: ReactNode }> = {
  spiral: { colour: 'text-class-spiral', shape: <circle cx="6" cy="6" r="4.6" {...FULL} /> },
  lenticular: { colour: 'text-class-spiral', shape: <ellipse cx="6" cy="6" rx="5.6" ry="2.9" {...FULL} /> },
  elliptical: { colour: 'text-class-early', shape: <path d="M6 0.4 9.8 6 6 11.6 2.2 6Z" {...FULL} /> },
  'dwarf-elliptical': { colour: 'text-class-early', shape: <path d="M6 1.4 9.2 6 6 10.6 2.8 6Z" {...OPEN} /> },
  'dwarf-spheroidal': { colour: 'text-class-spheroidal', shape: <circle cx="6" cy="6" r="4" {...OPEN} /> },
  'ultra-faint': { colour: 'text-class-spheroidal', shape: <path d="M6 1.2v9.6M1.2 6h9.6" {...OPEN} strokeLinecap="round" /> },
  'dwarf-irregular': { colour: 'text-class-irregular', shape: <path d="M6 1 11.3 10.6H0.7Z" {...FULL} /> },
  transition: { colour: 'text-class-irregular', shape: <path d="M6 2 10.3 10H1.7Z" {...OPEN} /> },
  irregular: { colour: 'text-class-irregular', shape: <path d="M6 11 0.7 1.4h10.6Z" {...FULL} /> },
  'blue-compact': { colour: 'text-class-compact', shape: <rect x="1.9" y="1.9" width="8.2" height="8.2" {...FULL} /> },
  unknown: { colour: 'text-class-unknown', shape: <path d="m2 2 8 8m0-8-8 8" {...OPEN} strokeLinecap="round" /> },
}

/** The mark of a galaxy's class, the same on maps, tables and legends. */
export function ClassMark({ galaxyClass, size = 12, withLabel = false, className }: ClassMarkProps) {
  const mark = MARKS[galaxyClass]
  const label = classLabel(galaxyClass)
  const picture = (
    <svg {...(withLabel ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label })} width={size} height={size} viewBox="0 0 12 12" className={classNames('inline-block shrink-0', mark.colour, !withLabel && className)}>
      {mark.shape}
    </svg>
  )
  if (!withLabel) return picture
  return (
    <span className={classNames('inline-flex items-center gap-1.5 whitespace-nowrap', className)}>
      {picture}
      {label}
    </span>
  )
}
