/**
 * Cuts shapes to a rectangle, so that scenes need no clipping: not every reader of SVG and PDF clips alike, and the rasteriser aborts the whole
 * process on a clipped group that is empty.
 */
import type { Box, Subpath } from './scene.ts'

export type Point = readonly [number, number]

/** How far an arc's straight pieces may stray from it, mm. */
const SAGITTA_MM = 0.01

/** The part of a convex polygon within a rectangle; null when there is none (Sutherland & Hodgman 1974, Communications of the ACM 17, 32). */
export function cutPolygon(polygon: readonly Point[], { minX, minY, maxX, maxY }: Box): readonly Point[] | null {
  const atX = (x: number) => (a: Point, b: Point): Point => [x, a[1] + ((b[1] - a[1]) * (x - a[0])) / (b[0] - a[0])]
  const atY = (y: number) => (a: Point, b: Point): Point => [a[0] + ((b[0] - a[0]) * (y - a[1])) / (b[1] - a[1]), y]
  const edges: [keeps: (p: Point) => boolean, crossing: (a: Point, b: Point) => Point][] = [
    [(p) => p[0] >= minX, atX(minX)],
    [(p) => p[0] <= maxX, atX(maxX)],
    [(p) => p[1] >= minY, atY(minY)],
    [(p) => p[1] <= maxY, atY(maxY)],
  ]
  let shape = polygon
  for (const [keeps, crossing] of edges) {
    const kept: Point[] = []
    for (const [i, point] of shape.entries()) {
      const before = shape[(i + shape.length - 1) % shape.length] ?? point
      if (keeps(point) !== keeps(before)) kept.push(crossing(before, point))
      if (keeps(point)) kept.push(point)
    }
    shape = kept
  }
  return shape.length < 3 ? null : shape
}

/** The arcs of a circle that lie within a rectangle. */
export function cutCircle(x: number, y: number, radius: number, box: Box): Subpath[] {
  const inside = (angle: number): boolean => {
    const px = x + radius * Math.cos(angle)
    const py = y + radius * Math.sin(angle)
    return px >= box.minX && px <= box.maxX && py >= box.minY && py <= box.maxY
  }
  const crossings = [...acrossVertical(box.minX - x, radius), ...acrossVertical(box.maxX - x, radius), ...acrossHorizontal(box.minY - y, radius), ...acrossHorizontal(box.maxY - y, radius)].sort((a, b) => a - b)
  if (crossings.length === 0) return inside(0) ? [arc(x, y, radius, 0, 2 * Math.PI)] : []
  return crossings.flatMap((from, i) => {
    const to = crossings[i + 1] ?? (crossings[0] ?? 0) + 2 * Math.PI
    return to > from && inside((from + to) / 2) ? [arc(x, y, radius, from, to)] : []
  })
}

/** Angles, [0, 2π), at which a circle about the origin meets a line at a distance from it. */
function acrossVertical(distance: number, radius: number): number[] {
  if (Math.abs(distance) >= radius) return []
  const angle = Math.acos(distance / radius)
  return [angle, 2 * Math.PI - angle]
}

function acrossHorizontal(distance: number, radius: number): number[] {
  if (Math.abs(distance) >= radius) return []
  const angle = Math.asin(distance / radius)
  return [(angle + 2 * Math.PI) % (2 * Math.PI), Math.PI - angle]
}

function arc(x: number, y: number, radius: number, from: number, to: number): Subpath {
  const step = 2 * Math.acos(Math.max(0, 1 - SAGITTA_MM / radius))
  const pieces = Math.max(2, Math.ceil((to - from) / step))
  const whole = to - from >= 2 * Math.PI
  const points: number[] = []
  for (let i = 0; i <= (whole ? pieces - 1 : pieces); i += 1) {
    const angle = from + ((to - from) * i) / pieces
    points.push(x + radius * Math.cos(angle), y + radius * Math.sin(angle))
  }
  return { points, closed: whole }
}
