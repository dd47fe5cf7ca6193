import { filterChips } from '../../../core/filters/describe.ts'
import { EMPTY_FILTER, type Filter } from '../../../core/filters/filter.ts'
import type { FilterLabels } from '../../../core/filters/words.ts'
import { useFilterCounts } from '../../api/filter-counts.ts'
import { Button } from '../../components/button.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { formatCounted } from '../../lib/format.ts'
import { choiceOf } from '../../lib/catalogue-filter.ts'

export interface NoGalaxiesProps {
  filter: Filter
  labels: FilterLabels
  onChange: (filter: Filter) => void
}

const MOST_OFFERED = 8

/** Nothing passes the filter: what each condition keeps out, and the way to lift it. */
export function NoGalaxies({ filter, labels, onChange }: NoGalaxiesProps) {
  const chips = filterChips(filter, labels).slice(0, MOST_OFFERED)
  const counts = useFilterCounts(chips.map((chip) => choiceOf(chip.without)))
  if (chips.length === 0) {
    return <EmptyState title="No galaxies yet">Galaxies will be here with their distances, hosts and sources as soon as a submission with one is approved.</EmptyState>
  }
  const helps = counts.some((count) => count !== undefined && count > 0)
  return (
    <EmptyState title="No galaxy passes these filters" action={<Button onPress={() => onChange({ ...EMPTY_FILTER, columns: filter.columns, sort: filter.sort, at: filter.at })}>Remove all filters</Button>}>
      <p>{helps || chips.length === 1 ? 'Without one of them there are:' : 'Each by itself keeps all out together with the others; remove more than one.'}</p>
      <ul className="mt-2 grid gap-1">
        {chips.map((chip, i) => {
          const count = counts[i]
          return (
            <li key={chip.key} className="flex flex-wrap items-baseline gap-x-3">
              <Button size="small" onPress={() => onChange(chip.without)}>
                {`Remove “${chip.label}”`}
              </Button>
              <span className="figures">{count === undefined ? '…' : formatCounted(count, 'galaxy', 'galaxies')}</span>
            </li>
          )
        })}
      </ul>
    </EmptyState>
  )
}
