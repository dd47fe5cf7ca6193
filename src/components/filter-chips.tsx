import { filterChips } from '../../core/filters/describe.ts'
import { EMPTY_FILTER, type Filter } from '../../core/filters/filter.ts'
import type { FilterLabels } from '../../core/filters/words.ts'
import { Button } from './button.tsx'
import { RemovableChip } from './chip.tsx'

export interface FilterChipsProps {
  filter: Filter
  labels: FilterLabels
  onChange: (filter: Filter) => void
}

/** What is filtered, each condition with the way to lift it. */
export function FilterChips({ filter, labels, onChange }: FilterChipsProps) {
  const chips = filterChips(filter, labels)
  if (chips.length === 0 && filter.at === null) return null
  return (
    <ul aria-label="Filters in force" className="flex flex-wrap items-center gap-2">
      {filter.at !== null && (
        <li>
          <RemovableChip removeLabel="Read the newest again" onRemove={() => onChange({ ...filter, at: null, cursor: null })}>
            {/^\d+$/.test(filter.at) ? `as of revision ${filter.at}` : `as of release ${filter.at}`}
          </RemovableChip>
        </li>
      )}
      {chips.map((chip) => (
        <li key={chip.key}>
          <RemovableChip removeLabel={`Remove the filter “${chip.label}”`} onRemove={() => onChange(chip.without)}>
            {chip.label}
          </RemovableChip>
        </li>
      ))}
      {chips.length > 1 && (
        <li>
          <Button kind="plain" size="small" onPress={() => onChange({ ...EMPTY_FILTER, columns: filter.columns, sort: filter.sort, at: filter.at })}>
            Remove all
          </Button>
        </li>
      )}
    </ul>
  )
}
