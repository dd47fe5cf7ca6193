import { useState } from 'react'
import { classLabel, GALAXY_CLASSES } from '../../../core/classes.ts'
import { chosenValues, choosing, type Filter } from '../../../core/filters/filter.ts'
import type { Facets } from '../../../core/schema/catalogue.ts'
import { Button } from '../button.tsx'
import { Checkbox } from '../checkbox.tsx'
import { ClassMark } from '../class-mark.tsx'
import { formatCount } from '../../lib/format.ts'

type Choice = Facets['choices'][string][number]

export interface ChoiceFacetProps {
  column: string
  choices: readonly Choice[]
  filter: Filter
  onChange: (filter: Filter) => void
}

const SHOWN_FIRST = 7

/** The values of one column with how many galaxies each would leave. */
export function ChoiceFacet({ column, choices, filter, onChange }: ChoiceFacetProps) {
  const [all, setAll] = useState(false)
  const chosen = chosenValues(filter, column)
  const isChosen = (choice: Choice): boolean => (choice.value === null ? filter.lacks.includes(column) : chosen.includes(choice.value))
  // What is chosen is always in sight.
  const shown = all ? choices : choices.filter((choice, i) => i < SHOWN_FIRST || isChosen(choice))
  const most = Math.max(1, ...choices.map((choice) => choice.count))
  return (
    <div>
      <ul>
        {shown.map((choice) => (
          <li key={choice.value ?? ''} className="relative">
            <span aria-hidden className="absolute bottom-0 left-7 h-px bg-edge" style={{ width: `calc((100% - 4.5rem) * ${choice.count / most})` }} />
            <Checkbox className="w-full [&>span:last-child]:flex-1" isSelected={isChosen(choice)} onChange={(on) => onChange(toggled(filter, column, choice.value, on))}>
              <span className="flex items-baseline justify-between gap-2">
                <span className="min-w-0">{column === 'class' ? <ClassWords value={choice.value} label={choice.label} /> : sentenceCase(choice.label)}</span>
                <span className="figures text-muted">{formatCount(choice.count)}</span>
              </span>
            </Checkbox>
          </li>
        ))}
      </ul>
      {choices.length > shown.length && (
        <Button kind="plain" size="small" onPress={() => setAll(true)} className="-ml-2">
          {`All ${choices.length}`}
        </Button>
      )}
    </div>
  )
}

function ClassWords({ value, label }: { value: string | null; label: string }) {
  const galaxyClass = GALAXY_CLASSES.find((one) => one === value)
  if (!galaxyClass) return label
  return (
    <span className="inline-flex items-center gap-1.5">
      <span aria-hidden className="flex">
        <ClassMark galaxyClass={galaxyClass} />
      </span>
      {sentenceCase(classLabel(galaxyClass))}
    </span>
  )
}

function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** A value and "no value" shut each other out: together nothing could match. */
function toggled(filter: Filter, column: string, value: string | null, on: boolean): Filter {
  const lacksOthers = filter.lacks.filter((key) => key !== column)
  if (value === null) return { ...choosing(filter, column, []), lacks: on ? [...lacksOthers, column] : lacksOthers }
  const others = chosenValues(filter, column).filter((other) => other !== value)
  return { ...choosing(filter, column, on ? [...others, value] : others), lacks: lacksOthers }
}
