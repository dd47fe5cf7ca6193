/** A supergalactic section: galaxies of a cube seen along one of its axes, distances to scale. */
import { crowdOf } from './crowd.ts'
import { dotMark, hitOf, inDrawingOrder, markSize, type PlacedGalaxy } from './dots.ts'
import type { SceneOptions } from './furniture.ts'
import type { FigureGalaxy } from './galaxy.ts'
import { placeLabels } from './labels.ts'
import { layOut } from './layout.ts'
import { observerMarks } from './observer.ts'
import { planeAxes } from './plane-axes.ts'
import { ringMarks, scaleBar, zoneMarks } from './plane-ground.ts'
import { planeHeight, planeMap } from './plane-map.ts'
import type { FigureRecipe } from './recipe.ts'
import type { Box, Mark, Scene } from './scene.ts'
import { styleOf } from './style.ts'
import { textBox } from './text-metrics.ts'
import { AXES_OF, galaxyCount, projectionWords, titleOf } from './words.ts'
import { wedgesIn } from './zone.ts'

/** Galaxies with a position inside of the cube; one without a distance has no place in space. */
function withinCube(galaxies: readonly FigureGalaxy[], { plane }: FigureRecipe): FigureGalaxy[] {
  const { sgx, sgy, sgz } = plane.centre ?? { sgx: 0, sgy: 0, sgz: 0 }
  const near = (value: number | null, middle: number): boolean => value !== null && Math.abs(value - middle) <= plane.radius
  return galaxies.filter((galaxy) => near(galaxy.sgx, sgx) && near(galaxy.sgy, sgy) && near(galaxy.sgz, sgz))
}

/** Whether the section shows any of the zone; asked before there is a map, in Mpc. */
function zoneInView({ plane }: FigureRecipe): boolean {
  const [across, up] = AXES_OF[plane.axes]
  return plane.zoneOfAvoidance && wedgesIn(across, up, plane.centre ?? { sgx: 0, sgy: 0, sgz: 0 }, plane.radius).length > 0
}

export function planeScene(galaxies: readonly FigureGalaxy[], recipe: FigureRecipe, { bare = false, releaseLabel = '' }: SceneOptions = {}): Scene {
  const style = styleOf(recipe)
  const shown = withinCube(galaxies, recipe)
  const [acrossAxis, upAxis] = AXES_OF[recipe.plane.axes]
  const middle = recipe.plane.centre ?? { sgx: 0, sgy: 0, sgz: 0 }
  const inView = Math.abs(middle[acrossAxis]) < recipe.plane.radius && Math.abs(middle[upAxis]) < recipe.plane.radius
  const layout = layOut({
    recipe,
    style,
    context: { releaseLabel, count: shown.length, of: galaxies.length },
    mapHeight: (width) => planeHeight(width, style),
    content: { classes: new Set(shown.map((galaxy) => galaxy.class)), zone: zoneInView(recipe), supergalacticPlane: false, observer: inView },
    bare,
  })
  const map = planeMap(recipe, layout.map, style)
  const placed = inDrawingOrder(
    shown.map((galaxy): PlacedGalaxy => ({ galaxy, x: map.x(galaxy[map.across] ?? 0), y: map.y(galaxy[map.up] ?? 0), size: markSize(galaxy.absV, recipe.size, style) })),
  )
  const crowd = crowdOf(placed)
  const bar = scaleBar(map, recipe, style)
  const here = { x: map.x(0), y: map.y(0) }
  const hereBox: Box = { minX: here.x - 1.4 * style.mark, minY: here.y - 1.4 * style.mark, maxX: here.x + 1.4 * style.mark, maxY: here.y + 1.4 * style.mark }
  const rings = recipe.plane.rings ? ringMarks(map, recipe, style, crowd, [bar.box, hereBox]) : { circles: [], labels: [] }
  const labels = placeLabels({ galaxies: placed, crowd, obstacles: [bar.box, hereBox, ...rings.labels.map(textBox)], holds: map.holds }, recipe, style)

  const square = [map.outline]
  const ground: Mark[] = [{ kind: 'path', subpaths: square, fill: style.colours.sheet }]
  if (recipe.plane.zoneOfAvoidance) ground.push({ kind: 'group', name: 'zone of avoidance', marks: zoneMarks(map, style) })
  ground.push({ kind: 'group', name: 'rings of distance', marks: rings.circles })
  return {
    widthMm: layout.widthMm,
    heightMm: layout.heightMm,
    title: titleOf(recipe),
    description: `${galaxyCount(shown.length)} in supergalactic ${acrossAxis.toUpperCase()} and ${upAxis.toUpperCase()}, ${projectionWords(recipe)}.`,
    background: style.colours.paper,
    marks: [
      ...layout.above,
      { kind: 'group', name: 'map', marks: ground },
      { kind: 'group', name: 'distances', marks: rings.labels },
      { kind: 'group', name: 'observer', marks: inView ? observerMarks(here.x, here.y, style) : [] },
      { kind: 'group', name: 'galaxies', marks: placed.map((one) => dotMark(one, recipe, style)) },
      planeAxes(map, recipe, style),
      { kind: 'group', name: 'outline', marks: [{ kind: 'path', subpaths: square, stroke: { colour: style.colours.ink, width: style.outline } }] },
      { kind: 'group', name: 'scale bar', marks: bar.marks },
      { kind: 'group', name: 'names', marks: labels },
      ...layout.below,
    ],
    hits: placed.map(hitOf),
    map: map.box,
  }
}
