import { useState } from 'react'
import { useNavigate } from 'react-router-dom'
import type { Release } from '../../../core/schema/releases.ts'
import { useReleases } from '../../api/releases.ts'
import { useCan } from '../../api/session.ts'
import { Button } from '../../components/button.tsx'
import type { DataColumn } from '../../components/data-column.ts'
import { DataTable } from '../../components/data-table.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted, formatDay } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { PublishDialog } from './publish-dialog.tsx'

const COLUMNS: readonly DataColumn<Release>[] = [
  { key: 'label', header: 'Release', text: (r) => r.label, render: (r) => <Link to={paths.release(r.label)}>{r.label}</Link>, sortable: true, width: 130 },
  { key: 'title', header: 'Title', text: (r) => r.title, width: 320 },
  { key: 'publishedAt', header: 'Published', text: (r) => r.publishedAt, render: (r) => formatDay(r.publishedAt), sortable: true, width: 140 },
  { key: 'publishedBy', header: 'By', text: (r) => r.publishedBy, width: 160 },
  { key: 'galaxies', header: 'Galaxies', text: (r) => r.galaxies, decimals: 0, width: 110 },
  { key: 'measurements', header: 'Measurements', text: (r) => r.measurements, decimals: 0, width: 130 },
  { key: 'revision', header: 'Revision', text: (r) => r.revision, decimals: 0, width: 100 },
]

/** Releases: what visitors read and colleagues cite. */
export default function ReleasesPage() {
  useDocumentTitle('Releases')
  const navigate = useNavigate()
  const query = useReleases()
  const mayPublish = useCan('release.publish')
  const [publishing, setPublishing] = useState(false)
  const unreleased = query.data?.current?.unreleased ?? 0
  return (
    <div className="page">
      <PageHeader
        title="Releases"
        aside={query.data && formatCounted(query.data.releases.length, 'release')}
        intro="A release is a label on a revision of the catalogue: it never changes, and every page and download of it stays as it was."
        actions={mayPublish && <Button kind="primary" onPress={() => setPublishing(true)}>Publish a release</Button>}
      />
      {query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />
      ) : (
        <>
          {unreleased > 0 && <p className="mb-4 text-muted">{formatCounted(unreleased, 'revision')} approved since the newest release.</p>}
          <DataTable
            label="Releases"
            columns={COLUMNS}
            rows={query.data?.releases ?? []}
            rowKey={(r) => r.label}
            isLoading={query.isPending}
            onRowAction={(r) => void navigate(paths.release(r.label))}
            showTools={false}
            empty={<EmptyState title="Nothing published yet">Until the first release, only people of the team read the catalogue. The steward publishes one.</EmptyState>}
          />
        </>
      )}
      {mayPublish && <PublishDialog isOpen={publishing} onOpenChange={setPublishing} revision={query.data?.current?.revision ?? null} />}
    </div>
  )
}
