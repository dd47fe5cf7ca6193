/** Draws a scene on a canvas. Nothing is kept between calls, so a scene may be rebuilt for every frame. */
import { MARK_OUTLINE, MARK_SQUARE } from './classes-marks.ts'
import type { CircleMark, DotMark, Face, Mark, PathMark, Scene, Stroke, Subpath, TextMark } from './scene.ts'

/** The part of a browser's CanvasRenderingContext2D that is used; colours are written only. */
export interface Canvas2d {
  fillStyle: unknown
  strokeStyle: unknown
  lineWidth: number
  lineCap: string
  lineJoin: string
  font: string
  textAlign: string
  textBaseline: string
  save: () => void
  restore: () => void
  translate: (x: number, y: number) => void
  rotate: (angle: number) => void
  beginPath: () => void
  moveTo: (x: number, y: number) => void
  lineTo: (x: number, y: number) => void
  closePath: () => void
  ellipse: (x: number, y: number, rx: number, ry: number, rotation: number, from: number, to: number) => void
  fill: (rule?: 'nonzero' | 'evenodd') => void
  stroke: () => void
  fillRect: (x: number, y: number, width: number, height: number) => void
  fillText: (text: string, x: number, y: number) => void
  strokeText: (text: string, x: number, y: number) => void
  setLineDash: (pieces: number[]) => void
}

const SANS = '"Source Sans 3 Variable", "Source Sans 3", sans-serif'
// The files' own cut first (src/styles/figure-fonts.css): the pages' variable one is wider.
const SERIF = '"Source Serif 4", "Source Serif 4 Variable", serif'

/** Faces as the canvas names them, before and after the size; a page that draws must have loaded them first. */
const FONTS: Readonly<Record<Face, readonly [before: string, family: string]>> = {
  sans: ['400', SANS],
  'sans-semibold': ['600', SANS],
  'sans-italic': ['italic 400', SANS],
  serif: ['400', SERIF],
  'serif-semibold': ['600', SERIF],
}

/** The CSS font of a face. @param px - em */
export function canvasFont(face: Face, px: number): string {
  const [before, family] = FONTS[face]
  return `${before} ${px}px ${family}`
}

const ALIGN = { start: 'left', middle: 'center', end: 'right' } as const

/**
 * @param pxPerMm - pixels of the canvas a millimetre of the scene
 * @param background - false leaves what is there
 */
export function paintCanvas(scene: Scene, ink: Canvas2d, pxPerMm: number, background = true): void {
  ink.save()
  ink.textBaseline = 'alphabetic'
  if (background) {
    ink.fillStyle = scene.background
    ink.fillRect(0, 0, scene.widthMm * pxPerMm, scene.heightMm * pxPerMm)
  }
  paintMarks(scene.marks, ink, pxPerMm)
  ink.restore()
}

/** Draws only some marks, for a page that redraws what moved. */
export function paintMarks(marks: readonly Mark[], ink: Canvas2d, k: number): void {
  for (const mark of marks) {
    switch (mark.kind) {
      case 'group':
        paintMarks(mark.marks, ink, k)
        break
      case 'path':
        paintPath(mark, ink, k)
        break
      case 'circle':
        paintCircle(mark, ink, k)
        break
      case 'dot':
        paintDot(mark, ink, k)
        break
      case 'text':
        paintText(mark, ink, k)
        break
    }
  }
}

function trace(subpaths: readonly Subpath[], ink: Canvas2d, k: number): void {
  ink.beginPath()
  for (const { points, closed } of subpaths) {
    for (let i = 0; i < points.length; i += 2) {
      const x = (points[i] ?? 0) * k
      const y = (points[i + 1] ?? 0) * k
      if (i === 0) ink.moveTo(x, y)
      else ink.lineTo(x, y)
    }
    if (closed) ink.closePath()
  }
}

function draw(stroke: Stroke, ink: Canvas2d, k: number): void {
  ink.strokeStyle = stroke.colour
  ink.lineWidth = stroke.width * k
  ink.lineJoin = 'round'
  ink.lineCap = 'butt'
  ink.setLineDash((stroke.dash ?? []).map((piece) => piece * k))
  ink.stroke()
}

function paintPath(mark: PathMark, ink: Canvas2d, k: number): void {
  trace(mark.subpaths, ink, k)
  if (mark.fill !== undefined) {
    ink.fillStyle = mark.fill
    ink.fill('nonzero')
  }
  if (mark.stroke) draw(mark.stroke, ink, k)
}

function paintCircle(mark: CircleMark, ink: Canvas2d, k: number): void {
  ink.beginPath()
  ink.ellipse(mark.x * k, mark.y * k, mark.radius * k, mark.radius * k, 0, 0, 2 * Math.PI)
  if (mark.fill !== undefined) {
    ink.fillStyle = mark.fill
    ink.fill()
  }
  if (mark.stroke) draw(mark.stroke, ink, k)
}

/** Width of the halo beyond a mark's edge, in its square. */
export const DOT_HALO = 1.1

function paintDot({ shape, x, y, size, colour, halo }: DotMark, ink: Canvas2d, k: number): void {
  const unit = (size * k) / MARK_SQUARE
  const cx = x * k
  const cy = y * k
  ink.beginPath()
  if (shape.kind === 'ellipse') ink.ellipse(cx, cy, shape.rx * unit, shape.ry * unit, 0, 0, 2 * Math.PI)
  else {
    for (const line of shape.kind === 'polygon' ? [shape.points] : shape.lines) {
      for (const [i, [px, py]] of line.entries()) {
        if (i === 0) ink.moveTo(cx + px * unit, cy + py * unit)
        else ink.lineTo(cx + px * unit, cy + py * unit)
      }
      if (shape.kind === 'polygon') ink.closePath()
    }
  }
  const filled = shape.kind !== 'strokes' && !shape.open
  ink.lineJoin = filled ? 'miter' : 'round'
  ink.lineCap = 'round'
  ink.setLineDash([])
  if (halo !== undefined) {
    ink.strokeStyle = halo
    ink.lineWidth = (2 * DOT_HALO + (filled ? 0 : MARK_OUTLINE)) * unit
    ink.stroke()
  }
  if (filled) {
    ink.fillStyle = colour
    ink.fill()
  } else {
    ink.strokeStyle = colour
    ink.lineWidth = MARK_OUTLINE * unit
    ink.stroke()
  }
}

function paintText(mark: TextMark, ink: Canvas2d, k: number): void {
  ink.save()
  ink.translate(mark.x * k, mark.y * k)
  if (mark.turn !== undefined) ink.rotate((mark.turn * Math.PI) / 180)
  ink.font = canvasFont(mark.face, mark.size * k)
  ink.textAlign = ALIGN[mark.anchor]
  if (mark.halo) {
    ink.strokeStyle = mark.halo.colour
    ink.lineWidth = 2 * mark.halo.width * k
    ink.lineJoin = 'round'
    ink.setLineDash([])
    ink.strokeText(mark.text, 0, 0)
  }
  ink.fillStyle = mark.colour
  ink.fillText(mark.text, 0, 0)
  ink.restore()
}
