import { useSession } from '../api/session.ts'
import { Link } from '../components/link.tsx'
import { paths } from '../paths.ts'

/** Cautions, where the reader is in the catalogue's time, and the ways out for programs. */
export function Footer() {
  const { catalogue, user } = useSession()
  return (
    <footer data-shell className="mt-auto border-t border-line">
      <div className="mx-auto flex max-w-[96rem] flex-wrap justify-between gap-x-12 gap-y-4 px-4 py-6 text-xs text-muted sm:px-8">
        <div className="prose-measure">
          {catalogue?.kind === 'demonstration' && <p>The galaxies, names, sources and people of this demonstration are invented.</p>}
          <p>Adopted values are no better than their sources. The maps are not for navigation or pointing.</p>
        </div>
        <div className="flex flex-wrap items-baseline gap-x-6 gap-y-1">
          <span className="figures min-h-5">{catalogue && <Standing revision={catalogue.revision} release={catalogue.release} signedIn={user !== null} />}</span>
          <Link to={paths.sources} look="quiet" className="text-muted">
            Sources
          </Link>
          <Link href={paths.apiDocs} look="quiet" className="text-muted">
            API documentation
          </Link>
        </div>
      </div>
    </footer>
  )
}

function Standing({ revision, release, signedIn }: { revision: number; release: string | null; signedIn: boolean }) {
  if (signedIn) return <>{`Shown: revision ${revision}${release ? `; newest release ${release}` : '; no release yet'}`}</>
  return <>{release ? `Shown: release ${release}` : 'No release yet'}</>
}
