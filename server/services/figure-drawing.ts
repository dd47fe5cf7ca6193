/** Drawing a recipe with the galaxies that its reader may see. */
import type { Knex } from 'knex'
import { parseFilter } from '../../core/filters/parse.ts'
import type { Filter } from '../../core/filters/filter.ts'
import type { FigureDrawing } from '../../core/schema/figures.ts'
import { DrawingBusy, drawInThread } from '../figures/draw-in-thread.ts'
import { BadInput, HttpError } from '../http/errors.ts'
import type { Reader, Services } from '../http/route.ts'
import { readRevision, type ReadRevision } from '../queries/at-revision.ts'
import { pointsText } from '../queries/points.ts'

export interface DrawnFigure {
  bytes: Buffer
  mediaType: string
  fileName: string
  revision: ReadRevision
}

/** @throws BadInput naming the part of the recipe; NotFound for an unknown `at`; HttpError 503 when too many others are being drawn */
export async function drawFigure({ knex }: Services, reader: Reader, { recipe, format }: FigureDrawing): Promise<DrawnFigure> {
  const filter = filterOf(recipe.filter)
  const revision = await readRevision(knex, reader, recipe.at ?? filter.at)
  const releaseLabel = revision.release ?? `revision ${revision.number}`
  const drawn = await drawInThread({ recipe, points: await pointsText(knex, filter, revision), format, releaseLabel, date: await dateOf(knex, revision) }).catch((error: unknown) => {
    throw error instanceof DrawingBusy ? busy() : error
  })
  if ('tooLarge' in drawn) throw new BadInput(drawn.tooLarge, [{ path: 'recipe.dpi', message: drawn.tooLarge }])
  return { ...drawn, bytes: Buffer.from(drawn.bytes.buffer, drawn.bytes.byteOffset, drawn.bytes.byteLength), revision }
}

function busy(): HttpError {
  return new HttpError(503, 'Busy', 'Many figures are being drawn just now. Nothing is lost: try again in a few seconds.', { kind: 'busy', headers: { 'retry-after': '5' } })
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
