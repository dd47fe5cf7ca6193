import { useState } from 'react'
import { scaleLinear } from 'd3-scale'
import { classLabel } from '../../../core/classes.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'
import { PlotFrame } from '../../components/plot-frame.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { formatNumber, MINUS } from '../../lib/format.ts'

const SIZE = 460
const MARGIN = 46

const VIEWS = {
  'sgx-sgy': { x: 0, y: 1, xLabel: 'ΔSGX', yLabel: 'ΔSGY', words: 'seen from the pole of the supergalactic plane' },
  'sgx-sgz': { x: 0, y: 2, xLabel: 'ΔSGX', yLabel: 'ΔSGZ', words: 'seen edge on, with the supergalactic plane level' },
} as const
type View = keyof typeof VIEWS

/** A system as a plan: the host at the centre, its satellites where they are, the sphere drawn round it. */
export function SystemPlan({ answer }: { answer: HostAnswer }) {
  const [view, setView] = useState<View>('sgx-sgy')
  const { x, y, xLabel, yLabel, words } = VIEWS[view]
  const placed = answer.members.flatMap((m) => (m.offset ? [{ ...m, offset: m.offset }] : []))
  const sphere = answer.host.sphere ?? 0
  const reach = 1.08 * Math.max(sphere, ...placed.map((m) => Math.max(Math.abs(m.offset[x]), Math.abs(m.offset[y]))), 50)
  const across = scaleLinear([-reach, reach], [MARGIN, SIZE - MARGIN])
  const up = scaleLinear([-reach, reach], [SIZE - MARGIN, MARGIN])
  const ticks = across.ticks(5)
  const label = (kpc: number): string => (kpc < 0 ? MINUS : '') + Math.abs(kpc)
  return (
    <PlotFrame holdsControls
      title="Plan of the system"
      fileName={`${answer.host.slug}-plan`}
      alt={`${answer.host.name} with ${placed.length} satellites ${words}; the sphere has a radius of ${formatNumber(sphere, 0)} kpc.`}
    >
      <RadioGroup
        label="Seen"
        look="chips"
        orientation="horizontal"
        options={[
          { id: 'sgx-sgy', label: 'face on' },
          { id: 'sgx-sgz', label: 'edge on' },
        ]}
        value={view}
        onChange={(id) => setView(id === 'sgx-sgz' ? 'sgx-sgz' : 'sgx-sgy')}
      />
      <svg viewBox={`0 0 ${SIZE} ${SIZE}`} className="mx-auto block w-full max-w-[36rem]" role="group" aria-label={`Plan of the ${answer.host.name} system`} fontFamily="var(--font-sans)" fontSize={12}>
        <rect x={MARGIN} y={MARGIN} width={SIZE - 2 * MARGIN} height={SIZE - 2 * MARGIN} fill="none" stroke="var(--line)" />
        {sphere > 0 && <circle cx={across(0)} cy={up(0)} r={across(sphere) - across(0)} fill="var(--zone)" fillOpacity={0.45} stroke="var(--accent)" strokeDasharray="4 3" />}
        <line x1={across(0)} x2={across(0)} y1={MARGIN} y2={SIZE - MARGIN} stroke="var(--line)" />
        <line x1={MARGIN} x2={SIZE - MARGIN} y1={up(0)} y2={up(0)} stroke="var(--line)" />
        {ticks.map((t) => (
          <g key={t} fill="var(--muted)">
            <line x1={across(t)} x2={across(t)} y1={SIZE - MARGIN} y2={SIZE - MARGIN + 5} stroke="var(--edge)" />
            <text x={across(t)} y={SIZE - MARGIN + 18} textAnchor="middle">{label(t)}</text>
            <line x1={MARGIN - 5} x2={MARGIN} y1={up(t)} y2={up(t)} stroke="var(--edge)" />
            <text x={MARGIN - 9} y={up(t) + 4} textAnchor="end">{label(t)}</text>
          </g>
        ))}
        <text x={SIZE / 2} y={SIZE - 8} textAnchor="middle" fill="var(--muted)">{xLabel} / kpc</text>
        <text transform={`translate(11 ${SIZE / 2}) rotate(-90)`} textAnchor="middle" fill="var(--muted)">{yLabel} / kpc</text>
        {placed.map((m) => (
          <circle key={m.slug} cx={across(m.offset[x])} cy={up(m.offset[y])} r={3.4} fill="var(--sheet)" stroke="var(--ink)" strokeWidth={1.4}>
            <title>{`${m.name}, ${classLabel(m.class)}, ${formatNumber(m.separation, 0)} kpc from ${answer.host.name}`}</title>
          </circle>
        ))}
        <circle cx={across(0)} cy={up(0)} r={6} fill="var(--ink)" />
        <text x={across(0) + 10} y={up(0) - 9} fontFamily="var(--font-serif)" fontSize={15} fill="var(--ink)" stroke="var(--sheet)" strokeWidth={3} paintOrder="stroke">
          {answer.host.name}
        </text>
      </svg>
    </PlotFrame>
  )
}
