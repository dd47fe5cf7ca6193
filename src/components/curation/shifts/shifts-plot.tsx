import { useMemo, useState } from 'react'
import { useNavigate } from 'react-router-dom'
import { binsOf } from '../../../../core/shifts.ts'
import { formatCount } from '../../../lib/format.ts'
import { useWidth } from '../../../lib/use-width.ts'
import { paths } from '../../../paths.ts'
import { linearAxis } from '../../axis.ts'
import { shiftOn, shiftSentence, type ShiftRow, type ShiftScale } from './shift-words.ts'

const HEIGHT = 380
const TOP = 14
const BOTTOM = 52
const LEFT = 66
const HISTOGRAM = 110
const NARROW_BELOW = 560
/** Beyond so many, marks that fall on the same half pixel are drawn once. */
const SIMPLIFIED_BEYOND = 3000
/** How far the pointer may be from a mark, px. */
const REACH = 24

interface Mark {
  x: number
  y: number
  shift: ShiftRow
}

/** Every galaxy that moves: how far, against its distance; how many move so far at the side. By pointer or arrow keys each says who it is, and Enter opens it. */
export function ShiftsPlot({ shifts, scale }: { shifts: readonly ShiftRow[]; scale: ShiftScale }) {
  const navigate = useNavigate()
  const [frame, width] = useWidth<HTMLDivElement>(760)
  const [at, setAt] = useState<number | null>(null)
  const narrow = width < NARROW_BELOW
  const side = narrow ? 56 : HISTOGRAM
  const right = width - side - 16
  const plot = useMemo(() => layOut(shifts, scale, right), [shifts, scale, right])
  const { marks, x, y, bins } = plot
  const chosen = at === null ? undefined : marks[Math.min(at, marks.length - 1)]
  const most = Math.max(1, ...bins.map((b) => b.count))
  const dots = useMemo(() => dotsPath(marks.filter((m) => !m.shift.hostChanged)), [marks])
  const changed = marks.filter((m) => m.shift.hostChanged)

  const step = (by: number): void => setAt(Math.min(marks.length - 1, Math.max(0, (at ?? (by > 0 ? -1 : marks.length)) + by)))
  const open = (mark: Mark | undefined): void => {
    if (mark) void navigate(paths.galaxy(mark.shift.slug))
  }
  const nearest = (event: React.PointerEvent | React.MouseEvent): number | null => {
    const box = event.currentTarget.getBoundingClientRect()
    const [px, py] = [event.clientX - box.left, event.clientY - box.top]
    let best: number | null = null
    let least = REACH ** 2
    marks.forEach((m, i) => {
      const d = (m.x - px) ** 2 + (m.y - py) ** 2
      if (d < least) [best, least] = [i, d]
    })
    return best
  }

  return (
    <div ref={frame} className="w-full">
      <div
        role="slider"
        tabIndex={0}
        aria-label="Galaxies that move, by distance"
        aria-valuemin={1}
        aria-valuemax={Math.max(1, marks.length)}
        aria-valuenow={(at ?? 0) + 1}
        aria-valuetext={chosen ? shiftSentence(chosen.shift) : 'none chosen: arrow keys go from galaxy to galaxy, Enter opens one'}
        className="relative cursor-crosshair rounded-sm outline-none focus-visible:outline-2 focus-visible:outline-focus"
        onPointerMove={(event) => setAt(nearest(event))}
        onPointerLeave={() => setAt(null)}
        onClick={(event) => {
          const hit = nearest(event)
          if (hit !== null) open(marks[hit])
        }}
        onKeyDown={(event) => {
          const by = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1, PageUp: 10, PageDown: -10, Home: -marks.length, End: marks.length }[event.key]
          if (by !== undefined) {
            event.preventDefault()
            step(by)
          } else if (event.key === 'Enter') open(chosen)
        }}
      >
        <svg aria-hidden width={width} height={HEIGHT} viewBox={`0 0 ${width} ${HEIGHT}`} className="block max-w-full font-sans">
          {y.ticks.map((t) => (
            <g key={t.text}>
              <line x1={LEFT} x2={right} y1={t.at} y2={t.at} strokeWidth={1} className="stroke-line" />
              <text x={LEFT - 8} y={t.at + 4} fontSize={13} textAnchor="end" className="figures fill-muted">{t.text}</text>
            </g>
          ))}
          {x.ticks.map((t) => (
            <g key={t.text}>
              <line x1={t.at} x2={t.at} y1={HEIGHT - BOTTOM} y2={HEIGHT - BOTTOM + 5} strokeWidth={1} className="stroke-muted" />
              <text x={t.at} y={HEIGHT - BOTTOM + 20} fontSize={13} textAnchor="middle" className="figures fill-muted">{t.text}</text>
            </g>
          ))}
          <line x1={LEFT} x2={right} y1={HEIGHT - BOTTOM} y2={HEIGHT - BOTTOM} strokeWidth={1} className="stroke-line" />
          <line x1={LEFT} x2={right + side} y1={y.scale(0)} y2={y.scale(0)} strokeWidth={1.4} className="stroke-edge" />
          <path d={dots} fill="none" strokeWidth={5.5} strokeLinecap="round" strokeOpacity={marks.length > 300 ? 0.45 : 0.75} className="stroke-ramp-4" />
          {changed.map((m) => <path key={m.shift.slug} d={`M${m.x} ${m.y - 6}l6 6l-6 6l-6 -6z`} strokeWidth={1.2} className="fill-accent stroke-sheet" />)}
          {bins.map((b) => (
            <rect key={b.lo} x={right + 6} y={y.scale(b.hi) + 0.5} width={(b.count / most) * (side - 10)} height={Math.max(1, y.scale(b.lo) - y.scale(b.hi) - 1)} className="fill-ramp-4 opacity-40" />
          ))}
          <line x1={right + 6} x2={right + 6} y1={TOP} y2={HEIGHT - BOTTOM} strokeWidth={1} className="stroke-line" />
          <text x={(LEFT + right) / 2} y={HEIGHT - 8} fontSize={13.5} textAnchor="middle" className="fill-muted">distance before / Mpc</text>
          <text x={right + 6} y={HEIGHT - 8} fontSize={13} className="fill-muted">{narrow ? 'how many' : `how many (to ${formatCount(most)})`}</text>
          <text transform={`translate(15 ${(TOP + HEIGHT - BOTTOM) / 2}) rotate(-90)`} fontSize={13.5} textAnchor="middle" className="fill-muted">{scale === 'mag' ? 'shift of the modulus / mag' : 'shift / error of the modulus'}</text>
          {chosen && <circle cx={chosen.x} cy={chosen.y} r={8} fill="none" strokeWidth={2} className="stroke-focus" />}
        </svg>
        {chosen && <Note mark={chosen} right={right} />}
      </div>
    </div>
  )
}

