import { titleOf } from '../../../core/figure/words.ts'
import { MapCanvas } from '../../components/maps/map-canvas.tsx'
import { useDocumentTitle } from '../../lib/document-title.ts'
import { AtlasFrame } from './atlas-frame.tsx'
import { useAtlas } from './use-atlas.ts'

/** The whole sky in one of three frames; what is drawn and chosen stands in the address. */
export default function SkyPage() {
  useDocumentTitle('The sky')
  const atlas = useAtlas('sky')
  const { recipe, data } = atlas
  return (
    <AtlasFrame atlas={atlas} view="sky" title={titleOf(recipe)} recipe={recipe}>
      <MapCanvas galaxies={data.galaxies} recipe={recipe} selected={atlas.selected} onSelect={atlas.select} onOpen={atlas.open} label={titleOf(recipe)} />
    </AtlasFrame>
  )
}
