import type { ImportAnswer, Mapping } from '../../../core/schema/imports.ts'
import { fieldError } from '../../api/client.ts'
import { Checkbox } from '../../components/checkbox.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { Select } from '../../components/select.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { ROLE_OPTIONS, unitOptions, USUAL, withColumn } from './roles.ts'

interface Props {
  held: ImportAnswer
  mapping: Mapping
  onChange: (mapping: Mapping) => void
  error: unknown
  isReading: boolean
}

const SAMPLES = 3

/** What each column of the file holds: guessed, and the curator's to correct. */
export function MappingEditor({ held, mapping, onChange, error, isReading }: Props) {
  return (
    <Sheet title="What the columns hold" actions={<span role="status" className="text-sm text-muted">{isReading ? 'Reading the rows …' : ''}</span>}>
      <p className="prose-measure mb-3 text-muted">Guessed from the head line. Correct what is wrong: every row is read again at once.</p>
      {error !== null && <div className="mb-3"><ProblemNote error={error} safe="Your choices are kept on this page." /></div>}
      <ul className="grid grid-cols-[minmax(0,1fr)] gap-px overflow-hidden rounded-md border border-line bg-line md:grid-cols-[repeat(2,minmax(0,1fr))] 2xl:grid-cols-[repeat(3,minmax(0,1fr))]">
        {held.headers.map((header, i) => (
          <MappedColumn
            key={`${header} ${String(i)}`}
            header={header || `column ${i + 1}`}
            samples={held.sample.map((row) => row[i] ?? '').filter((cell) => cell !== '').slice(0, SAMPLES)}
            column={mapping.columns[i] ?? { role: 'ignore', unit: '' }}
            roleError={fieldError(error, `mapping.columns.${i}.role`)}
            unitError={fieldError(error, `mapping.columns.${i}.unit`)}
            onChange={(part) => onChange(withColumn(mapping, i, part))}
          />
        ))}
      </ul>
      <div className="mt-4">
        <Checkbox
          isSelected={mapping.addGalaxies}
          onChange={(addGalaxies) => onChange({ ...mapping, addGalaxies })}
          help="Only where the row gives a position, and no galaxy stands there yet."
        >
          Add galaxies that the catalogue does not know
        </Checkbox>
      </div>
    </Sheet>
  )
}

interface MappedColumnProps {
  header: string
  samples: readonly string[]
  column: Mapping['columns'][number]
  roleError: string | undefined
  unitError: string | undefined
  onChange: (part: Partial<Mapping['columns'][number]>) => void
}

function MappedColumn({ header, samples, column, roleError, unitError, onChange }: MappedColumnProps) {
  const units = unitOptions(column.role)
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_minmax(0,1fr)] items-start gap-3 bg-sheet px-4 py-3">
      <div className="min-w-0">
        <p className="truncate font-mono text-sm font-semibold" title={header}>{header}</p>
        <p className="line-clamp-2 text-sm break-words text-muted" title={samples.join(', ')}>{samples.join(', ') || 'empty in the first rows'}</p>
      </div>
      <div className="grid gap-2">
        <Select
          label={`Role of ${header}`}
          hideLabel
          options={ROLE_OPTIONS}
          value={column.role}
          error={roleError}
          onChange={(role) => onChange({ role, unit: unitOptions(role).some((u) => u.id === column.unit) ? column.unit : '' })}
        />
        {units.length > 1 && (
          <Select label={`Unit of ${header}`} hideLabel options={units} value={column.unit === '' ? USUAL : column.unit} error={unitError} onChange={(unit) => onChange({ unit: unit === USUAL ? '' : unit })} />
        )}
      </div>
    </li>
  )
}
