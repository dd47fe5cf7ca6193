import type { ReactNode } from 'react'

export interface DefinitionRow {
  label: ReactNode
  value: ReactNode
  /** Below the label, small. */
  help?: ReactNode
}

/** Label and value, row under row. */
export function DefinitionRows({ rows }: { rows: readonly DefinitionRow[] }) {
  return (
    <dl>
      {rows.map((row, index) => (
        <div key={index} className="flex min-h-9 items-baseline justify-between gap-4 border-b border-line px-2.5 py-2">
          <dt className="text-muted">
            {row.label}
            {row.help && <span className="block text-xs">{row.help}</span>}
          </dt>
          <dd className="figures text-right">{row.value}</dd>
        </div>
      ))}
    </dl>
  )
}
