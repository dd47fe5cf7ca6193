/** How many marks lie under a rectangle: asked a thousand times a frame, so marks are kept in a plain grid, which is quick to make anew. */
import type { PlacedGalaxy } from './dots.ts'
import type { Box } from './scene.ts'

/** Side of a cell, mm: about the length of a short name. */
const CELL_MM = 6

export interface Crowd {
  /** Marks that reach into a rectangle. @param except - id of a galaxy that does not count */
  within: (box: Box, except?: number) => number
}

export function crowdOf(placed: readonly PlacedGalaxy[]): Crowd {
  const cells = new Map<number, PlacedGalaxy[]>()
  let widest = 0
  for (const one of placed) {
    const key = keyOf(one.x, one.y)
    const cell = cells.get(key)
    if (cell) cell.push(one)
    else cells.set(key, [one])
    widest = Math.max(widest, one.size)
  }
  const reach = widest / 2
  return {
    within: ({ minX, minY, maxX, maxY }, except) => {
      let count = 0
      for (let column = Math.floor((minX - reach) / CELL_MM); column <= Math.floor((maxX + reach) / CELL_MM); column += 1) {
        for (let row = Math.floor((minY - reach) / CELL_MM); row <= Math.floor((maxY + reach) / CELL_MM); row += 1) {
          for (const { galaxy, x, y, size } of cells.get(column * ROWS + row) ?? []) {
            const half = size / 2
            if (x + half > minX && x - half < maxX && y + half > minY && y - half < maxY && galaxy.id !== except) count += 1
          }
        }
      }
      return count
    },
  }
}

/** More rows than any figure has. */
const ROWS = 65_536

function keyOf(x: number, y: number): number {
  return Math.floor(x / CELL_MM) * ROWS + Math.floor(y / CELL_MM)
}
