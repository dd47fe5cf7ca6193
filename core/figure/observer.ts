import type { Mark } from './scene.ts'
import type { FigureStyle } from './style.ts'

/** Where we are: a circle with a point in it. */
export function observerMarks(x: number, y: number, style: FigureStyle): Mark[] {
  const colour = style.oneInk ? style.colours.ink : style.colours.accent
  const radius = 0.95 * style.mark
  return [
    { kind: 'circle', x, y, radius: radius + 0.35 * style.mark, fill: style.colours.sheet },
    { kind: 'circle', x, y, radius, stroke: { colour, width: style.outline } },
    { kind: 'circle', x, y, radius: radius * 0.32, fill: colour },
  ]
}