function Note({ mark, right }: { mark: Mark; right: number }) {
  const toLeft = mark.x > right * 0.6
  return (
    <div
      aria-hidden
      className="pointer-events-none absolute z-10 max-w-64 rounded-md border border-line bg-sheet px-2.5 py-1.5 text-sm shadow-float"
      style={{ top: Math.max(0, mark.y - 44), ...(toLeft ? { right: `calc(100% - ${mark.x - 12}px)` } : { left: mark.x + 12 }) }}
    >
      {shiftSentence(mark.shift)}
    </div>
  )
}

function layOut(shifts: readonly ShiftRow[], scale: ShiftScale, right: number) {
  const placed = shifts.flatMap((shift) => {
    const value = shiftOn(scale, shift)
    return value === null ? [] : [{ shift, value }]
  })
  const values = placed.map((p) => p.value)
  const x = linearAxis(0, placed.reduce((most, p) => Math.max(most, p.shift.distance), 0.01), LEFT, right)
  const y = linearAxis(values.reduce((a, b) => Math.min(a, b), 0), values.reduce((a, b) => Math.max(a, b), 0), HEIGHT - BOTTOM, TOP)
  const [lo = 0, hi = 1] = y.scale.domain()
  const half = (value: number): number => Math.round(value * 2) / 2
  const marks = placed
    .map(({ shift, value }): Mark => ({ shift, x: half(x.scale(shift.distance)), y: half(y.scale(value)) }))
    .sort((a, b) => a.shift.distance - b.shift.distance)
  return { x, y, marks, bins: binsOf(values, lo, hi, 28).filter((b) => b.count > 0) }
}

/** All marks as one path of points with round caps: thousands cost what one does. */
function dotsPath(marks: readonly Mark[]): string {
  const points = marks.map((m) => `M${m.x} ${m.y}h0`)
  return (marks.length > SIMPLIFIED_BEYOND ? [...new Set(points)] : points).join('')
}
