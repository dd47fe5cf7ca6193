import { Download, Images } from 'lucide-react'
import { useState } from 'react'
import { PLANE_AXES, type FigureRecipe } from '../../../core/figure/recipe.ts'
import { automaticTitle } from '../../../core/figure/words.ts'
import type { FigureFormat } from '../../../core/schema/figures.ts'
import { useKeepFigure } from '../../api/figures.ts'
import { useCan, useSession } from '../../api/session.ts'
import { shownTheme } from '../../lib/theme.ts'
import { paths } from '../../paths.ts'
import { Button } from '../button.tsx'
import { Dialog } from '../dialog.tsx'
import { ProblemNote } from '../failed-state.tsx'
import { Link } from '../link.tsx'
import { RadioGroup } from '../radio-group.tsx'
import { ExportForm } from './export-form.tsx'
import { FigureCanvas } from './figure-canvas.tsx'
import type { MapData } from './map-data.ts'
import { AXES_WORDS } from './recipe-controls.tsx'
import { useFigureFile } from './use-figure-file.ts'

export interface ExportDialogProps {
  /** The map as it is shown, with its filter. */
  recipe: FigureRecipe
  data: MapData
  /** The filter in words; becomes the caption. */
  sentence: string
  onClose: () => void
}

/** From the map on the screen to a figure that prints: size, words, theme; saved as a file, or kept in the gallery. */
export function ExportDialog({ recipe: shown, data, sentence, onClose }: ExportDialogProps) {
  const { catalogue } = useSession()
  const mayKeep = useCan('figure.write')
  const [recipe, setRecipe] = useState<FigureRecipe>(() => ({
    ...shown,
    theme: shownTheme(),
    caption: sentence,
    credit: catalogue?.kind === 'demonstration' ? 'Demonstration data, invented' : '',
  }))
  const [format, setFormat] = useState<FigureFormat>('pdf')
  const file = useFigureFile()
  const keep = useKeepFigure()
  const title = recipe.title.trim() || automaticTitle(recipe)
  return (
    <Dialog
      title="Export a figure"
      size="large"
      isOpen
      onOpenChange={(isOpen) => !isOpen && onClose()}
      footer={
        <>
          {mayKeep && !keep.data && (
            <Button icon={<Images size={16} aria-hidden />} isPending={keep.isPending} onPress={() => keep.mutate({ title, shared: true, recipe })}>
              Keep in the gallery
            </Button>
          )}
          {keep.data && (
            <Link look="button" to={paths.figure(keep.data.id)}>
              Kept: open it
            </Link>
          )}
          <Button kind="primary" icon={<Download size={16} aria-hidden />} isPending={file.isDrawing} onPress={() => file.save(recipe, format)}>
            {`Save as ${format.toUpperCase()}`}
          </Button>
        </>
      }
    >
      <div className="grid gap-6 md:grid-cols-[minmax(0,1fr)_18rem]">
        <div className="min-w-0">
          <FigureCanvas galaxies={data.galaxies} recipe={recipe} releaseLabel={data.releaseLabel} className="sticky top-0 border border-line" />
        </div>
        <div className="grid content-start gap-4">
          {recipe.view === 'plane' && (
            <RadioGroup
              look="chips"
              label="Seen"
              value={recipe.plane.axes}
              options={PLANE_AXES.map((id) => ({ id, label: AXES_WORDS[id] }))}
              onChange={(axes) => setRecipe({ ...recipe, plane: { ...recipe.plane, axes } })}
            />
          )}
          <ExportForm recipe={recipe} onChange={setRecipe} format={format} onFormat={setFormat} suggestedTitle={automaticTitle(recipe)} releaseLabel={data.releaseLabel} errorOf={file.errorOf} />
        </div>
      </div>
      <ProblemNote error={file.error} safe="The figure’s settings are kept here; change them or try again." />
      <ProblemNote error={keep.error} safe="The figure’s settings are kept here." />
    </Dialog>
  )
}
