import { useState } from 'react'
import type { Source } from '../../../core/schema/sources.ts'
import { useSources } from '../../api/sources.ts'
import { Button } from '../button.tsx'
import { ComboBox } from '../combo-box.tsx'
import { SourceDialog } from '../source-dialog.tsx'

export interface PickedSource {
  id: number
  label: string
}

export interface SourcePickerProps {
  value: PickedSource | null
  onChange: (source: PickedSource | null) => void
  error?: string
}

const words = (s: Source): string => `${s.label}: ${s.title}`

/** Finds a source by author, title, year, bibcode or DOI, or adds one. */
export function SourcePicker({ value, onChange, error }: SourcePickerProps) {
  const [text, setText] = useState(value?.label ?? '')
  const [adding, setAdding] = useState(false)
  const query = useSources(value?.label === text ? '' : text)
  const options = (query.data?.sources ?? []).slice(0, 50).map((s) => ({ id: String(s.id), label: s.label, hint: s.title }))
  const shown = value && !options.some((o) => o.id === String(value.id)) ? [{ id: String(value.id), label: value.label }, ...options] : options
  const choose = (picked: PickedSource | null): void => {
    onChange(picked)
    if (picked) setText(picked.label)
  }
  const picked = query.data?.sources.find((s) => s.id === value?.id)
  return (
    <div>
      <div className="flex items-end gap-2">
        <ComboBox
          className="min-w-0 flex-1"
          label="Source"
          options={shown}
          value={value ? String(value.id) : null}
          inputValue={text}
          onInputChange={setText}
          isLoading={query.isFetching}
          nothing="No source fits. Add it."
          onChange={(id) => {
            const match = shown.find((o) => o.id === id)
            choose(match ? { id: Number(match.id), label: match.label } : null)
          }}
        />
        <Button onPress={() => setAdding(true)}>New source</Button>
      </div>
      {error ? <p className="mt-1 text-sm text-stop">{error}</p> : picked && <p className="mt-1 truncate text-sm text-muted">{words(picked)}</p>}
      <SourceDialog isOpen={adding} onOpenChange={setAdding} onMade={(s) => choose({ id: s.id, label: s.label })} />
    </div>
  )
}
