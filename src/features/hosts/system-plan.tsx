import { useId, useState } from 'react'
import { supergalacticPosition } from '../../../core/astro/frames.ts'
import type { Vector } from '../../../core/astro/vector.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { linearAxis } from '../../components/axis.ts'
import { DataTable, type DataColumn } from '../../components/data-table.tsx'
import { PlotFrame } from '../../components/plot-frame.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Switch } from '../../components/switch.tsx'
import { formatNumber } from '../../lib/format.ts'
import { useWidth } from '../../lib/use-width.ts'
import { Axes, type Box } from './axes.tsx'
import { ClassLegend, legendOf } from './class-legend.tsx'
import { MemberMarks, type Member, type Pointing } from './member-marks.tsx'
import { Reading } from './reading.tsx'
import { onPaper, viewsOf, type View, type ViewKey } from './views.ts'

const LARGEST = 620
const MARGIN = { left: 58, right: 10, top: 10, bottom: 50 }
/** Inside the Galaxy that is the host there is no direction "to us". */
const AWAY_MPC = 0.02

type Placed = Member & { offset: [number, number, number] }

/** A system as a plan: the host at the centre, its satellites where they are, the sphere drawn round it. */
export function SystemPlan({ answer, pointing }: { answer: HostAnswer; pointing: Pointing }) {
  const [key, setKey] = useState<ViewKey>('supergalactic-face')
  const [withErrors, setWithErrors] = useState(false)
  const [frame, width] = useWidth<HTMLDivElement>(560)
  const clip = useId()
  const { host, members, system } = answer
  const views = viewsOf(system.shape)
  const view = views.find((v) => v.id === key) ?? views[0]
  if (!view) return null
  const placed = members.flatMap((m) => (m.offset ? [{ ...m, offset: m.offset }] : []))
  const sphere = host.sphere ?? 0
  const reach = 1.04 * Math.max(sphere, ...placed.map((m) => Math.hypot(...m.offset)), 50)
  const size = Math.min(width, LARGEST)
  const legend = legendOf(placed, size - MARGIN.left)
  const side = size - MARGIN.left - MARGIN.right
  const box: Box = { left: MARGIN.left, right: MARGIN.left + side, top: MARGIN.top, bottom: MARGIN.top + side }
  const across = linearAxis(-reach, reach, box.left, box.right)
  const up = linearAxis(-reach, reach, box.bottom, box.top)
  const centre = { x: across.scale(0), y: up.scale(0) }
  const height = box.bottom + MARGIN.bottom + legend.height
  const shape = system.shape
  return (
    <PlotFrame
      holdsControls
      title="Plan of the system"
      savedTitle={`Plan of the ${host.name} system`}
      fileName={`${host.slug}-plan`}
      alt={`${host.name} with ${placed.length} satellites seen ${view.words}; ${host.sphere === null ? 'its sphere is unknown' : `the sphere has a radius of ${formatNumber(sphere, 0)} kpc`}.`}
      table={<Places members={placed} name={host.name} />}
    >
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
        <RadioGroup label="Seen" look="chips" orientation="horizontal" options={views.map(({ id, label }) => ({ id, label }))} value={view.id} onChange={setKey} />
        <Switch isSelected={withErrors} onChange={setWithErrors}>
          Distance errors
        </Switch>
      </div>
      <div ref={frame}>
        <svg width={size} height={height} viewBox={`0 0 ${size} ${height}`} className="mx-auto block max-w-full font-sans" role="group" aria-label={`Plan of the ${host.name} system`}>
          {sphere > 0 && <circle cx={centre.x} cy={centre.y} r={across.scale(sphere) - centre.x} fillOpacity={0.45} strokeDasharray="4 3" className="fill-zone stroke-accent" />}
          {view.id === 'satellites-edge' && shape && (
            <rect x={box.left} width={side} y={up.scale(shape.height)} height={up.scale(-shape.height) - up.scale(shape.height)} className="fill-accent opacity-10" />
          )}
          <line x1={centre.x} x2={centre.x} y1={box.top} y2={box.bottom} className="stroke-line" />
          <line x1={box.left} x2={box.right} y1={centre.y} y2={centre.y} className="stroke-line" />
          <Axes box={box} x={{ ticks: across.ticks, label: `${view.rightLabel} / kpc` }} y={{ ticks: up.ticks, label: `${view.upLabel} / kpc` }} />
          <ToUs host={host} view={view} box={box} />
          <clipPath id={clip}>
            <rect x={box.left} y={box.top} width={side} height={side} />
          </clipPath>
          {withErrors && <g clipPath={`url(#${clip})`}>{placed.map((m) => <SightBar key={m.slug} member={m} view={view} x={across.scale} y={up.scale} />)}</g>}
          <circle cx={centre.x} cy={centre.y} r={6} className="fill-ink" />
          <text x={centre.x + 10} y={centre.y - 9} fontSize={15} strokeWidth={3} paintOrder="stroke" className="fill-ink stroke-sheet font-serif">
            {host.name}
          </text>
          <MemberMarks
            label={`Satellites of ${host.name} on the plan`}
            pointing={pointing}
            box={box}
            marks={placed.map((member) => {
              const { x, y } = onPaper(view, member.offset)
              return { member, x: across.scale(x), y: up.scale(y) }
            })}
          />
          <ClassLegend legend={legend} x={box.left} y={box.bottom + MARGIN.bottom} />
        </svg>
        <Reading member={placed.find((m) => m.slug === pointing.slug)} />
      </div>
    </PlotFrame>
  )
}

