import { useResolve } from '../../api/resolve.ts'
import { ClassMark } from '../../components/class-mark.tsx'
import { EmptyState } from '../../components/empty-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { paths, withQuery } from '../../paths.ts'

/** No galaxy has this identifier: which ones may be meant. */
export function MissingGalaxy({ slug, at, detail }: { slug: string; at: string | null; detail: string }) {
  const words = slug.replaceAll('-', ' ')
  const near = useResolve(words)
  const start = useResolve(words.split(' ')[0] ?? words)
  const matches = near.data?.matches.length ? near.data.matches : (start.data?.matches ?? [])
  return (
    <div className="page">
      <PageHeader title="No such galaxy" breadcrumbs={[{ label: 'Galaxies', href: paths.galaxies }]} />
      <EmptyState
        title={`Nothing in the catalogue is called “${words}”`}
        action={
          <>
            <Link look="button" to={withQuery(paths.galaxies, { q: words, at })}>Search all names for it</Link>
            {at !== null && <Link look="button" to={paths.galaxy(slug)}>Read the newest</Link>}
          </>
        }
      >
        <p>{detail}</p>
        {matches.length > 0 && (
          <>
            <p className="mt-3">Perhaps one of these is meant:</p>
            <ul className="mt-1 grid gap-1">
              {matches.slice(0, 8).map((match) => (
                <li key={match.slug}>
                  <Link to={withQuery(paths.galaxy(match.slug), { at })} className="inline-flex items-center gap-2">
                    <ClassMark galaxyClass={match.class} />
                    {match.name}
                  </Link>
                  {match.matched !== match.name && <span>{` (${match.matched})`}</span>}
                </li>
              ))}
            </ul>
          </>
        )}
      </EmptyState>
    </div>
  )
}
