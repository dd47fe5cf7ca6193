/** What of a map stands in the address, beside the catalogue's filter. Usual values are left out, unreadable ones count as usual. */
import { FRAMES } from '../../../core/astro/frames.ts'
import { defaultRecipe, figureRecipeSchema, LENGTH_UNITS, PROJECTIONS, USUAL_CENTRE_DEG, type FigureRecipe, type View } from '../../../core/figure/recipe.ts'

/** The galaxy that is chosen, and the one that a plane is drawn about. */
export const CHOSEN = 'galaxy'
export const ABOUT = 'about'

const SKY_KEYS = ['frame', 'projection', 'middle', 'zone', 'sgplane', 'colour', 'size', 'labels', CHOSEN] as const
const PLANE_KEYS = ['radius', 'units', 'zone', 'rings', 'colour', 'size', 'labels', ABOUT, CHOSEN] as const
export const MAP_KEYS: Readonly<Record<View, readonly string[]>> = { sky: SKY_KEYS, plane: PLANE_KEYS }

function oneOf<Value extends string>(values: readonly Value[], text: string | null): Value | undefined {
  return values.find((value) => value === text)
}

function number(text: string | null): number | undefined {
  const value = text === null || text.trim() === '' ? NaN : Number(text)
  return Number.isFinite(value) ? value : undefined
}

const off = (text: string | null): boolean => text !== 'off'

/** The recipe that the address asks for. @param own - parameters of the page, without the filter's */
export function readRecipe(view: View, own: URLSearchParams): FigureRecipe {
  const usual = defaultRecipe(view)
  const frame = oneOf(FRAMES, own.get('frame')) ?? usual.sky.frame
  const wanted: FigureRecipe = {
    ...usual,
    sky: {
      frame,
      projection: oneOf(PROJECTIONS, own.get('projection')) ?? usual.sky.projection,
      centreLon: number(own.get('middle')) ?? USUAL_CENTRE_DEG[frame],
      zoneOfAvoidance: off(own.get('zone')),
      supergalacticPlane: off(own.get('sgplane')),
    },
    plane: { ...usual.plane, radius: number(own.get('radius')) ?? usual.plane.radius, zoneOfAvoidance: off(own.get('zone')), rings: off(own.get('rings')) },
    units: oneOf(LENGTH_UNITS, own.get('units')) ?? usual.units,
    colour: own.get('colour') === 'one-ink' ? 'one-ink' : 'class',
    size: own.get('size') === 'fixed' ? 'fixed' : 'luminosity',
    labels: { ...usual.labels, count: number(own.get('labels')) ?? usual.labels.count },
  }
  const checked = figureRecipeSchema.safeParse(wanted)
  return checked.success ? checked.data : usual
}

/** The same as parameters; null takes one out of the address. */
export function writeRecipe(recipe: FigureRecipe): Record<string, string | null> {
  const usual = defaultRecipe(recipe.view)
  const { sky, plane } = recipe
  const kept = (value: string | number, standard: string | number): string | null => (value === standard ? null : String(value))
  const ofAll = {
    zone: (recipe.view === 'sky' ? sky : plane).zoneOfAvoidance ? null : 'off',
    colour: kept(recipe.colour, usual.colour),
    size: kept(recipe.size, usual.size),
    labels: kept(recipe.labels.count, usual.labels.count),
  }
  if (recipe.view === 'sky') {
    return {
      ...ofAll,
      frame: kept(sky.frame, usual.sky.frame),
      projection: kept(sky.projection, usual.sky.projection),
      middle: kept(sky.centreLon, USUAL_CENTRE_DEG[sky.frame]),
      sgplane: sky.supergalacticPlane ? null : 'off',
    }
  }
  return { ...ofAll, radius: kept(plane.radius, usual.plane.radius), units: kept(recipe.units, usual.units), rings: plane.rings ? null : 'off' }
}
