import { useMemo, useState } from 'react'
import type { Effect } from '../../../../core/schema/submissions.ts'
import { useScale } from '../../../api/scale.ts'
import { formatCount } from '../../../lib/format.ts'
import { PlotFrame } from '../../plot-frame.tsx'
import { RadioGroup } from '../../radio-group.tsx'
import { Select } from '../../select.tsx'
import { methodLabel, shiftsSentence, type ShiftScale } from './shift-words.ts'
import { ShiftsPlot } from './shifts-plot.tsx'
import { ShiftsTable } from './shifts-table.tsx'

const ALL = 'all'

/** The catalogue moving: the shifts of all moduli in a picture, then exactly which galaxies. */
export function ShiftsView({ effect }: { effect: Effect }) {
  const galaxies = useScale().data?.galaxies
  const [scale, setScale] = useState<ShiftScale>('mag')
  const [method, setMethod] = useState(ALL)
  const methods = useMemo(() => {
    const counts = new Map<string, number>()
    for (const s of effect.shifts) counts.set(s.method ?? '', (counts.get(s.method ?? '') ?? 0) + 1)
    return [...counts].sort((a, b) => b[1] - a[1])
  }, [effect])
  const shown = useMemo(() => (method === ALL ? effect.shifts : effect.shifts.filter((s) => (s.method ?? '') === method)), [effect, method])
  const sentence = shiftsSentence(effect, galaxies)
  const hostsMove = shown.some((s) => s.hostChanged)
  return (
    <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-6">
      <p className="font-serif text-lg">{sentence}</p>
      <PlotFrame
        title="How far each galaxy moves"
        level={3}
        fileName="shifts"
        holdsControls
        alt={`Shifts of distance moduli against distance. ${sentence}`}
        note={
          <p className="flex flex-wrap gap-x-5 gap-y-1 text-sm text-muted">
            <span className="inline-flex items-center gap-1.5"><svg aria-hidden width={10} height={10}><circle cx={5} cy={5} r={3.4} className="fill-ramp-4" /></svg>moves</span>
            {hostsMove && <span className="inline-flex items-center gap-1.5"><svg aria-hidden width={12} height={12}><path d="M6 0l6 6l-6 6l-6 -6z" className="fill-accent" /></svg>moves, and changes host</span>}
            <span>Bars at the side: how many move so far.</span>
          </p>
        }
      >
        <div className="mb-2 flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
          <RadioGroup label="Shift" look="chips" orientation="horizontal" options={[{ id: 'mag', label: 'in mag' }, { id: 'errors', label: 'in units of its error' }]} value={scale} onChange={(id) => setScale(id === 'errors' ? 'errors' : 'mag')} />
          {methods.length > 1 && (
            <div className="w-72 max-w-full">
              <Select
                label="Distances by"
                options={[{ id: ALL, label: 'all methods', hint: formatCount(effect.shifts.length) }, ...methods.map(([key, count]) => ({ id: key, label: methodLabel(key || null), hint: formatCount(count) }))]}
                value={method}
                onChange={setMethod}
              />
            </div>
          )}
        </div>
        <ShiftsPlot shifts={shown} scale={scale} />
      </PlotFrame>
      <section className="min-w-0">
        <h3 className="mb-2 text-base">Exactly which galaxies</h3>
        <ShiftsTable shifts={shown} effect={effect} />
      </section>
    </div>
  )
}
