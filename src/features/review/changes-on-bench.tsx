import { ChevronLeft, ChevronRight } from 'lucide-react'
import { useEffect, useRef } from 'react'
import type { ChangeAnswer } from '../../../core/schema/submissions.ts'
import { StateShape } from '../../components/badge.tsx'
import { ChangeCard } from '../../components/curation/change-card.tsx'
import { IconButton } from '../../components/icon-button.tsx'
import { classNames } from '../../lib/class-names.ts'
import { formatCounted } from '../../lib/format.ts'

interface Props {
  items: readonly ChangeAnswer[]
  /** Index of the change that lies open. */
  at: number
  onAt: (at: number) => void
}

type Worst = 'ok' | 'warn' | 'stop'

/** The worst that checks and conflicts say of a change. */
function worstOf(change: ChangeAnswer): Worst {
  if (change.conflicts.length > 0 || change.checks.some((c) => c.level === 'stop')) return 'stop'
  return change.checks.some((c) => c.level === 'warn') ? 'warn' : 'ok'
}

const MARKS = {
  ok: { tone: 'text-good', shape: 'tick', word: 'in order' },
  warn: { tone: 'text-caution', shape: 'mark', word: 'caution' },
  stop: { tone: 'text-stop', shape: 'cross', word: 'stop' },
} as const

/** The changes of a submission, one open at a time; the list above says at a glance where to look. */
export function ChangesOnBench({ items, at, onAt }: Props) {
  const open = items[at]
  const card = useRef<HTMLDivElement>(null)
  const before = useRef(at)
  useEffect(() => {
    if (before.current === at) return
    before.current = at
    card.current?.focus({ preventScroll: true })
    card.current?.scrollIntoView({ block: 'nearest' })
  }, [at])
  if (!open) return null
  const cautions = items.flatMap((change, i) => (worstOf(change) === 'ok' ? [] : [i]))
  const nextCaution = cautions.find((i) => i > at) ?? cautions[0]
  return (
    <section aria-label="Changes" className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-3">
      {items.length > 1 && (
        <div className="rounded-lg border border-line bg-sheet">
          <div className="flex flex-wrap items-center justify-between gap-2 border-b border-line px-4 py-2">
            <p className="figures">
              <strong className="font-semibold">Change {at + 1}</strong> of {items.length}
              {cautions.length > 0 && nextCaution !== undefined && (
                <button type="button" onClick={() => onAt(nextCaution)} className="ml-3 min-h-6 text-caution underline underline-offset-2">
                  {formatCounted(cautions.length, 'change')} to look at twice
                </button>
              )}
            </p>
            <span className="flex gap-1">
              <IconButton label="Previous change" keys="k" size="small" icon={<ChevronLeft size={16} aria-hidden />} isDisabled={at === 0} onPress={() => onAt(at - 1)} />
              <IconButton label="Next change" keys="j" size="small" icon={<ChevronRight size={16} aria-hidden />} isDisabled={at === items.length - 1} onPress={() => onAt(at + 1)} />
            </span>
          </div>
          <ol className="relative max-h-44 overflow-y-auto py-1">
            {items.map((change, i) => (
              <ListedChange key={change.id} change={change} isOpen={i === at} onOpen={() => onAt(i)} />
            ))}
          </ol>
        </div>
      )}
      <div ref={card} tabIndex={-1} className="min-w-0 scroll-mt-24 rounded-lg outline-none">
        <ChangeCard key={open.id} change={open} number={at + 1} of={items.length} />
      </div>
    </section>
  )
}

function ListedChange({ change, isOpen, onOpen }: { change: ChangeAnswer; isOpen: boolean; onOpen: () => void }) {
  const row = useRef<HTMLButtonElement>(null)
  useEffect(() => {
    const list = row.current?.closest('ol')
    // Only the list scrolls; the page stays where the reader has it.
    if (isOpen && row.current && list) list.scrollTop = Math.max(0, row.current.offsetTop - list.clientHeight / 2)
  }, [isOpen])
  const mark = MARKS[worstOf(change)]
  return (
    <li>
      <button
        ref={row}
        type="button"
        aria-current={isOpen ? 'true' : undefined}
        onClick={onOpen}
        className={classNames('flex min-h-8 w-full items-center gap-2.5 border-l-2 px-4 text-left text-sm hover:bg-well', isOpen ? 'border-accent bg-well font-semibold' : 'border-transparent')}
      >
        <span className={mark.tone}>
          <StateShape shape={mark.shape} />
        </span>
        <span className="min-w-0 flex-1 truncate">{change.subject}</span>
        <span className="sr-only">{mark.word}</span>
        {change.standing?.published && <span className="figures shrink-0 text-muted">{change.standing.published}</span>}
      </button>
    </li>
  )
}
