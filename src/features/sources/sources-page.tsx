import { useState } from 'react'
import { useNavigate, useSearchParams } from 'react-router-dom'
import type { Source } from '../../../core/schema/sources.ts'
import { useCan } from '../../api/session.ts'
import { useSources } from '../../api/sources.ts'
import { Button } from '../../components/button.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { SearchField } from '../../components/search-field.tsx'
import { SourceDialog } from '../../components/source-dialog.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'

const COLUMNS: readonly DataColumn<Source>[] = [
  { key: 'label', header: 'Source', text: (s) => s.label, render: (s) => <Link to={paths.source(s.id)}>{s.label}</Link>, sortable: true, width: 220 },
  { key: 'title', header: 'Title', text: (s) => s.title, sortable: true, width: 380 },
  { key: 'venue', header: 'Published in', text: (s) => s.venue, sortable: true, width: 170 },
  { key: 'year', header: 'Year', text: (s) => String(s.year), align: 'end', sortable: true, width: 80 },
  { key: 'measurements', header: 'Measurements', text: (s) => s.measurements, decimals: 0, sortable: true, width: 130 },
  { key: 'galaxies', header: 'Galaxies', text: (s) => s.galaxies, decimals: 0, sortable: true, width: 110 },
]

/** The literature that the catalogue is made from. */
export default function SourcesPage() {
  useDocumentTitle('Sources')
  const navigate = useNavigate()
  const mayWrite = useCan('source.write')
  const [search, setSearch] = useSearchParams()
  const [adding, setAdding] = useState(false)
  const q = search.get('q') ?? ''
  const query = useSources(q)
  return (
    <div className="page">
      <PageHeader
        title="Sources"
        aside={query.data && formatCounted(query.data.sources.length, 'source')}
        intro="Every measurement comes from a source; a researcher who uses the catalogue cites the release and the sources behind the rows."
        actions={mayWrite && <Button kind="primary" onPress={() => setAdding(true)}>Add a source</Button>}
      />
      <div className="mb-4 max-w-md">
        <SearchField label="Search sources by author, title, year, bibcode or DOI" placeholder="Author, title, year, bibcode, DOI" value={q} onChange={(text) => setSearch(text ? { q: text } : {}, { replace: true })} />
      </div>
      {query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />
      ) : (
        <DataTable
          label="Sources"
          columns={COLUMNS}
          rows={query.data?.sources ?? []}
          rowKey={(s) => String(s.id)}
          isLoading={query.isPending}
          onRowAction={(s) => void navigate(paths.source(s.id))}
          empty={
            <EmptyState title={q ? `Nothing matches “${q}”` : 'No sources yet'}>
              {q ? 'Search for another author, year or word of the title.' : 'A source is added with the first measurement from it, or here.'}
            </EmptyState>
          }
        />
      )}
      <SourceDialog isOpen={adding} onOpenChange={setAdding} onMade={(source) => void navigate(paths.source(source.id))} />
    </div>
  )
}
