import { useCallback } from 'react'
import { useNavigate } from 'react-router-dom'
import { defaultRecipe } from '../../../core/figure/recipe.ts'
import { titleOf } from '../../../core/figure/words.ts'
import { FailedState } from '../../components/failed-state.tsx'
import { MapCanvas } from '../../components/maps/map-canvas.tsx'
import { useMapData } from '../../components/maps/map-data.ts'
import { paths, withQuery } from '../../paths.ts'

const RECIPE = { ...defaultRecipe('sky'), labels: { count: 12, hosts: true } }

/** Every galaxy on the sky; one that is chosen opens in the atlas. */
export function LiveSky() {
  const data = useMapData('')
  const navigate = useNavigate()
  const choose = useCallback(
    (slug: string | null) => {
      if (slug !== null) void navigate(withQuery(paths.sky, { galaxy: slug }))
    },
    [navigate],
  )
  if (data.isError) return <FailedState error={data.error} onRetry={data.refetch} title="The map cannot be drawn just now" />
  return <MapCanvas galaxies={data.galaxies} recipe={RECIPE} selected={null} onSelect={choose} label={titleOf(RECIPE)} />
}
