/**
 * A scene: what a figure shows, in millimetres from its upper left corner, y downward. Every painter draws the same scene, so the screen,
 * SVG, PDF and PNG agree. Texts are placed by their baseline; an em is given in millimetres.
 */
import type { MarkShape } from './classes-marks.ts'

/** Fonts that are shipped with the application. */
export const FACES = ['sans', 'sans-semibold', 'sans-italic', 'serif', 'serif-semibold'] as const
export type Face = (typeof FACES)[number]

export type Anchor = 'start' | 'middle' | 'end'

/** One line of straight pieces; x and y alternate. */
export interface Subpath {
  points: readonly number[]
  closed: boolean
}

export interface Stroke {
  colour: string
  /** mm */
  width: number
  /** mm on, mm off, ... */
  dash?: readonly number[]
}

export interface PathMark {
  kind: 'path'
  subpaths: readonly Subpath[]
  fill?: string
  stroke?: Stroke
}

export interface CircleMark {
  kind: 'circle'
  x: number
  y: number
  radius: number
  fill?: string
  stroke?: Stroke
}

export interface DotMark {
  kind: 'dot'
  shape: MarkShape
  x: number
  y: number
  /** Side of the square that the shape is drawn in, mm. */
  size: number
  colour: string
  /** Thin line around it that parts it from what lies beneath. */
  halo?: string
}

export interface TextMark {
  kind: 'text'
  x: number
  y: number
  text: string
  face: Face
  /** Em, mm. */
  size: number
  anchor: Anchor
  colour: string
  halo?: { colour: string; width: number }
  /** Degrees, clockwise, about (x, y). */
  turn?: number
}

export interface GroupMark {
  kind: 'group'
  /** What it is, for those who open the file: "graticule", "galaxies" ... */
  name: string
  marks: readonly Mark[]
}

export type Mark = PathMark | CircleMark | DotMark | TextMark | GroupMark

/** Where a galaxy stands in the scene; the last is drawn on top. */
export interface Hit {
  id: number
  slug: string
  x: number
  y: number
  radius: number
}

/** A rectangle, mm. */
export interface Box {
  minX: number
  minY: number
  maxX: number
  maxY: number
}

export function overlapping(a: Box, b: Box): boolean {
  return a.minX < b.maxX && b.minX < a.maxX && a.minY < b.maxY && b.minY < a.maxY
}

export interface Scene {
  widthMm: number
  heightMm: number
  /** Names the picture for those who do not see it. */
  title: string
  description: string
  background: string
  marks: readonly Mark[]
  hits: readonly Hit[]
  /** The map itself, without title, legend and credit. */
  map: Box
}

export const MM_PER_PT = 25.4 / 72

/** Points to millimetres. */
export function millimetres(pt: number): number {
  return pt * MM_PER_PT
}

/** The galaxy at a place, the nearest among those within reach; null where there is none. @param slack - mm around each mark */
export function hitAt(hits: readonly Hit[], x: number, y: number, slack = 0.6): Hit | null {
  let best: Hit | null = null
  let least = Infinity
  for (const hit of hits) {
    const away = Math.hypot(hit.x - x, hit.y - y)
    if (away <= hit.radius + slack && away <= least) {
      best = hit
      least = away
    }
  }
  return best
}

/** Texts of a scene, groups opened. */
export function* textsOf(marks: readonly Mark[]): Generator<TextMark> {
  for (const mark of marks) {
    if (mark.kind === 'text') yield mark
    else if (mark.kind === 'group') yield* textsOf(mark.marks)
  }
}
