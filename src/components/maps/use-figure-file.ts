import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import type { FigureFormat } from '../../../core/schema/figures.ts'
import { ApiProblem } from '../../api/client.ts'
import { useRenderFigure } from '../../api/figures.ts'
import { saveBlob } from '../../lib/picture-export.ts'
import { notify } from '../toast.tsx'

/** Has a figure drawn on the server and hands the file to the browser. */
export function useFigureFile() {
  const drawing = useRenderFigure()
  const save = (recipe: FigureRecipe, format: FigureFormat): void =>
    drawing.mutate(
      { recipe, format },
      {
        onSuccess: ({ blob, fileName }) => {
          saveBlob(blob, fileName)
          notify(`Saved ${fileName}.`, { tone: 'good', seconds: 4 })
        },
      },
    )
  const problems = drawing.error instanceof ApiProblem ? drawing.error.errors : []
  const errorOf = (part: string): string | undefined => problems.find((problem) => problem.path === `recipe.${part}`)?.message
  return { save, isDrawing: drawing.isPending, error: drawing.error, errorOf }
}
