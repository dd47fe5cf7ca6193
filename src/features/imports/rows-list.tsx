import { useState } from 'react'
import type { ImportAnswer, ImportRow, Mapping } from '../../../core/schema/imports.ts'
import { useImportRows, type RowsShown } from '../../api/imports.ts'
import { CheckMark } from '../../components/badge.tsx'
import { Button } from '../../components/button.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { RadioGroup } from '../../components/radio-group.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { classNames } from '../../lib/class-names.ts'
import { formatCount } from '../../lib/format.ts'
import { RowMender } from './row-mender.tsx'

const PAGE = 50

/** The rows with what each would become, or what is wrong with it in words; each can be mended where it stands. */
export function RowsList({ id, held, mapping }: { id: string; held: ImportAnswer; mapping: Mapping }) {
  const [only, setOnly] = useState<RowsShown>(held.rowsBad > 0 ? 'bad' : 'all')
  const [offset, setOffset] = useState(0)
  const [open, setOpen] = useState<number | null>(null)
  const query = useImportRows(id, only, offset, PAGE)
  const total = query.data?.total ?? 0
  const show = (next: RowsShown): void => {
    setOnly(next)
    setOffset(0)
    setOpen(null)
  }
  return (
    <Sheet title="Rows" flush>
      <div className="px-4 pb-3 sm:px-6">
        <RadioGroup
          label="Rows shown"
          look="chips"
          orientation="horizontal"
          value={only}
          onChange={(next) => show(next === 'ok' ? 'ok' : next === 'bad' ? 'bad' : 'all')}
          options={[{ id: 'bad', label: `to mend, ${formatCount(held.rowsBad)}` }, { id: 'ok', label: `in order, ${formatCount(held.rowsOk)}` }, { id: 'all', label: `all, ${formatCount(held.rows)}` }]}
        />
      </div>
      {query.isError ? (
        <div className="p-4"><FailedState error={query.error} onRetry={() => void query.refetch()} safe="The rows are kept." /></div>
      ) : !query.data ? (
        <div className="p-6"><Skeleton lines={8} label="Reading the rows" /></div>
      ) : query.data.rows.length === 0 ? (
        <div className="p-6">
          <EmptyState title={only === 'bad' ? 'Nothing to mend' : 'No rows of this kind'}>
            {only === 'bad' ? 'Every row can be read. Make a draft below.' : 'Correct what the columns hold, or mend rows, and they appear here.'}
          </EmptyState>
        </div>
      ) : (
        <ol className={classNames('border-t border-line', query.isPlaceholderData && 'opacity-60')}>
          {query.data.rows.map((row) => (
            <RowItem key={row.number} id={id} row={row} headers={held.headers} mapping={mapping} isOpen={open === row.number} onToggle={() => setOpen(open === row.number ? null : row.number)} />
          ))}
        </ol>
      )}
      {total > PAGE && (
        <div className="flex flex-wrap items-center gap-3 border-t border-line px-4 py-3 sm:px-6">
          <Button size="small" isDisabled={offset === 0} onPress={() => setOffset(Math.max(0, offset - PAGE))}>Previous rows</Button>
          <Button size="small" isDisabled={offset + PAGE >= total} onPress={() => setOffset(offset + PAGE)}>Next rows</Button>
          <p className="figures text-sm text-muted">{offset + 1} to {Math.min(offset + PAGE, total)} of {formatCount(total)}</p>
        </div>
      )}
    </Sheet>
  )
}

interface RowItemProps {
  id: string
  row: ImportRow
  headers: readonly string[]
  mapping: Mapping
  isOpen: boolean
  onToggle: () => void
}

function RowItem({ id, row, headers, mapping, isOpen, onToggle }: RowItemProps) {
  return (
    <li className="border-b border-line px-4 py-2.5 last:border-0 sm:px-6">
      <div className="flex items-start gap-3">
        <span className="figures w-10 shrink-0 text-right text-sm text-muted">
          <span className="sr-only">Row </span>
          {row.number}
        </span>
        <div className="min-w-0 flex-1">
          {row.leftOut !== null ? (
            <p className="text-muted">
              <del>{row.reading ?? row.galaxy?.name ?? row.raw.join(' ')}</del> <span>Left out: {row.leftOut}</span>
            </p>
          ) : row.problems.length === 0 ? (
            <CheckMark outcome="ok"><span className="text-ink">{row.reading ?? row.raw.join(' · ')}</span></CheckMark>
          ) : (
            <>
              <p className="truncate text-muted">{row.reading ?? row.raw.filter((cell) => cell !== '').join(' · ')}</p>
              <ul className="grid gap-0.5">
                {row.problems.map((p) => (
                  <li key={`${p.column ?? ''} ${p.message}`}>
                    <CheckMark outcome="warn">
                      {p.column !== null && <strong className="font-semibold">{p.column}: </strong>}
                      {p.message}
                    </CheckMark>
                  </li>
                ))}
              </ul>
            </>
          )}
        </div>
        <Button size="small" aria-expanded={isOpen} aria-label={`${isOpen ? 'Close' : 'Mend'} row ${row.number}`} onPress={onToggle}>{isOpen ? 'Close' : 'Mend'}</Button>
      </div>
      {isOpen && <RowMender id={id} row={row} headers={headers} mapping={mapping} onDone={onToggle} />}
    </li>
  )
}
