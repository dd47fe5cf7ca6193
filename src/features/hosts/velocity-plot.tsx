import { useId } from 'react'
import { escapeSpeed } from '../../../core/systems/escape.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { GAP } from '../../../core/spaces.ts'
import { linearAxis } from '../../components/axis.ts'
import { DataTable, type DataColumn } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { PlotFrame } from '../../components/plot-frame.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'
import { formatCounted, formatMeasure, formatNumber, unitText } from '../../lib/format.ts'
import { useWidth } from '../../lib/use-width.ts'
import { Axes, type Box } from './axes.tsx'
import { ClassLegend, legendOf } from './class-legend.tsx'
import { massWords } from './mass-words.ts'
import { MemberMarks, type Member, type Pointing } from './member-marks.tsx'
import { Reading } from './reading.tsx'

const TITLE = 'Velocity against separation'
const MARGIN = { left: 64, right: 12, top: 10, bottom: 50 }
const INSIDE_HEIGHT = 300
/** The curve begins where it leaves the picture; nearer than this it is steeper than a line can show, kpc. */
const CURVE_FROM_KPC = 2
const CURVE_POINTS = 120

interface Moving extends Member {
  /** The median of the draws; of the adopted distances where there is none. kpc */
  r: number
  dv: number
}

/** Velocities of the satellites against their host over their separations, between the curves of the escape speed. */
export function VelocityPlot({ answer, pointing }: { answer: HostAnswer; pointing: Pointing }) {
  const [frame, width] = useWidth<HTMLDivElement>(560)
  const clip = useId()
  const { host, members } = answer
  const moving = members.flatMap((m): Moving[] => {
    const r = m.separationMedian ?? m.separation
    return r === null || m.dv === null ? [] : [{ ...m, r, dv: m.dv }]
  })
  if (moving.length === 0) {
    return (
      <>
        <SectionHeading>{TITLE}</SectionHeading>
        <EmptyState title="No velocities to compare">A satellite appears here as soon as its velocity and that of {host.name} are approved.</EmptyState>
      </>
    )
  }
  const legend = legendOf(moving, width - MARGIN.left)
  const box: Box = { left: MARGIN.left, right: width - MARGIN.right, top: MARGIN.top, bottom: MARGIN.top + INSIDE_HEIGHT }
  const height = box.bottom + MARGIN.bottom + legend.height
  const { across, up, cut } = scalesOf(moving, host, box)
  const curve = curvesOf(host, across.scale.domain()[1] ?? 0, (r, v) => `${across.scale(r).toFixed(1)},${up.scale(v).toFixed(1)}`)
  const edge = host.sphere === null ? null : across.scale(host.sphere)
  const pointed = moving.find((m) => m.slug === pointing.slug)
  return (
    <PlotFrame
      holdsControls
      title={TITLE}
      savedTitle={`${TITLE}: satellites of ${host.name}`}
      fileName={`${host.slug}-velocities`}
      alt={`Velocities of ${formatCounted(moving.length, 'satellite')} against ${host.name} over their separations${host.sphere === null ? '' : `; the sphere ends at ${formatNumber(host.sphere, 0)} kpc`}.`}
      table={<Numbers rows={moving} name={host.name} />}
      note={<Notes answer={answer} shown={moving.length} cut={cut} />}
    >
      <div ref={frame}>
        <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block max-w-full font-sans" role="group" aria-label={`${TITLE} in the ${host.name} system`}>
          <clipPath id={clip}>
            <rect x={box.left} y={box.top} width={box.right - box.left} height={box.bottom - box.top} />
          </clipPath>
          {edge !== null && edge < box.right && <rect x={box.left} width={edge - box.left} y={box.top} height={box.bottom - box.top} fillOpacity={0.45} className="fill-zone" />}
          <line x1={box.left} x2={box.right} y1={up.scale(0)} y2={up.scale(0)} className="stroke-line" />
          {edge !== null && edge < box.right && <line x1={edge} x2={edge} y1={box.top} y2={box.bottom} strokeDasharray="4 3" className="stroke-accent" />}
          <g clipPath={`url(#${clip})`} fill="none" strokeWidth={1.4}>
            {curve && curve.map((points) => <polyline key={points} points={points} className="stroke-edge" />)}
            {moving.map((m) => (
              <g key={m.slug} strokeWidth={1.2} className={m.slug === pointing.slug ? 'stroke-accent' : 'stroke-muted'}>
                {m.separationLo !== null && m.separationHi !== null && <line x1={across.scale(m.separationLo)} x2={across.scale(m.separationHi)} y1={up.scale(m.dv)} y2={up.scale(m.dv)} />}
                {m.dvErr !== null && <line x1={across.scale(m.r)} x2={across.scale(m.r)} y1={up.scale(m.dv - m.dvErr)} y2={up.scale(m.dv + m.dvErr)} />}
              </g>
            ))}
          </g>
          {edge !== null && edge < box.right && (
            <text x={edge - 5} y={box.bottom - 8} fontSize={13} textAnchor="end" className="fill-accent">
              sphere
            </text>
          )}
          {curve && (
            <text x={box.right - 8} y={box.top + 18} fontSize={13} textAnchor="end" strokeWidth={4} paintOrder="stroke" className="fill-muted stroke-sheet">
              curves: escape from {massWords(host.totalMass)}
            </text>
          )}
          <Axes box={box} x={{ ticks: across.ticks, label: 'separation / kpc' }} y={{ ticks: up.ticks, label: `Δv / ${unitText('km/s')}` }} />
          <MemberMarks label={`Satellites of ${host.name} by velocity and separation`} pointing={pointing} box={box} marks={moving.map((member) => ({ member, x: across.scale(member.r), y: up.scale(member.dv) }))} />
          <ClassLegend legend={legend} x={box.left} y={box.bottom + MARGIN.bottom} />
        </svg>
        <Reading member={pointed} />
      </div>
    </PlotFrame>
  )
}

