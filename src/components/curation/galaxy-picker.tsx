import { useState } from 'react'
import { classLabel } from '../../../core/classes.ts'
import { useResolve } from '../../api/resolve.ts'
import { ComboBox } from '../combo-box.tsx'

export interface PickedGalaxy {
  slug: string
  name: string
}

export interface GalaxyPickerProps {
  value: PickedGalaxy | null
  onChange: (galaxy: PickedGalaxy | null) => void
  label?: string
  error?: string
  autoFocus?: boolean
}

/** Finds a galaxy by any of its names, however they are spelt. */
export function GalaxyPicker({ value, onChange, label = 'Galaxy', error, autoFocus }: GalaxyPickerProps) {
  const [text, setText] = useState(value?.name ?? '')
  const found = useResolve(text)
  const matches = found.data?.matches ?? []
  const options = matches.map((m) => ({ id: m.slug, label: m.name, hint: m.matched === m.name ? classLabel(m.class) : `${m.matched} · ${classLabel(m.class)}` }))
  const shown = value && !options.some((o) => o.id === value.slug) ? [{ id: value.slug, label: value.name }, ...options] : options
  return (
    <ComboBox
      label={label}
      help="Any name or alias: NGC 224, n224, M 31"
      error={error}
      options={shown}
      value={value?.slug ?? null}
      inputValue={text}
      onInputChange={setText}
      isLoading={found.isFetching}
      nothing={text.trim() === '' ? 'Type a name.' : 'No galaxy has this name. Add it as a new galaxy first.'}
      autoFocus={autoFocus}
      onChange={(slug) => {
        const match = shown.find((o) => o.id === slug)
        onChange(match ? { slug: match.id, name: match.label } : null)
        if (match) setText(match.label)
      }}
    />
  )
}
