import { classLabel, GALAXY_CLASSES } from '../../../core/classes.ts'
import type { FigureGalaxy } from '../../../core/figure/galaxy.ts'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import { ClassMark } from '../class-mark.tsx'

/** What the marks of a map mean: the classes that are in it, and its areas and lines. */
export function MapLegend({ galaxies, recipe }: { galaxies: readonly FigureGalaxy[]; recipe: FigureRecipe }) {
  const present = new Set(galaxies.map((galaxy) => galaxy.class))
  const zone = recipe.view === 'sky' ? recipe.sky.zoneOfAvoidance : recipe.plane.zoneOfAvoidance
  return (
    <ul aria-label="Legend" className="mt-3 flex flex-wrap gap-x-5 gap-y-1 text-muted">
      {GALAXY_CLASSES.filter((one) => present.has(one)).map((one) => (
        <li key={one} className="flex items-center gap-1.5">
          <span aria-hidden className={recipe.colour === 'one-ink' ? 'flex [&_svg]:text-ink!' : 'flex'}>
            <ClassMark galaxyClass={one} />
          </span>
          {classLabel(one)}
        </li>
      ))}
      {zone && (
        <li className="flex items-center gap-1.5">
          <span aria-hidden className="inline-block h-3 w-4 border border-edge bg-zone" />
          {'zone of avoidance, |b| < 10°'}
        </li>
      )}
      {recipe.view === 'sky' && recipe.sky.supergalacticPlane && (
        <li className="flex items-center gap-1.5">
          <span aria-hidden className="inline-block w-5 border-t-2 border-dashed border-accent" />
          supergalactic plane
        </li>
      )}
    </ul>
  )
}
