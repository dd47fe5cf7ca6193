import { useMemo } from 'react'
import type { FigureRecipe, PlaneAxes } from '../../../core/figure/recipe.ts'
import { titleOf } from '../../../core/figure/words.ts'
import { Button } from '../../components/button.tsx'
import { MapCanvas } from '../../components/maps/map-canvas.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { AtlasFrame } from './atlas-frame.tsx'
import { ABOUT } from './map-state.ts'
import { useAtlas } from './use-atlas.ts'

/** Face on and edge on: both hold SGX across, so a galaxy stands at the same place in each. */
const SHOWN: readonly PlaneAxes[] = ['sgx-sgy', 'sgx-sgz']

/** About the reach of a massive host, so that a system fills the section. */
const SYSTEM_RADIUS_MPC = '0.5'

/** Two sections of supergalactic space side by side, linked; about the observer, or about a galaxy. */
export default function PlanePage() {
  useDocumentTitle('The supergalactic plane')
  const atlas = useAtlas('plane')
  const { data } = atlas
  const about = atlas.own.get(ABOUT)
  const middle = about === null ? undefined : data.galaxies.find((galaxy) => galaxy.slug === about)
  const recipe = useMemo((): FigureRecipe => {
    const { sgx = null, sgy = null, sgz = null } = middle ?? {}
    if (sgx === null || sgy === null || sgz === null) return atlas.recipe
    return { ...atlas.recipe, plane: { ...atlas.recipe.plane, centre: { sgx, sgy, sgz } } }
  }, [atlas.recipe, middle])
  const recipes = useMemo(() => SHOWN.map((axes): FigureRecipe => ({ ...recipe, plane: { ...recipe.plane, axes } })), [recipe])
  return (
    <AtlasFrame
      atlas={atlas}
      view="plane"
      title={middle ? `Round ${middle.name}` : 'The supergalactic plane'}
      recipe={recipe}
      onCentre={(slug) => atlas.changeOwn({ [ABOUT]: slug, radius: SYSTEM_RADIUS_MPC })}
    >
      {middle && (
        <p className="mb-3 flex flex-wrap items-center gap-3">
          {`${middle.name} is in the middle of both sections.`}
          <Button size="small" onPress={() => atlas.changeOwn({ [ABOUT]: null, radius: null })}>Back to the observer</Button>
        </p>
      )}
      <div className="grid gap-5 md:grid-cols-2">
        {recipes.map((one) => (
          <section key={one.plane.axes} aria-label={titleOf(one)} className="min-w-0">
            <h2 className="mb-2 text-lg">{titleOf(one)}</h2>
            <MapCanvas galaxies={data.galaxies} recipe={one} selected={atlas.selected} onSelect={atlas.select} onOpen={atlas.open} label={titleOf(one)} />
          </section>
        ))}
      </div>
    </AtlasFrame>
  )
}
