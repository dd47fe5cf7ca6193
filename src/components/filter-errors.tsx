import type { FilterError } from '../../core/filters/parse.ts'
import { Button } from './button.tsx'

export interface FilterErrorsProps {
  errors: readonly FilterError[]
  onDrop: (parameter: string) => void
}

/** What of the address could not be understood, each with the way to leave it out. */
export function FilterErrors({ errors, onDrop }: FilterErrorsProps) {
  if (errors.length === 0) return null
  return (
    <div role="alert" className="mb-4 rounded-lg border border-caution bg-caution-soft px-4 py-3">
      <p className="font-semibold">Part of this address cannot be understood, so nothing is shown yet. Nothing is lost.</p>
      <ul className="mt-1 grid gap-1">
        {errors.map((error) => (
          <li key={`${error.path} ${error.message}`} className="flex flex-wrap items-baseline gap-x-3">
            <span>
              <code className="font-mono text-xs">{error.path}</code>: {error.message}
            </span>
            <Button kind="plain" size="small" onPress={() => onDrop(error.path)}>
              {`Leave “${error.path}” out`}
            </Button>
          </li>
        ))}
      </ul>
    </div>
  )
}
