import { useParams } from 'react-router-dom'
import { useFigure } from '../../api/figures.ts'
import { EmptyState } from '../../components/empty-state.tsx'
import { FailedState } from '../../components/failed-state.tsx'
import { PageHeader } from '../../components/page-header.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { paths } from '../../paths.ts'
import { recipeOf } from './kept-recipe.ts'
import { Studio } from './studio.tsx'

const CRUMBS = [{ label: 'Figures', href: paths.figures }]

/** One kept figure: seen, changed, saved as a file. */
export default function FigurePage() {
  const { id = '' } = useParams()
  const query = useFigure(id)
  const figure = query.data
  useDocumentTitle(figure?.title ?? 'Figure')
  const recipe = figure && recipeOf(figure)
  if (figure && recipe) return <Studio key={`${figure.id} ${figure.updatedAt}`} figure={figure} recipe={recipe} />
  return (
    <div className="page">
      <PageHeader title={figure?.title ?? 'Figure'} breadcrumbs={CRUMBS} />
      {query.isError && <FailedState error={query.error} onRetry={() => void query.refetch()} />}
      {query.isPending && <Skeleton height={480} />}
      {figure && <EmptyState title="This figure cannot be drawn">Its recipe is of a kind that this version does not know. It is kept as it is.</EmptyState>}
    </div>
  )
}
