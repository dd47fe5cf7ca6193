/** Kept figures. */
import { figureDrawingSchema, figureInputSchema, figureListSchema, figurePatchSchema, figureSchema } from '../../core/schema/figures.ts'
import { setRevision } from '../http/catalogue-answer.ts'
import { route, type Route } from '../http/route.ts'
import { changeFigure, deleteFigure, figureById, keepFigure, listFigures } from '../services/figures.ts'
import { drawFigure } from '../services/figure-drawing.ts'
import { one } from './parameters.ts'

export const figureRoutes: Route[] = [
  route({
    method: 'get', path: '/api/figures', summary: 'Figures of the gallery: those that are shared, and one’s own', permission: 'catalogue.read', answer: figureListSchema,
    handle: async (context) => ({ figures: await listFigures(context, context.reader) }),
  }),
  route({
    method: 'post', path: '/api/figures', summary: 'Keep a figure', permission: 'figure.write', body: figureInputSchema, answer: figureSchema, status: 201,
    handle: (context) => keepFigure(context, context.reader, context.body),
  }),
  route({
    method: 'post', path: '/api/figures/render', summary: 'Draw a recipe: the file as svg, pdf or png', permission: 'figure.render', limit: 'export', body: figureDrawingSchema,
    handle: async (context) => {
      const { bytes, mediaType, fileName, revision } = await drawFigure(context, context.reader, context.body)
      setRevision(context.response, revision)
      context.response.setHeader('content-disposition', `attachment; filename="${fileName}"`)
      context.response.type(mediaType).send(bytes)
      return undefined
    },
  }),
  route({
    method: 'get', path: '/api/figures/:id', summary: 'One figure, with its recipe', permission: 'catalogue.read', params: one, answer: figureSchema,
    handle: (context) => figureById(context, context.reader, context.params.id),
  }),
  route({
    method: 'patch', path: '/api/figures/:id', summary: 'Change a figure: its keeper or a steward', permission: 'figure.write', params: one, body: figurePatchSchema, answer: figureSchema,
    handle: (context) => changeFigure(context, context.reader, context.params.id, context.body),
  }),
  route({
    method: 'delete', path: '/api/figures/:id', summary: 'Delete a figure: its keeper or a steward', permission: 'figure.write', params: one, status: 204,
    handle: async (context) => {
      await deleteFigure(context, context.reader, context.params.id)
      context.response.status(204).end()
      return undefined
    },
  }),
]
