/**
 * Names beside galaxies, none over another: each in turn, the most important first, takes the best free place of sixteen around its mark, or
 * goes without. What lies in the way is kept in an R-tree.
 */
import RBush from 'rbush'
import type { Crowd } from './crowd.ts'
import type { PlacedGalaxy } from './dots.ts'
import type { FigureRecipe } from './recipe.ts'
import type { Anchor, Box, TextMark } from './scene.ts'
import type { FigureStyle } from './style.ts'
import { boxOfWidth, CAP_HEIGHT, textWidth } from './text-metrics.ts'

/** Names are set in italics, as names of waters are on charts. */
const FACE = 'sans-italic'

/** Where a name may stand about its mark, best first: x and y outward, and how it is set. */
const POSITIONS: readonly (readonly [dx: number, dy: number, anchor: Anchor])[] = [
  [0.8, -0.6, 'start'],
  [1, 0, 'start'],
  [0.8, 0.6, 'start'],
  [-0.8, -0.6, 'end'],
  [-1, 0, 'end'],
  [-0.8, 0.6, 'end'],
  [0, -1, 'middle'],
  [0, 1, 'middle'],
]

/** How far from the edge of the mark, ems. */
const DISTANCES = [0.22, 0.7]

/** Marks that a name may cover before it is left out; hosts are named even so. */
const MOST_COVERED = 1
const MOST_COVERED_HOST = 4

/** Costs, in covered marks: of a less good position, and of the farther distance. */
const WORSE_POSITION = 0.12
const FARTHER = 0.35

/** Room kept around every name, ems. */
const CLEARANCE = 0.12

export interface LabelRequest {
  galaxies: readonly PlacedGalaxy[]
  crowd: Crowd
  /** What no name may touch, mm. */
  obstacles: readonly Box[]
  /** Whether a name may stand here at all. */
  holds: (box: Box) => boolean
}

/** Galaxies in the order of being named: hosts first when asked for, then by luminosity. */
export function namingOrder(galaxies: readonly PlacedGalaxy[], hostsFirst: boolean): PlacedGalaxy[] {
  const rank = ({ galaxy }: PlacedGalaxy): number => (hostsFirst && galaxy.relation === 'host' ? 0 : 1)
  return [...galaxies].sort((a, b) => rank(a) - rank(b) || (a.galaxy.absV ?? 99) - (b.galaxy.absV ?? 99) || a.galaxy.id - b.galaxy.id)
}

/** The names that could be set, as marks. */
export function placeLabels({ galaxies, crowd, obstacles, holds }: LabelRequest, recipe: FigureRecipe, style: FigureStyle): TextMark[] {
  if (recipe.labels.count === 0) return []
  const taken = new RBush<Box>()
  taken.load(obstacles.map((box) => ({ ...box })))
  const set: TextMark[] = []
  for (const placed of namingOrder(galaxies, recipe.labels.hosts)) {
    if (set.length >= recipe.labels.count) break
    const host = recipe.labels.hosts && placed.galaxy.relation === 'host'
    const size = host ? style.hostLabel : style.label
    const width = textWidth(placed.galaxy.name, FACE, size)
    let best: { at: LabelPlace; box: Box } | null = null
    let least = host ? MOST_COVERED_HOST + 1 : MOST_COVERED + 1
    for (const [far, distance] of DISTANCES.entries()) {
      for (const [rank, position] of POSITIONS.entries()) {
        const penalty = rank * WORSE_POSITION + far * FARTHER
        if (penalty >= least) continue
        const at = labelPlace(placed, position, distance * size, size)
        const box = grown(boxOfWidth(at, width, size), CLEARANCE * size)
        if (!holds(box) || taken.collides(box)) continue
        const cost = penalty + crowd.within(box, placed.galaxy.id)
        if (cost < least) {
          least = cost
          best = { at, box }
        }
      }
    }
    if (best) {
      set.push(labelMark(placed.galaxy.name, best.at, host, size, style))
      taken.insert(best.box)
    }
  }
  return set
}

interface LabelPlace {
  x: number
  y: number
  anchor: Anchor
}

/** @param away - from the edge of the mark, mm @param size - em, mm */
function labelPlace({ x, y, size: markSize }: PlacedGalaxy, [dx, dy, anchor]: (typeof POSITIONS)[number], away: number, size: number): LabelPlace {
  const reach = markSize / 2 + away
  const middle = y + dy * (reach + (anchor === 'middle' ? (CAP_HEIGHT * size) / 2 : 0))
  return { x: x + dx * reach, y: middle + (CAP_HEIGHT * size) / 2, anchor }
}

function labelMark(text: string, at: LabelPlace, host: boolean, size: number, style: FigureStyle): TextMark {
  return { kind: 'text', ...at, text, face: FACE, size, colour: host ? style.colours.ink : style.colours.muted, halo: { colour: style.colours.sheet, width: style.halo } }
}

/** A rectangle with room around it. */
export function grown(box: Box, by: number): Box {
  return { minX: box.minX - by, minY: box.minY - by, maxX: box.maxX + by, maxY: box.maxY + by }
}
