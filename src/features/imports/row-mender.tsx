import { useState } from 'react'
import type { ImportRow, Mapping } from '../../../core/schema/imports.ts'
import { usePatchRow } from '../../api/imports.ts'
import { Button } from '../../components/button.tsx'
import { ProblemNote } from '../../components/failed-state.tsx'
import { TextField } from '../../components/text-field.tsx'
import { announce } from '../../components/toast.tsx'

interface Props {
  id: string
  row: ImportRow
  headers: readonly string[]
  mapping: Mapping
  onDone: () => void
}

/** The cells of one row, to be mended; or the row left out, with a reason. The file as it came is kept beside. */
export function RowMender({ id, row, headers, mapping, onDone }: Props) {
  const patch = usePatchRow(id)
  const [cells, setCells] = useState<readonly string[]>(() => headers.map((_, i) => row.raw[i] ?? ''))
  const [reason, setReason] = useState('')
  const shown = headers.flatMap((header, i) => (mapping.columns[i]?.role === 'ignore' ? [] : [{ header: header || `column ${i + 1}`, i }]))
  const problemOf = (header: string): string | undefined => row.problems.find((p) => p.column === header)?.message
  const isDirty = headers.some((_, i) => (cells[i] ?? '') !== (row.raw[i] ?? '')) || row.raw.length !== headers.length
  const done = (words: string) => ({
    onSuccess: () => {
      announce(words)
      onDone()
    },
  })
  return (
    <form
      aria-label={`Row ${row.number}`}
      className="mt-3 rounded-md bg-well p-4"
      onSubmit={(event) => {
        event.preventDefault()
        patch.mutate({ number: row.number, cells: [...cells] }, done(`Row ${row.number} was read again.`))
      }}
    >
      <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3 xl:grid-cols-4">
        {shown.map(({ header, i }) => (
          <TextField key={i} label={header} value={cells[i] ?? ''} error={problemOf(header)} onChange={(cell) => setCells(cells.map((old, at) => (at === i ? cell : old)))} />
        ))}
      </div>
      {patch.isError && <div className="mt-3"><ProblemNote error={patch.error} safe="What you typed is kept on this page." /></div>}
      <div className="mt-4 flex flex-wrap items-end gap-x-6 gap-y-3">
        <Button type="submit" kind="primary" isDisabled={!isDirty} isPending={patch.isPending}>Save and read again</Button>
        {row.leftOut === null ? (
          <div className="flex flex-wrap items-end gap-2">
            <TextField label="Why it is left out" value={reason} onChange={setReason} placeholder="superseded in table 5" />
            <Button isDisabled={reason.trim() === '' || patch.isPending} onPress={() => patch.mutate({ number: row.number, leftOut: reason.trim() }, done(`Row ${row.number} is left out.`))}>Leave it out</Button>
          </div>
        ) : (
          <Button isDisabled={patch.isPending} onPress={() => patch.mutate({ number: row.number, leftOut: null }, done(`Row ${row.number} is taken in again.`))}>Take it in again</Button>
        )}
      </div>
    </form>
  )
}
