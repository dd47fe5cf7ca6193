import type { Figure } from '../../../core/schema/figures.ts'
import { useFigures } from '../../api/figures.ts'
import { useSession } from '../../api/session.ts'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { Link } from '../../components/link.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { formatCounted, formatDay } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { Thumbnail } from './thumbnail.tsx'

/** The gallery: figures that were kept, each drawn from its recipe. */
export default function FiguresPage() {
  useDocumentTitle('Figures')
  const { user } = useSession()
  const query = useFigures()
  const figures = query.data?.figures
  return (
    <div className="page">
      <PageHeader
        title="Figures"
        aside={figures && formatCounted(figures.length, 'figure')}
        intro="Maps that print: each is kept as a recipe, so drawing it again at the same release gives the same picture."
        actions={
          <>
            <Link look="button" to={paths.plane}>Begin with the plane</Link>
            <Link look="primary" to={paths.sky}>Begin with the sky</Link>
          </>
        }
      />
      {query.isError ? (
        <FailedState error={query.error} onRetry={() => void query.refetch()} safe="Nothing was changed." />
      ) : !figures ? (
        <Skeleton height={420} />
      ) : figures.length === 0 ? (
        <EmptyState title="No figures yet" action={<Link look="button" to={user ? paths.sky : paths.signInFrom(paths.sky)}>{user ? 'Open the sky' : 'Sign in to keep figures'}</Link>}>
          Draw a map in the atlas, press Export, and keep it: it will stand here for everybody who may read this catalogue. Saving a figure as a file needs no account.
        </EmptyState>
      ) : (
        <ul className="grid gap-5 sm:grid-cols-2 xl:grid-cols-3">
          {figures.map((figure) => (
            <Card key={figure.id} figure={figure} />
          ))}
        </ul>
      )}
    </div>
  )
}

function Card({ figure }: { figure: Figure }) {
  return (
    <li className="flex min-w-0 flex-col overflow-hidden rounded-lg border border-line bg-sheet">
      <Thumbnail figure={figure} />
      <div className="border-t border-line px-4 py-3">
        <h2 className="text-lg">
          <Link look="quiet" to={paths.figure(figure.id)}>{figure.title}</Link>
        </h2>
        <p className="text-xs text-muted">{[figure.owner.name, formatDay(figure.updatedAt), !figure.shared && 'only for you'].filter(Boolean).join(' · ')}</p>
      </div>
    </li>
  )
}
