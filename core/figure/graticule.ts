/** The net of a sky map and its labels, in the frame's own way: hours of right ascension, degrees elsewhere. */
import { geoGraticule } from 'd3-geo'
import type { Frame } from '../astro/frames.ts'
import { wrap360 } from '../astro/units.ts'
import type { Crowd } from './crowd.ts'
import type { SkyMap } from './projection.ts'
import type { SkyRecipe } from './recipe.ts'
import { overlapping, type Box, type PathMark, type TextMark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { CAP_HEIGHT, textBox } from './text-metrics.ts'
import { numeral } from './words.ts'

const STEP_DEG = 30

/** Least distance between labelled meridians, ems; else only every second or third is labelled. */
const LEAST_BETWEEN_EMS = 5

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

/** A label that more marks would lie on is left out. */
const MOST_HIDDEN = 1

/** Corners of the crossing with the equator where a label may stand; the first is taken unless another hides fewer marks. */
const CORNERS: readonly (readonly [dx: 1 | -1, dy: 1 | -1])[] = [[1, 1], [-1, 1], [1, -1], [-1, -1]]

/** @param page - no label may leave it */
export function graticuleLabels(sky: SkyRecipe, map: SkyMap, style: FigureStyle, page: Box, crowd: Crowd): TextMark[] {
  const base = { kind: 'text' as const, face: 'sans' as const, size: style.tick, colour: style.colours.muted }
  const gap = style.tick * 0.3
  const halo = { colour: style.colours.sheet, width: style.halo }
  const between = map.halfWidth / (180 / STEP_DEG)
  const step = STEP_DEG * (between > LEAST_BETWEEN_EMS * style.tick ? 1 : between * 2 > LEAST_BETWEEN_EMS * style.tick ? 2 : 3)
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
    const crowds = choices.map((choice) => crowd.within(textBox(choice)))
    const best = choices[crowds.indexOf(Math.min(...crowds))]
    if (best && Math.min(...crowds) <= MOST_HIDDEN && !meridians.some((other) => overlapping(textBox(other), textBox(best)))) meridians.push(best)
  }
  const parallels = LABELLED_PARALLELS.flatMap((lat) => [-1, 1].map((side) => outsideLabel(latitudeLabel(lat), map.framePoint(sky.centreLon + 179.9999, lat), side as -1 | 1, map, style)))
  return [...meridians, ...parallels.filter((label) => within(textBox(label), page))]
}

const LABELLED_PARALLELS = [60, STEP_DEG, -STEP_DEG, -60]

/** A label beside the edge of the map, moved outward until it is clear of it. @param side - −1 left, 1 right */
function outsideLabel(text: string, limb: readonly [number, number], side: -1 | 1, map: SkyMap, style: FigureStyle): TextMark {
  const x = map.centreX + side * Math.abs(limb[0] - map.centreX)
  // The outline is an ellipse twice as wide as high: its normal leans so.
  const across = (x - map.centreX) / map.halfWidth / map.halfWidth
  const up = (limb[1] - map.centreY) / map.halfHeight / map.halfHeight
  const length = Math.hypot(across, up)
  const clear = 0.3 * style.tick
  const label = (away: number): TextMark => ({
    kind: 'text',
    x: x + (away * across) / length,
    y: limb[1] + (away * up) / length + (CAP_HEIGHT * style.tick) / 2,
    text,
    face: 'sans',
    size: style.tick,
    anchor: side > 0 ? 'start' : 'end',
    colour: style.colours.muted,
  })
  let away = clear
  while (away < 4 * style.tick && map.touches(capitals(label(away), style, clear))) away += 0.1 * style.tick
  return label(away)
}

/** The part of a label's rectangle that digits fill, with room around it. */
function capitals(label: TextMark, style: FigureStyle, room: number): Box {
  const box = textBox(label)
  return { minX: box.minX - room, maxX: box.maxX + room, minY: label.y - CAP_HEIGHT * style.tick - room, maxY: label.y + room }
}

function within(box: Box, page: Box): boolean {
  return box.minX >= page.minX && box.maxX <= page.maxX && box.minY >= page.minY && box.maxY <= page.maxY
}
