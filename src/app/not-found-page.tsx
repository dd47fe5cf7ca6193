import { Button } from '../components/button.tsx'
import { Link } from '../components/link.tsx'
import { PageHeader } from '../components/page-header.tsx'
import { useDocumentTitle } from '../lib/document-title.ts'
import { paths } from '../paths.ts'
import { performAction } from './actions/registry.ts'

/** An address that leads nowhere. */
export function NotFoundPage() {
  useDocumentTitle('Nothing at this address')
  return (
    <div className="page">
      <PageHeader title="Nothing at this address" intro="The link may be old or mistyped. Galaxies can be found by any of their names; a withdrawn one still has its page." />
      <div className="flex flex-wrap items-center gap-4">
        <Button kind="primary" keys="Mod+k" onPress={() => performAction('app.find')}>
          Find a galaxy or page
        </Button>
        <Link to={paths.galaxies}>All galaxies</Link>
        <Link to={paths.home}>The first page</Link>
      </div>
    </div>
  )
}
