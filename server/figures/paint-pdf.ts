/** Draws a scene as PDF: vectors, real text in embedded subsets, the same bytes for the same figure. */
import PDFDocument from 'pdfkit'
import { MARK_OUTLINE, MARK_SQUARE } from '../../core/figure/classes-marks.ts'
import { DOT_HALO } from '../../core/figure/paint-canvas.ts'
import { MM_PER_PT, textsOf, type DotMark, type Face, type Mark, type Scene, type Stroke, type Subpath, type TextMark } from '../../core/figure/scene.ts'
import { fontBytes } from './fonts.ts'

export interface PdfOptions {
  author: string
  /** The recipe, as text, for the document's properties. */
  recipe: string
  /** Stands in the file as the time it was made: the data's own date, so that a figure drawn again has the same bytes. */
  date: Date
}

type Document = InstanceType<typeof PDFDocument>

export async function paintPdf(scene: Scene, { author, recipe, date }: PdfOptions): Promise<Buffer> {
  const doc = new PDFDocument({
    size: [scene.widthMm / MM_PER_PT, scene.heightMm / MM_PER_PT],
    margin: 0,
    lang: 'en',
    displayTitle: true,
    info: { Title: scene.title, Author: author, Subject: scene.description, Keywords: recipe, Creator: 'Vicinage', Producer: 'Vicinage', CreationDate: date, ModDate: date },
  })
  const parts: Buffer[] = []
  const ended = new Promise<void>((resolve, reject) => {
    doc.on('data', (part: Buffer) => parts.push(part))
    doc.on('end', resolve)
    doc.on('error', reject)
  })
  const faces = new Set<Face>([...textsOf(scene.marks)].map((text) => text.face))
  for (const face of faces) doc.registerFont(face, await fontBytes(face))
  doc.scale(1 / MM_PER_PT)
  doc.rect(0, 0, scene.widthMm, scene.heightMm).fill(scene.background)
  paintMarks(doc, scene.marks)
  doc.end()
  await ended
  return Buffer.concat(parts)
}

function paintMarks(doc: Document, marks: readonly Mark[]): void {
  for (const mark of marks) {
    switch (mark.kind) {
      case 'group':
        paintMarks(doc, mark.marks)
        break
      case 'path':
        paintShape(doc, () => trace(doc, mark.subpaths), mark.fill, mark.stroke)
        break
      case 'circle':
        paintShape(doc, () => void doc.circle(mark.x, mark.y, mark.radius), mark.fill, mark.stroke)
        break
      case 'dot':
        paintDot(doc, mark)
        break
      case 'text':
        paintText(doc, mark)
        break
    }
  }
}

function trace(doc: Document, subpaths: readonly Subpath[]): void {
  for (const { points, closed } of subpaths) {
    for (let i = 0; i < points.length; i += 2) {
      const x = points[i] ?? 0
      const y = points[i + 1] ?? 0
      if (i === 0) doc.moveTo(x, y)
      else doc.lineTo(x, y)
    }
    if (closed) doc.closePath()
  }
}

function paintShape(doc: Document, shape: () => void, fill: string | undefined, stroke: Stroke | undefined): void {
  if (fill !== undefined) {
    shape()
    doc.fill(fill)
  }
  if (!stroke) return
  doc.save().lineWidth(stroke.width).lineJoin('round').lineCap('butt')
  // pdfkit takes one dash and one space; scenes use no more.
  if (stroke.dash) doc.dash(stroke.dash[0] ?? 1, { space: stroke.dash[1] ?? stroke.dash[0] ?? 1 })
  shape()
  doc.stroke(stroke.colour).restore()
}

function paintDot(doc: Document, { shape, x, y, size, colour, halo }: DotMark): void {
  const unit = size / MARK_SQUARE
  const draw = (): void => {
    if (shape.kind === 'ellipse') {
      doc.ellipse(x, y, shape.rx * unit, shape.ry * unit)
      return
    }
    const lines = shape.kind === 'polygon' ? [shape.points] : shape.lines
    trace(doc, lines.map((line) => ({ points: line.flatMap(([px, py]) => [x + px * unit, y + py * unit]), closed: shape.kind === 'polygon' })))
  }
  const filled = shape.kind !== 'strokes' && !shape.open
  doc.save().lineJoin(filled ? 'miter' : 'round').lineCap('round')
  if (halo !== undefined) {
    doc.lineWidth((2 * DOT_HALO + (filled ? 0 : MARK_OUTLINE)) * unit)
    draw()
    doc.stroke(halo)
  }
  draw()
  if (filled) doc.fill(colour)
  else doc.lineWidth(MARK_OUTLINE * unit).stroke(colour)
  doc.restore()
}

function paintText(doc: Document, { x, y, text, face, size, anchor, colour, halo, turn }: TextMark): void {
  doc.save()
  if (turn !== undefined) doc.rotate(turn, { origin: [x, y] })
  doc.font(face).fontSize(size)
  const width = doc.widthOfString(text)
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2
  const options = { lineBreak: false, baseline: 'alphabetic' } as const
  if (halo) {
    doc.save().lineWidth(2 * halo.width).lineJoin('round').strokeColor(halo.colour)
    doc.text(text, left, y, { ...options, stroke: true, fill: false })
    doc.restore()
  }
  doc.fillColor(colour).text(text, left, y, options)
  doc.restore()
}
