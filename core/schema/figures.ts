/** Figures kept in the gallery. The recipe itself is core/figure/recipe.ts. */
import { z } from 'zod'
import { figureRecipeSchema } from '../figure/recipe.ts'

export const FIGURE_FORMATS = ['svg', 'pdf', 'png'] as const
export type FigureFormat = (typeof FIGURE_FORMATS)[number]

export const figureInputSchema = z.strictObject({
  title: z.string().trim().min(1, 'Give the figure a title.').max(160),
  shared: z.boolean().default(true),
  /** Checked by core/figure/recipe.ts. */
  recipe: z.unknown(),
})

/** PATCH /api/figures/:id: what is left out stays as it is. */
export const figurePatchSchema = z
  .strictObject({ title: figureInputSchema.shape.title.optional(), shared: z.boolean().optional(), recipe: z.unknown().optional() })
  .refine((patch) => Object.values(patch).some((v) => v !== undefined), 'Change at least one field.')

/** POST /api/figures/render: answers the file. */
export const figureDrawingSchema = z.strictObject({ recipe: figureRecipeSchema, format: z.enum(FIGURE_FORMATS) })

export const figureSchema = z.object({
  id: z.int(),
  title: z.string(),
  shared: z.boolean(),
  owner: z.object({ id: z.int(), name: z.string() }),
  recipe: z.unknown(),
  updatedAt: z.string(),
  may: z.object({ edit: z.boolean() }),
})
export const figureListSchema = z.object({ figures: z.array(figureSchema) })

export type FigurePatch = z.infer<typeof figurePatchSchema>
export type FigureDrawing = z.infer<typeof figureDrawingSchema>
export type FigureInput = z.infer<typeof figureInputSchema>
export type Figure = z.infer<typeof figureSchema>
