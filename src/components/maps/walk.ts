import type { Hit } from '../../../core/figure/scene.ts'

export type Direction = 'ArrowLeft' | 'ArrowRight' | 'ArrowUp' | 'ArrowDown'

const STEPS: Readonly<Record<Direction, readonly [number, number]>> = { ArrowLeft: [-1, 0], ArrowRight: [1, 0], ArrowUp: [0, -1], ArrowDown: [0, 1] }

/** How much more a step to the side counts than one ahead. */
const SIDEWAYS = 2

export function directionOf(key: string): Direction | null {
  return key in STEPS ? (key as Direction) : null
}

/** The galaxy to go to from another one by an arrow key: near, and in that direction within 45°. Null at the edge. */
export function nextHit(hits: readonly Hit[], from: Hit, direction: Direction): Hit | null {
  const [sx, sy] = STEPS[direction]
  let best: Hit | null = null
  let least = Infinity
  for (const hit of hits) {
    if (hit.id === from.id) continue
    const ahead = (hit.x - from.x) * sx + (hit.y - from.y) * sy
    const aside = Math.abs((hit.x - from.x) * sy) + Math.abs((hit.y - from.y) * sx)
    const way = ahead + SIDEWAYS * aside
    if (ahead > 0 && aside <= ahead && way < least) {
      best = hit
      least = way
    }
  }
  return best
}