/** Room for every mark and the sphere; a bar may go on beyond the frame. */
function scalesOf(moving: readonly Moving[], host: HostAnswer['host'], box: Box) {
  const farthest = 1.08 * Math.max(host.sphere ?? 0, ...moving.map((m) => m.r))
  const bars = moving.map((m) => m.separationHi ?? m.r)
  const right = Math.min(Math.max(farthest, ...bars), 1.5 * farthest)
  const escape = host.totalMass !== null && host.sphere !== null ? escapeSpeed(host.totalMass, host.sphere / 1000) : 0
  const fastest = 1.1 * Math.max(50, 1.15 * escape, ...moving.map((m) => Math.abs(m.dv) + (m.dvErr ?? 0)))
  const across = linearAxis(0, right, box.left, box.right)
  // Separations have a hard end: nothing lies left of the host.
  across.scale.domain([0, right])
  const ticks = across.scale.ticks(Math.max(2, Math.round((box.right - box.left) / 90))).map((value) => ({ at: across.scale(value), text: formatNumber(value, 0) }))
  return { across: { scale: across.scale, ticks }, up: linearAxis(-fastest, fastest, box.bottom, box.top), cut: bars.some((hi) => hi > right) }
}

function curvesOf(host: HostAnswer['host'], farthest: number, at: (r: number, v: number) => string): [string, string] | null {
  const { totalMass } = host
  if (totalMass === null || farthest <= CURVE_FROM_KPC) return null
  // Equal steps of the square root: points where the curve bends.
  const radii = Array.from({ length: CURVE_POINTS + 1 }, (_, i) => (Math.sqrt(CURVE_FROM_KPC) + (i / CURVE_POINTS) * (Math.sqrt(farthest) - Math.sqrt(CURVE_FROM_KPC))) ** 2)
  const speeds = radii.map((r) => escapeSpeed(totalMass, r / 1000))
  const line = (sign: number): string => radii.map((r, i) => at(r, sign * (speeds[i] ?? 0))).join(' ')
  return [line(1), line(-1)]
}

function Notes({ answer: { host, members }, shown, cut }: { answer: HostAnswer; shown: number; cut: boolean }) {
  const missing = members.length - shown
  const { value, error } = { value: host.dispersion, error: host.dispersionErr }
  return (
    <p className="text-sm text-muted">
      {value !== null && `Velocity dispersion ${formatMeasure({ value, plus: error, unit: unitText('km/s'), decimals: 0 })} from ${formatCounted(host.velocities, 'velocity', 'velocities')} (gapper, error by the jackknife). `}
      Marks stand at the median separation of the draws, bars from the 16th to the 84th percentile.
      {cut && ' Bars that end at the frame go on beyond it.'}
      {host.totalMass !== null && ` The curves are the speeds that escape from a point of ${massWords(host.totalMass)}, the policy’s total mass: common practice, and an upper bound inside a halo.`}
      {` Only the part of a velocity along the line of sight is seen.`}
      {missing > 0 && ` Without a velocity or separation: ${formatCounted(missing, 'satellite')}.`}
    </p>
  )
}

function Numbers({ rows, name }: { rows: readonly Moving[]; name: string }) {
  const columns: DataColumn<Moving>[] = [
    { key: 'name', header: 'Satellite', text: (m) => m.name, sortable: true },
    { key: 'r', header: 'Separation', unit: 'kpc', decimals: 0, text: (m) => m.r, sortable: true },
    { key: 'lo', header: '16 %', unit: 'kpc', decimals: 0, text: (m) => m.separationLo, sortable: true },
    { key: 'hi', header: '84 %', unit: 'kpc', decimals: 0, text: (m) => m.separationHi, sortable: true },
    { key: 'dv', header: 'Δv', unit: 'km/s', decimals: 0, text: (m) => m.dv, sortable: true },
    { key: 'dvErr', header: `σ${GAP}(Δv)`, unit: 'km/s', decimals: 0, text: (m) => m.dvErr, sortable: true },
  ]
  return <DataTable label={`Velocities against ${name}`} columns={columns} rows={rows} rowKey={(m) => m.slug} />
}