interface SightBarProps {
  member: Placed
  view: View
  x: (kpc: number) => number
  y: (kpc: number) => number
}

/** One standard deviation of the satellite's own distance, along the line of sight, as far as the picture goes. */
function SightBar({ member, view, x, y }: SightBarProps) {
  if (!member.sight) return null
  const { direction, nearer, farther } = member.sight
  const at = (kpc: number) => {
    const paper = onPaper(view, [member.offset[0] + kpc * direction[0], member.offset[1] + kpc * direction[1], member.offset[2] + kpc * direction[2]])
    return { x: x(paper.x), y: y(paper.y) }
  }
  const [a, b] = [at(-nearer), at(farther)]
  return <line x1={a.x} y1={a.y} x2={b.x} y2={b.y} strokeWidth={1.2} className="stroke-muted" />
}

/** The way to the observer, as an arrow at the frame: along it distances are least sure. */
function ToUs({ host, view, box }: { host: HostAnswer['host']; view: View; box: Box }) {
  if (host.distance === null || host.distance < AWAY_MPC) return null
  const away: Vector = supergalacticPosition(host.ra, host.dec, 1)
  const { x, y } = onPaper(view, [-away[0], -away[1], -away[2]])
  const inPlane = Math.hypot(x, y)
  // Seen nearly along the line of sight an arrow would say nothing.
  if (inPlane < 0.2) return null
  const [dx, dy] = [x / inPlane, -y / inPlane]
  const middle = { x: (box.left + box.right) / 2, y: (box.top + box.bottom) / 2 }
  const half = (box.right - box.left) / 2
  const edge = (half - 6) / Math.max(Math.abs(dx), Math.abs(dy))
  const tip = { x: middle.x + edge * dx, y: middle.y + edge * dy }
  const tail = { x: tip.x - 26 * inPlane * dx, y: tip.y - 26 * inPlane * dy }
  const barb = (side: number): string => `${tip.x - 7 * dx - side * 4 * dy},${tip.y - 7 * dy + side * 4 * dx}`
  const beside = tail.x > middle.x ? -8 : 8
  return (
    <g className="stroke-muted" fill="none" strokeWidth={1.4}>
      <line x1={tail.x} y1={tail.y} x2={tip.x} y2={tip.y} />
      <polyline points={`${barb(1)} ${tip.x},${tip.y} ${barb(-1)}`} />
      <text x={tail.x + beside} y={Math.min(box.bottom - 8, Math.max(box.top + 16, tail.y + 4))} fontSize={13} textAnchor={beside < 0 ? 'end' : 'start'} strokeWidth={4} paintOrder="stroke" className="fill-muted stroke-sheet">
        to us
      </text>
    </g>
  )
}

function Places({ members, name }: { members: readonly Placed[]; name: string }) {
  const columns: DataColumn<Placed>[] = [
    { key: 'name', header: 'Satellite', text: (m) => m.name, sortable: true },
    ...(['ΔSGX', 'ΔSGY', 'ΔSGZ'] as const).map((header, i): DataColumn<Placed> => ({ key: header, header, unit: 'kpc', decimals: 0, text: (m) => m.offset[i] ?? null, sortable: true })),
    { key: 'nearer', header: '− along the sight', unit: 'kpc', decimals: 0, text: (m) => m.sight?.nearer ?? null, sortable: true },
    { key: 'farther', header: '+ along the sight', unit: 'kpc', decimals: 0, text: (m) => m.sight?.farther ?? null, sortable: true },
  ]
  return <DataTable label={`Places about ${name}`} columns={columns} rows={members} rowKey={(m) => m.slug} />
}
