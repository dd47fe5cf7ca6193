/** The whole sky: net, zone of avoidance, supergalactic plane, galaxies and their names. */
import { crowdOf } from './crowd.ts'
import { dotMark, hitOf, inDrawingOrder, markSize, type PlacedGalaxy } from './dots.ts'
import type { SceneOptions } from './furniture.ts'
import type { FigureGalaxy } from './galaxy.ts'
import { graticuleLabels, graticuleLines } from './graticule.ts'
import { placeLabels, grown } from './labels.ts'
import { layOut } from './layout.ts'
import { planeStroke } from './legend.ts'
import { projectGalaxies, unitVectors } from './project-galaxies.ts'
import { skyMap } from './projection.ts'
import type { FigureRecipe } from './recipe.ts'
import type { Box, Mark, Scene } from './scene.ts'
import { styleOf } from './style.ts'
import { textBox } from './text-metrics.ts'
import { supergalacticEquator, zoneOfAvoidance } from './zone.ts'
import { galaxyCount, projectionWords, titleOf } from './words.ts'

/** Nothing stands nearer to the edge of the figure than this, mm. */
const PAGE_EDGE_MM = 0.5

export function skyScene(galaxies: readonly FigureGalaxy[], recipe: FigureRecipe, { bare = false, releaseLabel = '' }: SceneOptions = {}): Scene {
  const style = styleOf(recipe)
  const { sky } = recipe
  const layout = layOut({
    recipe,
    style,
    context: { releaseLabel, count: galaxies.length, of: galaxies.length },
    mapHeight: (width) => width / 2,
    content: { classes: new Set(galaxies.map((galaxy) => galaxy.class)), zone: sky.zoneOfAvoidance, supergalacticPlane: sky.supergalacticPlane, observer: false },
    bare,
  })
  const map = skyMap(sky, grown(layout.map, -style.outline / 2))
  const outline = map.frame({ type: 'Sphere' })
  const places = projectGalaxies(sky, unitVectors(galaxies), map)
  const placed = inDrawingOrder(
    galaxies.map((galaxy, i): PlacedGalaxy => ({ galaxy, x: places[2 * i] ?? 0, y: places[2 * i + 1] ?? 0, size: markSize(galaxy.absV, recipe.size, style) })),
  )
  const crowd = crowdOf(placed)
  const page: Box = { minX: PAGE_EDGE_MM, minY: 0, maxX: layout.widthMm - PAGE_EDGE_MM, maxY: layout.heightMm }
  const ticks = graticuleLabels(sky, map, style, page, crowd)
  const labels = placeLabels({ galaxies: placed, crowd, obstacles: ticks.map(textBox), holds: map.holds }, recipe, style)

  const ground: Mark[] = [{ kind: 'path', subpaths: outline, fill: style.colours.sheet }]
  if (sky.zoneOfAvoidance) ground.push({ kind: 'group', name: 'zone of avoidance', marks: [{ kind: 'path', subpaths: map.sky(zoneOfAvoidance()), fill: style.colours.zone }] })
  ground.push({ kind: 'group', name: 'graticule', marks: [graticuleLines(map, style)] })
  if (sky.supergalacticPlane) {
    ground.push({ kind: 'group', name: 'supergalactic plane', marks: [{ kind: 'path', subpaths: map.sky(supergalacticEquator()), stroke: planeStroke(style) }] })
  }
  return {
    widthMm: layout.widthMm,
    heightMm: layout.heightMm,
    title: titleOf(recipe),
    description: `${galaxyCount(galaxies.length)} on the whole sky, ${sky.frame} frame, ${projectionWords(recipe)}.`,
    background: style.colours.paper,
    marks: [
      ...layout.above,
      { kind: 'group', name: 'map', marks: ground },
      { kind: 'group', name: 'graticule labels', marks: ticks },
      { kind: 'group', name: 'galaxies', marks: placed.map((one) => dotMark(one, recipe, style)) },
      { kind: 'group', name: 'outline', marks: [{ kind: 'path', subpaths: outline, stroke: { colour: style.colours.ink, width: style.outline } }] },
      { kind: 'group', name: 'names', marks: labels },
      ...layout.below,
    ],
    hits: placed.map(hitOf),
    map: layout.map,
  }
}
