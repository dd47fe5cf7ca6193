/** Drawing a recipe with the galaxies that its reader may see. */
import type { Knex } from 'knex'
import { galaxiesFromPoints } from '../../core/figure/galaxy.ts'
import { parseFilter } from '../../core/filters/parse.ts'
import type { Filter } from '../../core/filters/filter.ts'
import type { Points } from '../../core/schema/catalogue.ts'
import type { FigureDrawing } from '../../core/schema/figures.ts'
import { FigureTooLarge, renderFigure, type RenderedFigure } from '../figures/render.ts'
import { BadInput, HttpError } from '../http/errors.ts'
import type { Reader, Services } from '../http/route.ts'
import { readRevision, type ReadRevision } from '../queries/at-revision.ts'
import { pointsText } from '../queries/points.ts'

/** A picture of many pixels takes hundreds of megabytes while it is drawn. */
const MOST_AT_ONCE = 2

let running = 0

export interface DrawnFigure extends RenderedFigure {
  revision: ReadRevision
}

/** @throws BadInput naming the part of the recipe; NotFound for an unknown `at`; HttpError 503 when others are being drawn */
export async function drawFigure({ knex }: Services, reader: Reader, { recipe, format }: FigureDrawing): Promise<DrawnFigure> {
  const filter = filterOf(recipe.filter)
  const revision = await readRevision(knex, reader, recipe.at ?? filter.at)
  if (running >= MOST_AT_ONCE) {
    throw new HttpError(503, 'Busy', 'Other figures are being drawn just now. Nothing is lost: try again in a few seconds.', { kind: 'busy', headers: { 'retry-after': '3' } })
  }
  running++
  try {
    const points = JSON.parse(await pointsText(knex, filter, revision)) as Points
    const options = { format, releaseLabel: revision.release ?? `revision ${revision.number}`, date: await dateOf(knex, revision) }
    return { ...(await renderFigure(recipe, galaxiesFromPoints(points), options)), revision }
  } catch (error) {
    if (error instanceof FigureTooLarge) throw new BadInput(error.message, [{ path: 'recipe.dpi', message: error.message }])
    throw error
  } finally {
    running--
  }
}

/** A figure shows all that its filter lets through: what belongs to pages of a list says nothing here. */
function filterOf(text: string): Filter {
  const { filter, errors } = parseFilter(new URLSearchParams(text))
  if (errors.length > 0) {
    throw new BadInput('The filter of the recipe cannot be understood. Nothing was drawn.', errors.map(({ path, message }) => ({ path: `recipe.filter.${path}`, message })))
  }
  return { ...filter, limit: null, cursor: null }
}

/** When the data shown were approved, so that the same recipe at the same revision gives the same file for ever. */
async function dateOf(knex: Knex, { number }: ReadRevision): Promise<Date> {
  const row = (await knex('revisions').where({ number }).first('approvedAt')) as { approvedAt: Date } | undefined
  return row?.approvedAt ?? new Date(0)
}
