import { useEffect, useRef, useState } from 'react'
import type { FigureRecipe } from '../../../core/figure/recipe.ts'
import type { Figure } from '../../../core/schema/figures.ts'
import { FigureCanvas } from '../../components/maps/figure-canvas.tsx'
import { queryOfRecipe, useMapData } from '../../components/maps/map-data.ts'
import { recipeOf } from './kept-recipe.ts'

/** A kept figure, small, drawn from its recipe once it comes into sight. */
export function Thumbnail({ figure }: { figure: Figure }) {
  const recipe = recipeOf(figure)
  const frame = useRef<HTMLDivElement>(null)
  const [isNear, setNear] = useState(false)
  useEffect(() => {
    const target = frame.current
    if (!target) return
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some((entry) => entry.isIntersecting)) setNear(true)
      },
      { rootMargin: '300px' },
    )
    observer.observe(target)
    return () => observer.disconnect()
  }, [])
  return (
    <div ref={frame} className="flex aspect-[7/5] items-center justify-center overflow-hidden bg-paper">
      {!recipe ? <p className="px-6 text-muted">This recipe is of a kind that cannot be drawn here.</p> : isNear && <Drawn recipe={recipe} />}
    </div>
  )
}

function Drawn({ recipe }: { recipe: FigureRecipe }) {
  const data = useMapData(queryOfRecipe(recipe))
  if (data.isError) return <p className="px-6 text-muted">Its galaxies cannot be read just now.</p>
  if (data.revision === null) return null
  // A square picture stands in the middle, whole.
  return <FigureCanvas galaxies={data.galaxies} recipe={recipe} releaseLabel={data.releaseLabel} className={recipe.view === 'plane' ? 'w-[52%]' : 'w-full'} />
}
