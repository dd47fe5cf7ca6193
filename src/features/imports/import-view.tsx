import { useRef, useState } from 'react'
import type { ImportAnswer, Mapping } from '../../../core/schema/imports.ts'
import { usePatchMapping } from '../../api/imports.ts'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { announce } from '../../components/toast.tsx'
import { formatCounted, formatDayTime } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { ConstantsEditor } from './constants-editor.tsx'
import { Counts } from './counts.tsx'
import { DraftForm } from './draft-form.tsx'
import { MappingEditor } from './mapping-editor.tsx'
import { RowsList } from './rows-list.tsx'

/** One import: what its columns hold, how its rows read, and the draft that comes of it. */
export function ImportView({ id, held }: { id: string; held: ImportAnswer }) {
  const patch = usePatchMapping(id)
  const [mapping, setMapping] = useState<Mapping>(held.mapping)
  const sent = useRef(0)

  /** Each choice is sent at once; one that is refused stays on the page beside the reason, and nothing on the server has changed. */
  const change = (next: Mapping): void => {
    setMapping(next)
    sent.current += 1
    const mine = sent.current
    patch.mutate(next, {
      onSuccess: (answer) => {
        if (mine === sent.current) announce(`Read again: ${formatCounted(answer.rowsOk, 'row')} in order, ${answer.rowsBad} to mend.`)
      },
    })
  }
  return (
    <div className="page">
      <PageHeader
        title={held.fileName}
        aside={`${formatCounted(held.rows, 'row')} · ${held.format} · brought in ${formatDayTime(held.createdAt)}`}
        breadcrumbs={[{ label: 'Submissions', href: paths.submissions }, { label: 'Import a table', href: paths.imports }]}
        actions={held.submission !== null && <Link look="button" to={paths.submission(held.submission)}>Open submission {held.submission}</Link>}
      />
      <Counts held={held} isReading={patch.isPending} />
      <div className="grid grid-cols-[minmax(0,1fr)] gap-5">
        <MappingEditor held={held} mapping={mapping} onChange={change} error={patch.error} isReading={patch.isPending} />
        <ConstantsEditor mapping={mapping} onChange={change} error={patch.error} />
        <RowsList id={id} held={held} mapping={mapping} />
        <DraftForm id={id} held={held} isReading={patch.isPending || patch.isError} />
      </div>
    </div>
  )
}
