import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names.ts'

export type BadgeTone = 'plain' | 'good' | 'caution' | 'stop' | 'accent'
export type BadgeShape = 'dot' | 'ring' | 'tick' | 'cross' | 'turn' | 'mark'

const TONES: Record<BadgeTone, string> = {
  plain: 'text-muted',
  good: 'text-good',
  caution: 'text-caution',
  stop: 'text-stop',
  accent: 'text-accent',
}

const STROKE = { fill: 'none', stroke: 'currentColor', strokeWidth: 2, strokeLinecap: 'round', strokeLinejoin: 'round' } as const

const SHAPES: Record<BadgeShape, ReactNode> = {
  dot: <circle cx="8" cy="8" r="4.5" fill="currentColor" />,
  ring: <circle cx="8" cy="8" r="4.5" {...STROKE} />,
  tick: <path d="M3 8.5 6.5 12 13 4.5" {...STROKE} />,
  cross: <path d="m4 4 8 8m0-8-8 8" {...STROKE} />,
  turn: <path d="M6.5 3 3 6.5 6.5 10M3 6.5h6.5a3.5 3.5 0 0 1 0 7H7" {...STROKE} />,
  mark: <path d="M8 3v6m0 3.6v.1" {...STROKE} strokeWidth={2.4} />,
}

/** The small shapes of states; a shape always goes with a word. */
export function StateShape({ shape, size = 14 }: { shape: BadgeShape; size?: number }) {
  return (
    <svg aria-hidden width={size} height={size} viewBox="0 0 16 16" className="shrink-0">
      {SHAPES[shape]}
    </svg>
  )
}

export interface BadgeProps {
  tone?: BadgeTone
  shape?: BadgeShape
  children: ReactNode
  className?: string
}

/** A state: a word with a shape, so that colour is never alone. */
export function Badge({ tone = 'plain', shape = 'dot', children, className }: BadgeProps) {
  return (
    <span className={classNames('inline-flex items-center gap-1.5 text-sm font-medium whitespace-nowrap', TONES[tone], className)}>
      <StateShape shape={shape} />
      {children}
    </span>
  )
}

interface Look {
  tone: BadgeTone
  shape: BadgeShape
  word: string
}

const SUBMISSION_STATES: Record<string, Look> = {
  draft: { tone: 'plain', shape: 'ring', word: 'draft' },
  submitted: { tone: 'accent', shape: 'dot', word: 'submitted' },
  returned: { tone: 'caution', shape: 'turn', word: 'returned' },
  approved: { tone: 'good', shape: 'tick', word: 'approved' },
  rejected: { tone: 'stop', shape: 'cross', word: 'rejected' },
  withdrawn: { tone: 'plain', shape: 'cross', word: 'withdrawn' },
}

/** Where a submission stands. */
export function StateBadge({ state }: { state: string }) {
  const look = SUBMISSION_STATES[state] ?? { tone: 'plain', shape: 'ring', word: state }
  return (
    <Badge tone={look.tone} shape={look.shape}>
      {look.word}
    </Badge>
  )
}

const GALAXY_STATES: Record<string, Look> = {
  confirmed: { tone: 'good', shape: 'tick', word: 'confirmed' },
  candidate: { tone: 'caution', shape: 'ring', word: 'candidate' },
  withdrawn: { tone: 'stop', shape: 'cross', word: 'withdrawn' },
}

/** Whether a galaxy is confirmed, a candidate or withdrawn. */
export function StatusBadge({ status }: { status: string }) {
  const look = GALAXY_STATES[status] ?? { tone: 'plain', shape: 'ring', word: status }
  return (
    <Badge tone={look.tone} shape={look.shape}>
      {look.word}
    </Badge>
  )
}

const OUTCOMES = {
  ok: { tone: 'good', shape: 'tick', word: 'In order: ' },
  warn: { tone: 'caution', shape: 'mark', word: 'Caution: ' },
  stop: { tone: 'stop', shape: 'cross', word: 'Stop: ' },
} as const satisfies Record<string, Look>

/** The sentence of an automatic check with its outcome. */
export function CheckMark({ outcome, children }: { outcome: 'ok' | 'warn' | 'stop'; children: ReactNode }) {
  const look = OUTCOMES[outcome]
  return (
    <span className={classNames('inline-flex items-start gap-1.5', TONES[look.tone])}>
      <span className="mt-1">
        <StateShape shape={look.shape} />
      </span>
      <span>
        <span className="sr-only">{look.word}</span>
        {children}
      </span>
    </span>
  )
}
