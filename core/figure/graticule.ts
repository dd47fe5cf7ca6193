/** The net of a sky map and its labels, in the frame's own way: hours of right ascension, degrees elsewhere. */
import { geoGraticule } from 'd3-geo'
import type { Frame } from '../astro/frames.ts'
import { wrap360 } from '../astro/units.ts'
import type { SkyMap } from './projection.ts'
import type { SkyRecipe } from './recipe.ts'
import type { Box, PathMark, TextMark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { CAP_HEIGHT, textBox } from './text-metrics.ts'
import { numeral } from './words.ts'

const STEP_DEG = 30

/** Below this half width of the map every second meridian is labelled, mm. */
const CROWDED_MM = 62

/** Meridians nearer to the edge of the map than this stay unlabelled, deg. */
const EDGE_DEG = 18

export function graticuleLines(map: SkyMap, style: FigureStyle): PathMark {
  const net = geoGraticule().step([STEP_DEG, STEP_DEG]).extent([[-180, -89.999], [180, 89.999]])
  return { kind: 'path', subpaths: map.frame(net()), stroke: { colour: style.colours.line, width: style.hairline } }
}

export function longitudeLabel(frame: Frame, lon: number): string {
  return frame === 'equatorial' ? `${numeral(wrap360(lon) / 15)}h` : `${numeral(wrap360(lon))}°`
}

export function latitudeLabel(lat: number): string {
  return `${lat > 0 ? '+' : ''}${numeral(lat)}°`
}

/** Corners of the crossing with the equator where a label may stand; the first is taken unless another hides fewer marks. */
const CORNERS: readonly (readonly [dx: 1 | -1, dy: 1 | -1])[] = [[1, 1], [-1, 1], [1, -1], [-1, -1]]

/** @param crowd - how many marks lie in a rectangle */
export function graticuleLabels(sky: SkyRecipe, map: SkyMap, style: FigureStyle, crowd: (box: Box) => number): TextMark[] {
  const base = { kind: 'text' as const, face: 'sans' as const, size: style.tick, colour: style.colours.muted }
  const gap = style.tick * 0.3
  const halo = { colour: style.colours.sheet, width: style.halo }
  const step = map.halfWidth < CROWDED_MM ? 2 * STEP_DEG : STEP_DEG
  const meridians: TextMark[] = []
  for (let lon = 0; lon < 360; lon += step) {
    const fromMiddle = Math.abs(wrap360(lon - sky.centreLon + 180) - 180)
    if (fromMiddle > 180 - EDGE_DEG) continue
    const [x, y] = map.framePoint(lon, 0)
    const choices = CORNERS.map(([dx, dy]): TextMark => ({
      ...base,
      x: x + dx * gap,
      y: dy > 0 ? y + gap + CAP_HEIGHT * style.tick : y - gap,
      text: longitudeLabel(sky.frame, lon),
      anchor: dx > 0 ? 'start' : 'end',
      halo,
    }))
    const crowds = choices.map((choice) => crowd(textBox(choice)))
    const best = choices[crowds.indexOf(Math.min(...crowds))]
    if (best) meridians.push(best)
  }
  const parallels = [-60, -STEP_DEG, STEP_DEG, 60].flatMap((lat): TextMark[] => {
    const limb = map.framePoint(sky.centreLon + 179.9999, lat)
    const away = map.centreX - Math.min(limb[0], 2 * map.centreX - limb[0])
    const y = limb[1] + (CAP_HEIGHT * style.tick) / 2 + Math.sign(-lat) * -0.25 * style.tick * (Math.abs(lat) > 45 ? 1 : 0)
    const text = latitudeLabel(lat)
    return [
      { ...base, x: map.centreX - away - gap * 2.2, y, text, anchor: 'end' },
      { ...base, x: map.centreX + away + gap * 2.2, y, text, anchor: 'start' },
    ]
  })
  return [...meridians, ...parallels]
}
