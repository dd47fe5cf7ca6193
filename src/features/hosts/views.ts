/** The directions that a system can be looked at from. */
import { cross, dot, type Vector } from '../../../core/astro/vector.ts'
import type { HostAnswer } from '../../../core/schema/catalogue.ts'

export type Shape = NonNullable<HostAnswer['system']['shape']>
export type ViewKey = 'supergalactic-face' | 'supergalactic-edge' | 'satellites-edge' | 'satellites-face'

export interface View {
  id: ViewKey
  label: string
  /** Supergalactic unit vectors on the paper. */
  right: Vector
  up: Vector
  rightLabel: string
  upLabel: string
  /** Goes on after "seen". */
  words: string
}

const SUPERGALACTIC: readonly View[] = [
  { id: 'supergalactic-face', label: 'supergalactic, face on', right: [1, 0, 0], up: [0, 1, 0], rightLabel: 'ΔSGX', upLabel: 'ΔSGY', words: 'from the pole of the supergalactic plane' },
  { id: 'supergalactic-edge', label: 'supergalactic, edge on', right: [1, 0, 0], up: [0, 0, 1], rightLabel: 'ΔSGX', upLabel: 'ΔSGZ', words: 'edge on, with the supergalactic plane level' },
]

/** The views of a system: with the supergalactic plane, and, where its satellites have a shape, with the plane they lie in best. */
export function viewsOf(shape: Shape | null): readonly View[] {
  if (!shape) return SUPERGALACTIC
  const [major, middle, normal] = shape.axes
  return [
    ...SUPERGALACTIC,
    { id: 'satellites-edge', label: 'satellites’ plane, edge on', right: major, up: normal, rightLabel: 'along the major axis', upLabel: 'above the plane', words: 'along the intermediate axis of the satellites, their plane level' },
    { id: 'satellites-face', label: 'satellites’ plane, face on', right: major, up: middle, rightLabel: 'along the major axis', upLabel: 'along the intermediate axis', words: 'from the pole of the satellites’ plane' },
  ]
}

/** Where an offset comes to lie on the paper, and how far before it, in the offset's unit. */
export function onPaper(view: View, offset: Vector): { x: number; y: number; toward: number } {
  return { x: dot(offset, view.right), y: dot(offset, view.up), toward: dot(offset, cross(view.right, view.up)) }
}
