/** Keeping recipes for maps. */
import { z } from 'zod'
import { figureRecipeSchema, type FigureRecipe } from '../../core/figure/recipe.ts'
import type { Figure, FigureInput, FigurePatch } from '../../core/schema/figures.ts'
import { Forbidden, NotFound } from '../http/errors.ts'
import type { Reader, Services } from '../http/route.ts'
import { FigureModel } from '../models/figure.ts'
import { record } from './audit.ts'
import { personOf } from './submissions/load.ts'

/** @throws ZodError whose paths begin with `recipe` */
function recipeOf(recipe: unknown): FigureRecipe {
  return z.object({ recipe: figureRecipeSchema }).parse({ recipe }).recipe
}

function mayEdit(figure: FigureModel, reader: Reader): boolean {
  return reader.user !== null && (figure.owner === reader.user.id || reader.user.roles.includes('steward'))
}

function presented(figure: FigureModel, reader: Reader): Figure {
  return {
    id: figure.id, title: figure.title, shared: figure.shared, owner: { id: figure.owner, name: figure.keeper?.name ?? '' }, recipe: figure.recipe,
    updatedAt: figure.updatedAt.toISOString(), may: { edit: mayEdit(figure, reader) },
  }
}

/** The reader's own figures and those that are shared, newest first. */
export async function listFigures({ knex }: Services, reader: Reader): Promise<Figure[]> {
  const found = await FigureModel.query(knex).withGraphFetched('keeper').where('shared', true).orWhere('owner', reader.user?.id ?? 0).orderBy('updatedAt', 'desc').limit(500)
  return found.map((f) => presented(f, reader))
}

/** @throws NotFound, also for somebody else's that is not shared */
export async function figureById({ knex }: Services, reader: Reader, id: number): Promise<Figure> {
  return presented(await visible({ knex } as Services, reader, id), reader)
}

async function visible({ knex }: Services, reader: Reader, id: number): Promise<FigureModel> {
  const figure = await FigureModel.query(knex).findById(id).withGraphFetched('keeper')
  if (!figure || !(figure.shared || figure.owner === reader.user?.id)) throw new NotFound(`There is no figure ${id} that you can see.`)
  return figure
}

/** @throws ZodError naming what is wrong with the recipe */
export async function keepFigure(services: Services, reader: Reader, input: FigureInput): Promise<Figure> {
  const person = personOf(reader)
  const recipe = recipeOf(input.recipe)
  const made = await FigureModel.query(services.knex).insert({ owner: person.id, title: input.title, shared: input.shared, recipe })
  return figureById(services, reader, made.id)
}

/** @throws NotFound; Forbidden for somebody else's; ZodError */
export async function changeFigure(services: Services, reader: Reader, id: number, { title, shared, recipe }: FigurePatch): Promise<Figure> {
  await requireOwn(services, reader, id)
  await FigureModel.query(services.knex)
    .findById(id)
    .patch({ ...(title !== undefined && { title }), ...(shared !== undefined && { shared }), ...(recipe !== undefined && { recipe: recipeOf(recipe) }), updatedAt: new Date() })
  return figureById(services, reader, id)
}

/** @throws NotFound; Forbidden for somebody else's */
export async function deleteFigure(services: Services, reader: Reader, id: number): Promise<void> {
  const figure = await requireOwn(services, reader, id)
  await services.knex.transaction(async (trx) => {
    await FigureModel.query(trx).deleteById(id)
    await record(trx, personOf(reader).id, 'figure.delete', `figure:${id}`, { title: figure.title, recipe: figure.recipe })
  })
}

async function requireOwn(services: Services, reader: Reader, id: number): Promise<FigureModel> {
  const figure = await visible(services, reader, id)
  if (!mayEdit(figure, reader)) throw new Forbidden(`This figure is ${figure.keeper?.name ?? 'somebody else'}’s. Nothing was changed; keep a copy of your own.`)
  return figure
}
