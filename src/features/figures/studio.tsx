import { Copy, Download, Trash2 } from 'lucide-react'
import { useState } from 'react'
import { flushSync } from 'react-dom'
import { useNavigate } from 'react-router-dom'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { automaticTitle } from '../../../core/figure/words.ts'
import type { Figure, FigureFormat } from '../../../core/schema/figures.ts'
import { useDeleteFigure, useKeepFigure } from '../../api/figures.ts'
import { useCan } from '../../api/session.ts'
import { Button } from '../../components/button.tsx'
import { Checkbox } from '../../components/checkbox.tsx'
import { FailedState, ProblemNote } from '../../components/failed-state.tsx'
import { ExportForm } from '../../components/maps/export-form.tsx'
import { FigureCanvas } from '../../components/maps/figure-canvas.tsx'
import { queryOfRecipe, useMapData } from '../../components/maps/map-data.ts'
import { RecipeControls } from '../../components/maps/recipe-controls.tsx'
import { useFigureFile } from '../../components/maps/use-figure-file.ts'
import { PageHeader } from '../../components/page-header.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Skeleton } from '../../components/skeleton.tsx'
import { TextField } from '../../components/text-field.tsx'
import { notify } from '../../components/toast.tsx'
import { UnsavedGuard } from '../../components/unsaved-guard.tsx'
import { formatDayTime } from '../../lib/format.ts'
import { paths } from '../../paths.ts'
import { WhichGalaxies } from './which-galaxies.tsx'

const CRUMBS = [{ label: 'Figures', href: paths.figures }]
const UNDO_SECONDS = 12

/** A kept figure with all that can be changed of it. Those who may not change it change a copy for themselves, or only the file they save. */
export function Studio({ figure, recipe: kept }: { figure: Figure; recipe: FigureRecipe }) {
  const navigate = useNavigate()
  const mayKeep = useCan('figure.write')
  const [recipe, setRecipe] = useState(kept)
  const [title, setTitle] = useState(figure.title)
  const [shared, setShared] = useState(figure.shared)
  const [format, setFormat] = useState<FigureFormat>('pdf')
  const data = useMapData(queryOfRecipe(recipe))
  const file = useFigureFile()
  const saving = useKeepFigure()
  const copying = useKeepFigure()
  const deleting = useDeleteFigure()
  const restoring = useKeepFigure()
  const [isLeaving, setLeaving] = useState(false)
  // The guard must know before the page is left.
  const leave = (path: string): void => {
    flushSync(() => setLeaving(true))
    void navigate(path)
  }
  const isChanged = title !== figure.title || shared !== figure.shared || JSON.stringify(recipe) !== JSON.stringify(kept)

  const copy = (): void =>
    copying.mutate(
      { title: `${title} (copy)`.slice(0, 160), shared: false, recipe },
      {
        onSuccess: (made) => {
          notify('Copied. The copy is yours alone until you share it.', { tone: 'good', seconds: 4 })
          leave(paths.figure(made.id))
        },
      },
    )
  const remove = (): void =>
    deleting.mutate(figure.id, {
      onSuccess: () => {
        // By then this page is gone: what is asked of a mutation by callback would go unheard.
        const undo = (): void =>
          void restoring.mutateAsync({ title: figure.title, shared: figure.shared, recipe: kept }).then(
            (made) => navigate(paths.figure(made.id)),
            () => notify('The figure could not be brought back. Nothing else is lost: draw it in the atlas and keep it again.', { tone: 'stop' }),
          )
        notify(`Deleted “${figure.title}”.`, { action: { label: 'Undo', onPress: undo }, seconds: UNDO_SECONDS })
        leave(paths.figures)
      },
    })

  return (
    <div className="page">
      {figure.may.edit && <UnsavedGuard when={isChanged && !isLeaving} what="The changes to this figure are not kept." />}
      <PageHeader
        title={figure.title}
        breadcrumbs={CRUMBS}
        aside={`${figure.owner.name}, ${formatDayTime(figure.updatedAt)}`}
        actions={
          <>
            {mayKeep && <Button icon={<Copy size={16} aria-hidden />} isPending={copying.isPending} onPress={copy}>Duplicate</Button>}
            {figure.may.edit && <Button kind="danger" icon={<Trash2 size={16} aria-hidden />} isPending={deleting.isPending} onPress={remove}>Delete</Button>}
            <Button kind="primary" icon={<Download size={16} aria-hidden />} isPending={file.isDrawing} onPress={() => file.save(recipe, format)}>{`Save as ${format.toUpperCase()}`}</Button>
          </>
        }
      />
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <div className="min-w-0 lg:sticky lg:top-20">
          {data.isError ? (
            <FailedState error={data.error} onRetry={data.refetch} title="The galaxies of this figure cannot be read" />
          ) : data.revision === null ? (
            <Skeleton height={480} />
          ) : (
            <FigureCanvas galaxies={data.galaxies} recipe={recipe} releaseLabel={data.releaseLabel} className={recipe.view === 'plane' ? 'mx-auto max-w-[44rem] border border-line' : 'border border-line'} />
          )}
          <div className="mt-4 grid gap-3">
            <ProblemNote error={file.error} safe="The figure’s settings are kept here; change them or try again." />
            <ProblemNote error={saving.error ?? copying.error ?? deleting.error} safe="The figure’s settings are kept here." />
          </div>
        </div>
        <div className="grid gap-5">
          {figure.may.edit && (
            <Sheet title="In the gallery">
              <form
                className="grid gap-4"
                onSubmit={(event) => {
                  event.preventDefault()
                  if (title.trim() !== '') saving.mutate({ id: figure.id, title, shared, recipe }, { onSuccess: () => notify('Kept.', { tone: 'good', seconds: 3 }) })
                }}
              >
                <TextField label="Name" value={title} onChange={setTitle} error={title.trim() === '' ? 'Give the figure a name.' : undefined} />
                <Checkbox isSelected={shared} onChange={setShared}>Shown to everybody</Checkbox>
                <div>
                  <Button type="submit" isDisabled={!isChanged || title.trim() === ''} isPending={saving.isPending}>Keep the changes</Button>
                </div>
              </form>
            </Sheet>
          )}
          <Sheet title="The map">
            <RecipeControls recipe={recipe} onChange={setRecipe}>
              <WhichGalaxies recipe={recipe} onChange={setRecipe} />
            </RecipeControls>
          </Sheet>
          <Sheet title="The figure">
            <ExportForm recipe={recipe} onChange={setRecipe} format={format} onFormat={setFormat} suggestedTitle={automaticTitle(recipe)} releaseLabel={data.releaseLabel} errorOf={file.errorOf} />
          </Sheet>
        </div>
      </div>
    </div>
  )
}
