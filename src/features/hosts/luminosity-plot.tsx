import { scaleLog } from 'd3-scale'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { linearAxis } from '../../components/axis.ts'
import { DataTable, type DataColumn } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { PlotFrame } from '../../components/plot-frame.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'
import { formatCounted, formatNumber } from '../../lib/format.ts'
import { useWidth } from '../../lib/use-width.ts'
import { AbsoluteV, Axes, type Box } from './axes.tsx'
import { ClassLegend, legendOf } from './class-legend.tsx'
import { MemberMarks, type Member, type Pointing } from './member-marks.tsx'
import { Reading } from './reading.tsx'

const TITLE = 'Luminosity function'
const MARGIN = { left: 58, right: 14, top: 10, bottom: 50 }
const INSIDE_HEIGHT = 300
const LEAST = 0.6

type Step = HostAnswer['system']['luminosity']['steps'][number]

/** Satellites counted from the brightest to the faint, with the Poisson limits of each count. */
export function LuminosityPlot({ answer, pointing }: { answer: HostAnswer; pointing: Pointing }) {
  const [frame, width] = useWidth<HTMLDivElement>(560)
  const { host, members, system } = answer
  const { steps, missing } = system.luminosity
  const [first] = steps
  const last = steps.at(-1)
  if (!first || !last) {
    return (
      <>
        <SectionHeading>{TITLE}</SectionHeading>
        <EmptyState title="No magnitudes yet">A satellite is counted here as soon as a V magnitude and a distance of it are approved.</EmptyState>
      </>
    )
  }
  const box: Box = { left: MARGIN.left, right: width - MARGIN.right, top: MARGIN.top, bottom: MARGIN.top + INSIDE_HEIGHT }
  const legend = legendOf(
    members.filter((m) => steps.some((s) => s.slug === m.slug)),
    width - MARGIN.left,
  )
  const height = box.bottom + MARGIN.bottom + legend.height
  const across = linearAxis(first.absV - 0.3, last.absV + 0.3, box.left, box.right)
  const up = scaleLog([LEAST, 1.15 * last.hi], [box.bottom, box.top]).clamp(true)
  const ticks = [1, 2, 5, 10, 20, 50, 100, 200, 500].filter((n) => n < last.hi).map((n) => ({ at: up(n), text: String(n) }))
  const bySlug = new Map(members.map((m) => [m.slug, m]))
  const marks = steps.flatMap((step) => {
    const member = bySlug.get(step.slug)
    return member ? [{ member, x: across.scale(step.absV), y: up(step.count) }] : []
  })
  const stairs = (of: (step: Step) => number): [number, number][] =>
    steps.flatMap((step, i): [number, number][] => {
      const [x, y] = [across.scale(step.absV), up(of(step))]
      const next = steps[i + 1]
      return [[x, y], [next ? across.scale(next.absV) : x, y]]
    })
  const points = (list: readonly [number, number][]): string => list.map(([x, y]) => `${x.toFixed(1)},${y.toFixed(1)}`).join(' ')
  return (
    <PlotFrame
      holdsControls
      title={TITLE}
      savedTitle={`${TITLE}: satellites of ${host.name}`}
      fileName={`${host.slug}-luminosity-function`}
      alt={`Cumulative luminosity function of ${formatCounted(steps.length, 'satellite')} of ${host.name}, from M_V ${formatNumber(first.absV, 1)} to ${formatNumber(last.absV, 1)}.`}
      table={<Numbers steps={steps} members={bySlug} name={host.name} />}
      note={
        <p className="text-sm text-muted">
          The band holds the Poisson limits of each count, one standard deviation (Gehrels 1986). Nothing is corrected for satellites that no survey has reached: towards the faint end the counts are lower limits.
          {missing > 0 && ` Without a V magnitude, and so not counted: ${formatCounted(missing, 'satellite')}.`}
        </p>
      }
    >
      <div ref={frame}>
        <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block max-w-full font-sans" role="group" aria-label={`${TITLE} of the ${host.name} system`}>
          <polygon points={points([...stairs((s) => s.lo), ...stairs((s) => s.hi).reverse()])} className="fill-accent opacity-15" />
          <polyline points={points([[across.scale(first.absV), box.bottom], ...stairs((s) => s.count)])} fill="none" strokeWidth={1.6} className="stroke-ink" />
          {marks.map(({ member, y }) =>
            member.absV !== null && member.absVErr !== null ? (
              <line key={member.slug} x1={across.scale(member.absV - member.absVErr)} x2={across.scale(member.absV + member.absVErr)} y1={y} y2={y} strokeWidth={1.2} className="stroke-muted" />
            ) : null,
          )}
          <Axes box={box} x={{ ticks: across.ticks, label: <AbsoluteV /> }} y={{ ticks, label: 'satellites as bright or brighter' }} />
          <ClassLegend legend={legend} x={box.left} y={box.bottom + MARGIN.bottom} />
          <MemberMarks label={`Satellites of ${host.name} by luminosity`} pointing={pointing} box={box} marks={marks} />
        </svg>
        <Reading member={marks.find((m) => m.member.slug === pointing.slug)?.member} />
      </div>
    </PlotFrame>
  )
}

function Numbers({ steps, members, name }: { steps: readonly Step[]; members: ReadonlyMap<string, Member>; name: string }) {
  const columns: DataColumn<Step>[] = [
    { key: 'name', header: 'Satellite', text: (s) => members.get(s.slug)?.name ?? s.slug, sortable: true },
    { key: 'absV', header: 'M_V', unit: 'mag', decimals: 2, text: (s) => s.absV, sortable: true },
    { key: 'err', header: 'σ(M_V)', unit: 'mag', decimals: 2, text: (s) => members.get(s.slug)?.absVErr ?? null, sortable: true },
    { key: 'count', header: 'N', decimals: 0, text: (s) => s.count, sortable: true },
    { key: 'lo', header: 'Lower limit', decimals: 2, text: (s) => s.lo },
    { key: 'hi', header: 'Upper limit', decimals: 2, text: (s) => s.hi },
  ]
  return <DataTable label={`Luminosity function of the satellites of ${name}`} columns={columns} rows={steps} rowKey={(s) => s.slug} />
}
