import { Columns3 } from 'lucide-react'
import { useState } from 'react'
import { COLUMNS, DEFAULT_COLUMNS, type Column } from '../../../core/columns.ts'
import type { Filter } from '../../../core/filters/filter.ts'
import { Button } from '../../components/button.tsx'
import { Checkbox } from '../../components/checkbox.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { unitText } from '../../lib/format.ts'
import { shownColumns } from './catalogue-columns.tsx'

export interface ColumnChooserProps {
  filter: Filter
  onChange: (filter: Filter) => void
}

const GROUPS: readonly Column['group'][] = [...new Set(COLUMNS.map((column) => column.group))]

/** Which columns the table shows; they stand in the order of the registry. */
export function ColumnChooser({ filter, onChange }: ColumnChooserProps) {
  const [isOpen, setOpen] = useState(false)
  const shown = new Set(shownColumns(filter).map((column) => column.key))
  const choose = (keys: ReadonlySet<string>): void => {
    const ordered = COLUMNS.map((column) => column.key).filter((key) => keys.has(key))
    const usual = ordered.length === DEFAULT_COLUMNS.length && ordered.every((key) => DEFAULT_COLUMNS.includes(key))
    onChange({ ...filter, columns: usual ? null : ordered })
  }
  const toggle = (keys: readonly string[], on: boolean): void => {
    const next = new Set(shown)
    for (const key of keys) {
      if (on) next.add(key)
      else if (key !== 'name') next.delete(key)
    }
    choose(next)
  }
  return (
    <>
      <Button icon={<Columns3 size={16} aria-hidden />} onPress={() => setOpen(true)}>
        Columns
      </Button>
      <Dialog
        title="Columns"
        size="large"
        isOpen={isOpen}
        onOpenChange={setOpen}
        footer={
          <>
            <Button onPress={() => onChange({ ...filter, columns: null })}>The usual columns</Button>
            <Button kind="primary" onPress={() => setOpen(false)}>
              Done
            </Button>
          </>
        }
      >
        <div className="gap-8 sm:columns-2 lg:columns-3">
          {GROUPS.map((group) => {
            const columns = COLUMNS.filter((column) => column.group === group)
            const on = columns.filter((column) => shown.has(column.key)).length
            return (
              <fieldset key={group} className="mb-4 break-inside-avoid">
                <legend className="sr-only">{group}</legend>
                <Checkbox isSelected={on === columns.length} isIndeterminate={on > 0 && on < columns.length} onChange={(all) => toggle(columns.map((column) => column.key), all)}>
                  <span className="font-semibold">{group.charAt(0).toUpperCase() + group.slice(1)}</span>
                </Checkbox>
                <div className="ml-7">
                  {columns.map((column) => (
                    <Checkbox key={column.key} isSelected={shown.has(column.key)} isDisabled={column.key === 'name'} onChange={(one) => toggle([column.key], one)}>
                      {column.label}
                      {column.unit !== '' && <span className="text-muted">{` / ${unitText(column.unit.replace('**', '').replace('Jy.km', 'Jy km'))}`}</span>}
                    </Checkbox>
                  ))}
                </div>
              </fieldset>
            )
          })}
        </div>
      </Dialog>
    </>
  )
}
