import { useEffect, useRef, useState, type Ref } from 'react'
import { LONGEST_VALUE, type Filter } from '../../../core/filters/filter.ts'
import { SearchField } from '../../components/search-field.tsx'
import { useSettled } from '../../lib/use-settled.ts'

export interface NameSearchProps {
  filter: Filter
  onChange: (filter: Filter, replace?: boolean) => void
  inputRef: Ref<HTMLInputElement>
}

const PAUSE_MS = 250

/** Words searched for in every name; the table follows when the typing pauses. */
export function NameSearch({ filter, onChange, inputRef }: NameSearchProps) {
  const [typed, setTyped] = useState(filter.q ?? '')
  const settled = useSettled(typed, PAUSE_MS)
  // What this field itself wrote into the address is not read back: the reader may have typed on.
  const written = useRef(filter.q ?? '')
  useEffect(() => {
    const outside = filter.q ?? ''
    if (outside !== written.current) {
      written.current = outside
      setTyped(outside)
    }
  }, [filter.q])
  useEffect(() => {
    const wanted = settled.trim().slice(0, LONGEST_VALUE)
    if (settled !== typed || wanted === written.current) return
    written.current = wanted
    onChange({ ...filter, q: wanted === '' ? null : wanted, cursor: null }, true)
  }, [settled, typed, filter, onChange])
  return <SearchField label="Search all names" placeholder="Any name or alias" value={typed} onChange={setTyped} inputRef={inputRef} className="w-56" />
}
