import { isRouteErrorResponse, useRouteError } from 'react-router-dom'
import { Button } from '../components/button.tsx'
import { FailedState } from '../components/failed-state.tsx'
import { Link } from '../components/link.tsx'
import { useDocumentTitle } from '../lib/document-title.ts'
import { paths } from '../paths.ts'
import { NotFoundPage } from './not-found-page.tsx'

/** A page's program that cannot be fetched: usually the site was renewed since this page was opened. */
function isStale(error: unknown): boolean {
  return error instanceof TypeError && /dynamically imported module|importing a module|Failed to fetch/i.test(error.message)
}

/** In place of a page that failed while it was drawn. */
export function RouteFailure() {
  const error = useRouteError()
  useDocumentTitle('Something went wrong')
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFoundPage />
  return (
    <div className="page">
      <h1 className="sr-only">Something went wrong</h1>
      {isStale(error) ? (
        <div role="alert" className="flex flex-col items-start gap-3">
          <p className="font-serif text-lg font-semibold">This page could not be fetched</p>
          <p className="prose-measure">The connection failed, or the site was renewed since you opened it. Nothing was changed on the server. Load the page again.</p>
          <Button kind="primary" onPress={() => window.location.reload()}>
            Load again
          </Button>
        </div>
      ) : (
        <FailedState error={error} title="This page could not be drawn" safe="Nothing was changed on the server." onRetry={() => window.location.reload()} />
      )}
      <p className="mt-4">
        <Link to={paths.home}>To the first page</Link>
      </p>
    </div>
  )
}
