/** A few ready figures, so that the gallery shows at once what it is for. */
import { defaultRecipe, figureRecipeSchema } from '../../core/figure/recipe.ts'
import type { Reader, Services } from '../../server/http/route.ts'
import { keepFigure } from '../../server/services/figures.ts'

const CREDIT = 'Demonstration data, invented'

export async function hangTheGallery(services: Services, owner: Reader): Promise<void> {
  const sky = defaultRecipe('sky')
  const plane = defaultRecipe('plane')
  const figures = [
    { ...plane, title: 'Our invented neighbourhood from above', caption: 'Galaxies within 11 Mpc, seen from the pole of the supergalactic plane.' },
    { ...sky, title: 'The whole sky', caption: 'Every galaxy of the release; the band is where the Galactic disc hides what lies behind.' },
    { ...sky, title: 'Satellites of Ostrel and Mirrow', filter: 'host=ostrel,mirrow', theme: 'night' as const },
  ]
  for (const recipe of figures) await keepFigure(services, owner, { title: recipe.title, shared: true, recipe: figureRecipeSchema.parse({ ...recipe, credit: CREDIT }) })
}
