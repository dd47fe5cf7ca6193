import { useNavigate } from 'react-router-dom'
import type { ImportAnswer } from '../../../core/schema/imports.ts'
import { ApiProblem, fieldError } from '../../api/client.ts'
import { useImports, useUpload } from '../../api/imports.ts'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { FileDrop } from '../../components/file-drop.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { SectionHeading } from '../../components/section-heading.tsx'
import { formatAge } from '../../lib/format.ts'
import { paths } from '../../paths.ts'

const COLUMNS: readonly DataColumn<ImportAnswer>[] = [
  { key: 'fileName', header: 'Table', text: (i) => i.fileName, render: (i) => <Link to={paths.import(i.id)}>{i.fileName}</Link>, sortable: true, width: 240 },
  { key: 'rows', header: 'Rows', text: (i) => i.rows, decimals: 0, sortable: true, width: 80 },
  { key: 'rowsOk', header: 'In order', text: (i) => i.rowsOk, decimals: 0, sortable: true, width: 90 },
  { key: 'rowsBad', header: 'To mend', text: (i) => i.rowsBad, decimals: 0, sortable: true, width: 90 },
  {
    key: 'submission', header: 'Draft', text: (i) => i.submission, width: 130,
    render: (i) => (i.submission === null ? 'none yet' : <Link to={paths.submission(i.submission)}>submission {i.submission}</Link>),
  },
  { key: 'createdAt', header: 'Brought in', text: (i) => i.createdAt, render: (i) => formatAge(i.createdAt), sortable: true, width: 120 },
]

/** Where a table is brought in, and those that were. */
export function MyImports() {
  const navigate = useNavigate()
  const upload = useUpload()
  const imports = useImports()
  const refusal = upload.error === null ? undefined : (fieldError(upload.error, 'file') ?? (upload.error instanceof ApiProblem ? upload.error.detail : 'The file could not be sent. Try again.'))
  return (
    <div className="page">
      <PageHeader
        title="Import a table"
        breadcrumbs={[{ label: 'Submissions', href: paths.submissions }]}
        intro="Bring in a paper’s whole table. You say what its columns hold, mend the rows that cannot be read, and make a draft of the rest. The catalogue is not touched."
      />
      <FileDrop
        label="Drop a CSV or TSV file here"
        accept={['.csv', '.tsv', '.txt', 'text/csv', 'text/tab-separated-values', 'text/plain']}
        isBusy={upload.isPending}
        error={refusal && `${refusal} Nothing was kept.`.replace(/(Nothing was kept\.) Nothing was kept\.$/, '$1')}
        help="One head line, then one measurement a row (galaxy, quantity, value, error, source), or one galaxy a row with a column for each quantity. Up to 20 MB."
        onFiles={([file]) => {
          if (file) upload.mutate(file, { onSuccess: (made) => void navigate(paths.import(made.id)) })
        }}
      />
      <div className="mt-8">
        <SectionHeading>Your imports</SectionHeading>
        {imports.isError ? (
          <FailedState error={imports.error} onRetry={() => void imports.refetch()} safe="Tables that you brought in are kept." />
        ) : (
          <DataTable
            label="Your imports"
            columns={COLUMNS}
            rows={imports.data?.imports ?? []}
            rowKey={(i) => String(i.id)}
            isLoading={imports.isPending}
            onRowAction={(i) => void navigate(paths.import(i.id))}
            showTools={false}
            empty={<EmptyState title="No table yet">Tables that you bring in stay here, with the rows that are still to be mended.</EmptyState>}
          />
        )}
      </div>
    </div>
  )
}
