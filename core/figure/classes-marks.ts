/**
 * A shape of its own for every class, so that a figure reads in one ink, at 6 px and by people who see fewer colours. In a square of
 * 12 by 12 about its middle, y downward. The interface's tables and legends draw the same shapes.
 */
import type { GalaxyClass } from '../classes.ts'
import type { ClassHue, FigureColours } from './theme.ts'

export type Point = readonly [number, number]

/** `open` shapes are drawn by their outline alone; `strokes` are lines. */
export type MarkShape =
  | { kind: 'ellipse'; rx: number; ry: number; open: boolean }
  | { kind: 'polygon'; points: readonly Point[]; open: boolean }
  | { kind: 'strokes'; lines: readonly (readonly [Point, Point])[] }

export interface ClassMark {
  hue: ClassHue
  shape: MarkShape
}

/** Side of the square that shapes are given in, and the width of a drawn outline in it. */
export const MARK_SQUARE = 12
export const MARK_OUTLINE = 1.8

const ellipse = (rx: number, ry: number, open = false): MarkShape => ({ kind: 'ellipse', rx, ry, open })
const polygon = (points: readonly Point[], open = false): MarkShape => ({ kind: 'polygon', points, open })

export const CLASS_MARKS: Readonly<Record<GalaxyClass, ClassMark>> = {
  spiral: { hue: 'spiral', shape: ellipse(4.6, 4.6) },
  lenticular: { hue: 'spiral', shape: ellipse(5.6, 2.9) },
  elliptical: { hue: 'early', shape: polygon([[0, -5.6], [3.8, 0], [0, 5.6], [-3.8, 0]]) },
  'dwarf-elliptical': { hue: 'early', shape: polygon([[0, -4.6], [3.2, 0], [0, 4.6], [-3.2, 0]], true) },
  'dwarf-spheroidal': { hue: 'spheroidal', shape: ellipse(4, 4, true) },
  'ultra-faint': { hue: 'spheroidal', shape: { kind: 'strokes', lines: [[[0, -4.8], [0, 4.8]], [[-4.8, 0], [4.8, 0]]] } },
  'dwarf-irregular': { hue: 'irregular', shape: polygon([[0, -5], [5.3, 4.6], [-5.3, 4.6]]) },
  transition: { hue: 'irregular', shape: polygon([[0, -4], [4.3, 4], [-4.3, 4]], true) },
  irregular: { hue: 'irregular', shape: polygon([[0, 5], [-5.3, -4.6], [5.3, -4.6]]) },
  'blue-compact': { hue: 'compact', shape: polygon([[-4.1, -4.1], [4.1, -4.1], [4.1, 4.1], [-4.1, 4.1]]) },
  unknown: { hue: 'unknown', shape: { kind: 'strokes', lines: [[[-4, -4], [4, 4]], [[4, -4], [-4, 4]]] } },
}

/** Colour of a class's mark. */
export function classColour(key: GalaxyClass, colours: FigureColours, colouring: 'class' | 'one-ink'): string {
  return colouring === 'one-ink' ? colours.ink : colours.classes[CLASS_MARKS[key].hue]
}
