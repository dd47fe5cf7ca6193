import { ChevronRight } from 'lucide-react'
import type { ReactNode } from 'react'
import type { Filter } from '../../../core/filters/filter.ts'
import type { Facets } from '../../../core/schema/catalogue.ts'
import { Skeleton } from '../skeleton.tsx'
import { ChoiceFacet } from './choice-facet.tsx'
import { RangeFacet } from './range-facet.tsx'

/** In the order of the panel; those that are not open begin folded unless they filter. */
const FACETS: readonly { column: string; title: string; kind: 'choice' | 'range'; open: boolean }[] = [
  { column: 'host', title: 'Host', kind: 'choice', open: true },
  { column: 'class', title: 'Class', kind: 'choice', open: true },
  { column: 'distance', title: 'Distance', kind: 'range', open: true },
  { column: 'abs_v', title: 'Luminosity', kind: 'range', open: true },
  { column: 'host_relation', title: 'Host or satellite', kind: 'choice', open: true },
  { column: 'status', title: 'Status', kind: 'choice', open: true },
  { column: 'distance_method', title: 'Distance method', kind: 'choice', open: false },
  { column: 'v_lg', title: 'Velocity', kind: 'range', open: false },
  { column: 'tidal_index', title: 'Tidal index', kind: 'range', open: false },
]

export interface FacetPanelProps {
  facets: Facets | undefined
  filter: Filter
  onChange: (filter: Filter) => void
}

/** What the catalogue can be narrowed by, with what each choice would leave. */
export function FacetPanel({ facets, filter, onChange }: FacetPanelProps) {
  if (!facets) return <Skeleton height={640} label="Loading the filters" />
  return (
    <div className="grid">
      {FACETS.map(({ column, title, kind, open }) => {
        const inForce = column in filter.conditions || filter.lacks.includes(column)
        const choices = facets.choices[column]
        const histogram = facets.histograms[column]
        if (kind === 'choice' ? !choices?.length : !histogram) return null
        return (
          <Fold key={column} title={title} open={open || inForce}>
            {kind === 'choice' && choices && <ChoiceFacet column={column} choices={choices} filter={filter} onChange={onChange} />}
            {kind === 'range' && histogram && <RangeFacet column={column} histogram={histogram} filter={filter} onChange={onChange} />}
          </Fold>
        )
      })}
    </div>
  )
}

function Fold({ title, open, children }: { title: string; open: boolean; children: ReactNode }) {
  return (
    <details open={open} className="group border-b border-line py-2 last:border-b-0">
      <summary className="flex min-h-8 cursor-pointer list-none items-center gap-1.5 rounded-sm font-semibold [&::-webkit-details-marker]:hidden">
        <ChevronRight size={14} aria-hidden className="text-muted transition-transform group-open:rotate-90" />
        {title}
      </summary>
      <div className="pt-1 pb-2 pl-1">{children}</div>
    </details>
  )
}
