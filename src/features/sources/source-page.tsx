import { useParams } from 'react-router-dom'
import type { SourceDetail } from '../../../core/schema/sources.ts'
import { useSource } from '../../api/sources.ts'
import { Badge } from '../../components/badge.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted } from '../../lib/format.ts'
import { paths } from '../../paths.ts'

type Contribution = SourceDetail['contributed'][number]

const COLUMNS: readonly DataColumn<Contribution>[] = [
  { key: 'galaxy', header: 'Galaxy', text: (c) => c.galaxy, render: (c) => <Link to={paths.galaxy(c.slug)}>{c.galaxy}</Link>, sortable: true, width: 200 },
  { key: 'quantity', header: 'Quantity', text: (c) => c.quantity, sortable: true, width: 200 },
  { key: 'value', header: 'Value', text: (c) => c.value, align: 'end', width: 200 },
  { key: 'method', header: 'Method', text: (c) => c.method, sortable: true, width: 180 },
  { key: 'used', header: 'Adopted', text: (c) => (c.used ? 'used' : 'not used'), render: (c) => <Badge tone={c.used ? 'good' : 'plain'} shape={c.used ? 'tick' : 'ring'}>{c.used ? 'used' : 'not used'}</Badge>, sortable: true, width: 130 },
]

/** One source and what it contributed. */
export default function SourcePage() {
  const { id = '' } = useParams()
  const query = useSource(id)
  useDocumentTitle(query.data?.label ?? 'Source')
  const source = query.data
  return (
    <div className="page">
      <PageHeader
        title={source?.label ?? 'Source'}
        aside={source && `${formatCounted(source.measurements, 'measurement')} of ${formatCounted(source.galaxies, 'galaxy', 'galaxies')}`}
        breadcrumbs={[{ label: 'Sources', href: paths.sources }]}
      />
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} />}
      {query.isPending && <Skeleton height={300} />}
      {source && (
        <>
          <div className="prose-measure mb-6 font-serif">
            <p className="text-lg">{source.title}</p>
            <p className="text-muted">{source.authors.slice(0, 12).join('; ')}{source.authors.length > 12 && ` and ${source.authors.length - 12} more`}</p>
            <p className="text-muted">
              {source.venue && `${source.venue}, `}{source.year}
              {source.kind === 'demonstration' && ' · invented for the demonstration'}
            </p>
            <p className="mt-1 flex flex-wrap gap-x-4 font-sans text-sm">
              {source.bibcode && <span>bibcode {source.bibcode}</span>}
              {source.doi && <Link href={`https://doi.org/${source.doi}`}>doi:{source.doi}</Link>}
              {source.url && <Link href={source.url}>{new URL(source.url).hostname}</Link>}
            </p>
          </div>
          <DataTable
            label={`Measurements from ${source.label}`}
            columns={COLUMNS}
            rows={source.contributed}
            rowKey={(c) => String(c.measurementId)}
            empty={<EmptyState title="Nothing approved yet">Measurements from this source appear here when the submission that holds them is approved.</EmptyState>}
          />
        </>
      )}
    </div>
  )
}
