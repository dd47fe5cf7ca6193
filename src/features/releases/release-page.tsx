import { useParams } from 'react-router-dom'
import { useRelease } from '../../api/releases.ts'
import { DefinitionRows } from '../../components/definition-rows.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCount, formatDay } from '../../lib/format.ts'
import { paths, withQuery } from '../../paths.ts'

/** One release: what is in it, and where to get it. */
export default function ReleasePage() {
  const { label = '' } = useParams()
  const query = useRelease(label)
  useDocumentTitle(`Release ${label}`)
  const release = query.data
  return (
    <div className="page">
      <PageHeader title={`Release ${label}`} aside={release?.title} breadcrumbs={[{ label: 'Releases', href: paths.releases }]} />
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} />}
      {query.isPending && <Skeleton height={300} />}
      {release && (
        <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_24rem]">
          <Sheet title="Notes">
            {release.notes ? <div className="prose-measure whitespace-pre-line font-serif">{release.notes}</div> : <p className="text-muted">No notes were written for this release.</p>}
          </Sheet>
          <div className="grid content-start gap-5">
            <Sheet title="In it">
              <DefinitionRows
                rows={[
                  { label: 'Galaxies', value: formatCount(release.galaxies) },
                  { label: 'Measurements', value: formatCount(release.measurements) },
                  { label: 'Revision', value: String(release.revision) },
                  { label: 'Published', value: formatDay(release.publishedAt) },
                  { label: 'By', value: release.publishedBy ?? 'the team' },
                ]}
              />
            </Sheet>
            <Sheet title="Get it">
              <ul className="grid gap-2">
                <li><Link href={withQuery('/api/export.csv', { at: label })} download>All galaxies, CSV</Link></li>
                <li><Link href={withQuery('/api/export.vot', { at: label })} download>All galaxies, VOTable</Link></li>
                <li><Link to={withQuery(paths.galaxies, { at: label })}>Browse the table as it was</Link></li>
                <li><Link to={withQuery(paths.sky, { at: label })}>The sky as it was</Link></li>
              </ul>
            </Sheet>
          </div>
        </div>
      )}
    </div>
  )
}
