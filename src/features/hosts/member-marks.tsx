import { useRef, type KeyboardEvent, type MouseEvent } from 'react'
import { useNavigate } from 'react-router-dom'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import { paths } from '../../paths.ts'
import type { Box } from './axes.tsx'
import { memberWords } from './member-words.ts'

export type Member = HostAnswer['members'][number]

/** Which satellite is pointed at, in all pictures and the table of a page. */
export interface Pointing {
  slug: string | null
  point: (slug: string | null) => void
}

export interface MemberMark {
  member: Member
  /** px */
  x: number
  y: number
}

const MARK = 12
const HIT = 11
const STEPS: Readonly<Record<string, number>> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }

/** Satellites as the marks of their classes: one tab stop, arrows move among them, Enter or a click opens the galaxy. */
export function MemberMarks({ marks, pointing, box, label }: { marks: readonly MemberMark[]; pointing: Pointing; box: Box; label: string }) {
  const group = useRef<SVGGElement>(null)
  const navigate = useNavigate()
  const pointed = marks.find((m) => m.member.slug === pointing.slug)
  const tabStop = (pointed ?? marks[0])?.member.slug

  function move(event: KeyboardEvent, from: number): void {
    const step = STEPS[event.key]
    const target = event.key === 'Home' ? 0 : event.key === 'End' ? marks.length - 1 : step === undefined ? undefined : (from + step + marks.length) % marks.length
    if (target === undefined) return
    event.preventDefault()
    group.current?.querySelectorAll('a')[target]?.focus()
  }

  function open(event: MouseEvent, slug: string): void {
    if (event.ctrlKey || event.metaKey || event.shiftKey) return
    event.preventDefault()
    void navigate(paths.galaxy(slug))
  }

  return (
    <>
      <g ref={group} role="group" aria-label={label}>
        {marks.map(({ member, x, y }, index) => (
          <a
            key={member.slug}
            href={paths.galaxy(member.slug)}
            aria-label={memberWords(member)}
            tabIndex={member.slug === tabStop ? 0 : -1}
            className="outline-none"
            onFocus={() => pointing.point(member.slug)}
            onBlur={() => pointing.point(null)}
            onMouseEnter={() => pointing.point(member.slug)}
            onMouseLeave={() => pointing.point(null)}
            onKeyDown={(event) => move(event, index)}
            onClick={(event) => open(event, member.slug)}
          >
            <circle cx={x} cy={y} r={HIT} fill="transparent" />
            <g aria-hidden transform={`translate(${x - MARK / 2} ${y - MARK / 2})`}>
              <ClassMark galaxyClass={member.class} size={MARK} />
            </g>
          </a>
        ))}
      </g>
      {pointed && <PointedAt mark={pointed} box={box} />}
    </>
  )
}

/** A ring about the mark and its name beside it, on the side that has room. */
function PointedAt({ mark, box }: { mark: MemberMark; box: Box }) {
  const atLeft = mark.x > (box.left + box.right) / 2
  return (
    <g aria-hidden pointerEvents="none">
      <circle cx={mark.x} cy={mark.y} r={HIT} fill="none" strokeWidth={2} className="stroke-accent" />
      <text
        x={mark.x + (atLeft ? -HIT - 5 : HIT + 5)}
        y={Math.max(box.top + 14, mark.y - 4)}
        textAnchor={atLeft ? 'end' : 'start'}
        fontSize={14}
        fontWeight={600}
        strokeWidth={4}
        strokeLinejoin="round"
        paintOrder="stroke"
        className="fill-ink stroke-sheet"
      >
        {mark.member.name}
      </text>
    </g>
  )
}
