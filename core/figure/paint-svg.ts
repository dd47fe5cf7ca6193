/** Draws a scene as SVG: millimetres for units, real text, groups by name. */
import { MARK_OUTLINE, MARK_SQUARE } from './classes-marks.ts'
import { DOT_HALO } from './paint-canvas.ts'
import type { CircleMark, DotMark, Face, Mark, PathMark, Scene, Stroke, Subpath, TextMark } from './scene.ts'

export interface SvgOptions {
  /** @font-face rules of the faces used, with the fonts inlined; without them the reader's computer must have the fonts. */
  fontCss?: string
  /** Text for <metadata>: the recipe, so that the figure can be drawn again. */
  metadata?: string
}

export interface FaceStyle {
  family: string
  weight: number
  italic: boolean
}

/** How the faces are named in files, as the font files name themselves. */
export const FACE_STYLES: Readonly<Record<Face, FaceStyle>> = {
  sans: { family: 'Source Sans 3', weight: 400, italic: false },
  'sans-semibold': { family: 'Source Sans 3', weight: 600, italic: false },
  'sans-italic': { family: 'Source Sans 3', weight: 400, italic: true },
  serif: { family: 'Source Serif 4', weight: 400, italic: false },
  'serif-semibold': { family: 'Source Serif 4', weight: 600, italic: false },
}

/** A whole SVG document, UTF-8. */
export function paintSvg(scene: Scene, options: SvgOptions = {}): string {
  const { widthMm, heightMm } = scene
  const body = scene.marks.map(markSvg).join('\n')
  const style = options.fontCss ? `<style>${options.fontCss}</style>\n` : ''
  return `<?xml version="1.0" encoding="UTF-8"?>
<svg xmlns="http://www.w3.org/2000/svg" width="${n(widthMm)}mm" height="${n(heightMm)}mm" viewBox="0 0 ${n(widthMm)} ${n(heightMm)}" role="img" aria-labelledby="title description">
<title id="title">${escaped(scene.title)}</title>
<desc id="description">${escaped(scene.description)}</desc>
${options.metadata ? `<metadata>${escaped(options.metadata)}</metadata>\n` : ''}${style}<rect width="${n(widthMm)}" height="${n(heightMm)}" fill="${scene.background}"/>
${body}
</svg>
`
}

/** Micrometres are fine enough. */
function n(value: number): string {
  return String(Math.round(value * 1000) / 1000)
}

/** Text as XML: what XML 1.0 cannot hold at all (most control characters) is left out. */
function escaped(text: string): string {
  return [...text]
    .filter((letter) => letter >= ' ' || letter === '\n' || letter === '\t')
    .join('')
    .replace(/[\uFFFE\uFFFF]|[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/g, '')
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;')
    .replace(/"/g, '&quot;')
}

function markSvg(mark: Mark): string {
  switch (mark.kind) {
    case 'group':
      return `<g id="${escaped(mark.name.replace(/ /g, '-'))}">\n${mark.marks.map(markSvg).join('\n')}\n</g>`
    case 'path':
      return pathSvg(mark)
    case 'circle':
      return circleSvg(mark)
    case 'dot':
      return dotSvg(mark)
    case 'text':
      return textSvg(mark)
  }
}

function pathData(subpaths: readonly Subpath[]): string {
  let d = ''
  for (const { points, closed } of subpaths) {
    for (let i = 0; i < points.length; i += 2) d += `${i === 0 ? 'M' : 'L'}${n(points[i] ?? 0)} ${n(points[i + 1] ?? 0)}`
    if (closed) d += 'Z'
  }
  return d
}

function paint(fill: string | undefined, stroke: Stroke | undefined): string {
  const line = stroke ? ` stroke="${stroke.colour}" stroke-width="${n(stroke.width)}" stroke-linejoin="round"${stroke.dash ? ` stroke-dasharray="${stroke.dash.map(n).join(' ')}"` : ''}` : ''
  return `fill="${fill ?? 'none'}"${line}`
}

function pathSvg({ subpaths, fill, stroke }: PathMark): string {
  return `<path d="${pathData(subpaths)}" ${paint(fill, stroke)}/>`
}

function circleSvg({ x, y, radius, fill, stroke }: CircleMark): string {
  return `<circle cx="${n(x)}" cy="${n(y)}" r="${n(radius)}" ${paint(fill, stroke)}/>`
}

function dotSvg({ shape, x, y, size, colour, halo }: DotMark): string {
  const unit = size / MARK_SQUARE
  const filled = shape.kind !== 'strokes' && !shape.open
  let element: (attributes: string) => string
  if (shape.kind === 'ellipse') element = (attributes) => `<ellipse cx="${n(x)}" cy="${n(y)}" rx="${n(shape.rx * unit)}" ry="${n(shape.ry * unit)}" ${attributes}/>`
  else {
    const lines = shape.kind === 'polygon' ? [shape.points] : shape.lines
    const d = pathData(lines.map((line) => ({ points: line.flatMap(([px, py]) => [x + px * unit, y + py * unit]), closed: shape.kind === 'polygon' })))
    element = (attributes) => `<path d="${d}" ${attributes}/>`
  }
  const ends = `stroke-linejoin="${filled ? 'miter' : 'round'}" stroke-linecap="round"`
  const under = halo === undefined ? '' : element(`fill="none" stroke="${halo}" stroke-width="${n((2 * DOT_HALO + (filled ? 0 : MARK_OUTLINE)) * unit)}" ${ends}`)
  return under + element(filled ? `fill="${colour}"` : `fill="none" stroke="${colour}" stroke-width="${n(MARK_OUTLINE * unit)}" ${ends}`)
}

function textSvg({ x, y, text, face, size, anchor, colour, halo, turn }: TextMark): string {
  const { family, weight, italic } = FACE_STYLES[face]
  const generic = family.includes('Serif') ? 'serif' : 'sans-serif'
  const attributes = [
    `x="${n(x)}" y="${n(y)}"`,
    `font-family="'${family}', '${family} Variable', ${generic}" font-size="${n(size)}"`,
    weight === 400 ? '' : `font-weight="${weight}"`,
    italic ? 'font-style="italic"' : '',
    anchor === 'start' ? '' : `text-anchor="${anchor}"`,
    turn === undefined ? '' : `transform="rotate(${n(turn)} ${n(x)} ${n(y)})"`,
  ]
    .filter((part) => part !== '')
    .join(' ')
  // The halo is a text of its own, below: not every reader of SVG knows paint-order.
  const under = halo ? `<text ${attributes} aria-hidden="true" fill="none" stroke="${halo.colour}" stroke-width="${n(2 * halo.width)}" stroke-linejoin="round">${escaped(text)}</text>` : ''
  return `${under}<text ${attributes} fill="${colour}">${escaped(text)}</text>`
}
