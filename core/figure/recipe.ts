/**
 * A recipe says everything about a figure but the data: kept in the gallery, sent in a request, stated in the file that comes out.
 * Reading one is strict: a key that is not known is refused by name rather than passed over.
 */
import { z } from 'zod'
import { FRAMES, type Frame } from '../astro/frames.ts'

export const VIEWS = ['sky', 'plane'] as const
export const PROJECTIONS = ['hammer', 'aitoff', 'mollweide'] as const
export const PLANE_AXES = ['sgx-sgy', 'sgx-sgz', 'sgy-sgz'] as const
export const FIGURE_THEMES = ['paper', 'night', 'print'] as const
export const LENGTH_UNITS = ['Mpc', 'Mly'] as const

export type View = (typeof VIEWS)[number]
export type ProjectionName = (typeof PROJECTIONS)[number]
export type PlaneAxes = (typeof PLANE_AXES)[number]
export type FigureTheme = (typeof FIGURE_THEMES)[number]
export type LengthUnit = (typeof LENGTH_UNITS)[number]

export const WIDTH_MM = { least: 40, most: 420 } as const
export const DPI = { least: 72, most: 1200 } as const

const coordinate = z.number().min(-1000).max(1000)

export const skyRecipeSchema = z.strictObject({
  projection: z.enum(PROJECTIONS).default('hammer'),
  frame: z.enum(FRAMES).default('supergalactic'),
  /** Longitude of the frame in the middle of the map, deg. */
  centreLon: z.number().min(-360).max(360).default(0),
  /** Shade |b| < 10 deg. */
  zoneOfAvoidance: z.boolean().default(true),
  supergalacticPlane: z.boolean().default(true),
})

export const planeRecipeSchema = z.strictObject({
  axes: z.enum(PLANE_AXES).default('sgx-sgy'),
  /** Half the side of the square drawn, and half the depth of the slab projected onto it, Mpc. */
  radius: z.number().min(0.01, 'The radius must be at least 0.01 Mpc.').max(1000).default(11),
  /** Middle of the cube, supergalactic, Mpc; left out: the observer. */
  centre: z.strictObject({ sgx: coordinate, sgy: coordinate, sgz: coordinate }).optional(),
  zoneOfAvoidance: z.boolean().default(true),
  rings: z.boolean().default(true),
})

export const figureRecipeSchema = z.strictObject({
  version: z.literal(1).default(1),
  view: z.enum(VIEWS),
  sky: skyRecipeSchema.default(() => skyRecipeSchema.parse({})),
  plane: planeRecipeSchema.default(() => planeRecipeSchema.parse({})),
  /** The catalogue's query string: which galaxies. */
  filter: z.string().max(4000).default(''),
  /** Release label or revision number; left out: the newest that the reader may see. */
  at: z.string().max(80).optional(),
  colour: z.enum(['class', 'one-ink']).default('class'),
  size: z.enum(['luminosity', 'fixed']).default('luminosity'),
  labels: z
    .strictObject({
      /** Most names to set; fewer where they would overlap. */
      count: z.int().min(0).max(500).default(24),
      /** Name the hosts before all others. */
      hosts: z.boolean().default(true),
    })
    .default({ count: 24, hosts: true }),
  units: z.enum(LENGTH_UNITS).default('Mpc'),
  /** Title and the line below it. */
  heading: z.boolean().default(true),
  /** Left empty: the view in words. */
  title: z.string().max(160).default(''),
  caption: z.string().max(1200).default(''),
  credit: z.string().max(240).default(''),
  legend: z.boolean().default(true),
  theme: z.enum(FIGURE_THEMES).default('paper'),
  widthMm: z.number().min(WIDTH_MM.least, `The width must be at least ${WIDTH_MM.least} mm.`).max(WIDTH_MM.most, `The width must be at most ${WIDTH_MM.most} mm.`).default(180),
  dpi: z.int().min(DPI.least, `The resolution must be at least ${DPI.least} dpi.`).max(DPI.most, `The resolution must be at most ${DPI.most} dpi.`).default(300),
})

export type FigureRecipe = z.infer<typeof figureRecipeSchema>
export type SkyRecipe = FigureRecipe['sky']
export type PlaneRecipe = FigureRecipe['plane']

/** The longitude that a frame is usually centred on, deg: in the supergalactic frame the zone of avoidance then frames the map. */
export const USUAL_CENTRE_DEG: Readonly<Record<Frame, number>> = { equatorial: 180, galactic: 0, supergalactic: 90 }

/** The recipe that a view starts from. */
export function defaultRecipe(view: View): FigureRecipe {
  return figureRecipeSchema.parse({ view, sky: { frame: 'supergalactic', centreLon: USUAL_CENTRE_DEG.supergalactic } })
}
