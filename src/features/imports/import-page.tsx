import { useParams } from 'react-router-dom'
import { useImport } from '../../api/imports.ts'
import { useCan, useSession } from '../../api/session.ts'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { paths } from '../../paths.ts'
import { ImportView } from './import-view.tsx'
import { MyImports } from './my-imports.tsx'

const CRUMBS = [{ label: 'Submissions', href: paths.submissions }, { label: 'Import a table', href: paths.imports }]

/** Batch entry: without an id, a place to drop a table and the imports so far; with one, that import. */
export default function ImportPage() {
  const { id } = useParams()
  const session = useSession()
  const mayImport = useCan('import.write')
  useDocumentTitle('Import a table')
  if (session.state === 'loading') {
    return (
      <div className="page">
        <PageHeader title="Import a table" />
        <Skeleton height={320} />
      </div>
    )
  }
  if (!mayImport) {
    return (
      <div className="page">
        <PageHeader title="Import a table" />
        <EmptyState title="Importing is for curators" action={!session.user && <Link look="primary" to={paths.signInFrom(id ? paths.import(id) : paths.imports)}>Sign in</Link>}>
          Here a curator brings in a paper’s whole table at once.
        </EmptyState>
      </div>
    )
  }
  return id === undefined ? <MyImports /> : <OneImport key={id} id={id} />
}

function OneImport({ id }: { id: string }) {
  const query = useImport(id)
  if (query.data) return <ImportView id={id} held={query.data} />
  return (
    <div className="page">
      <PageHeader title="Import a table" breadcrumbs={CRUMBS} />
      {query.isError ? <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Tables that you brought in are kept." /> : <Skeleton height={420} label="Reading the import" />}
    </div>
  )
}
