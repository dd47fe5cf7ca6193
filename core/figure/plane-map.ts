/** The square that a supergalactic section is drawn in: from Mpc to mm, and what is inside. */
import type { FigureRecipe } from './recipe.ts'
import type { Box, Subpath } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { AXES_OF, perMpc, type PlaneAxis } from './words.ts'

export interface PlaneMap {
  box: Box
  across: PlaneAxis
  up: PlaneAxis
  depth: PlaneAxis
  /** Middle of the square and of the slab, Mpc. */
  centre: Readonly<Record<PlaneAxis, number>>
  /** Half side, Mpc. */
  radius: number
  mmPerMpc: number
  /** How many of the recipe's unit a Mpc is. */
  unitsPerMpc: number
  x: (mpc: number) => number
  y: (mpc: number) => number
  holds: (box: Box) => boolean
  outline: Subpath
}

const OBSERVER = { sgx: 0, sgy: 0, sgz: 0 } as const

/** Room that the axes' numbers and names take to the left and below, mm. */
export function axisRoom(style: FigureStyle): { left: number; below: number } {
  return { left: 4.2 * style.tick, below: 3.4 * style.tick }
}

/** @param place - where the square and its axes stand; as high as `planeHeight` says */
export function planeMap({ plane, units }: FigureRecipe, place: Box, style: FigureStyle): PlaneMap {
  const room = axisRoom(style)
  const side = place.maxX - place.minX - room.left
  const box: Box = { minX: place.minX + room.left, minY: place.minY, maxX: place.maxX, maxY: place.minY + side }
  const [across, up, depth] = AXES_OF[plane.axes]
  const centre = plane.centre ?? OBSERVER
  const mmPerMpc = side / (2 * plane.radius)
  return {
    box,
    across,
    up,
    depth,
    centre,
    radius: plane.radius,
    mmPerMpc,
    unitsPerMpc: perMpc(units),
    x: (mpc) => box.minX + side / 2 + (mpc - centre[across]) * mmPerMpc,
    y: (mpc) => box.minY + side / 2 - (mpc - centre[up]) * mmPerMpc,
    holds: (b) => b.minX >= box.minX && b.maxX <= box.maxX && b.minY >= box.minY && b.maxY <= box.maxY,
    outline: { points: [box.minX, box.minY, box.maxX, box.minY, box.maxX, box.maxY, box.minX, box.maxY], closed: true },
  }
}

/** Height of the square with its axes, for the width that both have, mm. */
export function planeHeight(width: number, style: FigureStyle): number {
  const room = axisRoom(style)
  return width - room.left + room.below
}

/** A step of 1, 2 or 5 times a power of ten, near what is asked for. */
export function roundStep(wanted: number): number {
  const power = 10 ** Math.floor(Math.log10(wanted))
  const share = wanted / power
  return (share < 1.5 ? 1 : share < 3.5 ? 2 : share < 7.5 ? 5 : 10) * power
}

/** Decimals that tell multiples of a step apart. */
export function decimalsOf(step: number): number {
  return Math.max(0, -Math.floor(Math.log10(step) + 1e-9))
}
