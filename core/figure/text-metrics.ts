/** Widths of texts in the shipped fonts, so that every painter lays a figure out alike. Kerning is left out: it moves a word by less than 2 %. */
import { FONT_ADVANCES } from './font-metrics.ts'
import { FACES, type Box, type Face, type TextMark } from './scene.ts'

/** Parts of an em, both families: the height of capitals, and how far letters reach above and below the baseline. */
export const CAP_HEIGHT = 0.66
const ASCENT = 0.74
const DESCENT = 0.22

/** For a letter that is not in the table, em/1000. */
const AVERAGE = 600

const tables = new Map<Face, Map<number, number>>(
  FACES.map((face) => {
    const widths = new Map<number, number>()
    for (const [first, run] of FONT_ADVANCES[face]) for (const [i, width] of run.split(' ').entries()) widths.set(first + i, Number(width))
    return [face, widths]
  }),
)

/** Width of a text. @param size - em, mm @returns mm */
export function textWidth(text: string, face: Face, size: number): number {
  const widths = tables.get(face)
  let sum = 0
  for (const letter of text) sum += widths?.get(letter.codePointAt(0) ?? 0) ?? AVERAGE
  return (sum / 1000) * size
}

/** The rectangle that an upright text covers, its halo left out. */
export function textBox(mark: Pick<TextMark, 'x' | 'y' | 'text' | 'face' | 'size' | 'anchor'>): Box {
  return boxOfWidth(mark, textWidth(mark.text, mark.face, mark.size), mark.size)
}

/** The same for a text that has been measured. @param size - em, mm */
export function boxOfWidth({ x, y, anchor }: Pick<TextMark, 'x' | 'y' | 'anchor'>, width: number, size: number): Box {
  const minX = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2
  return { minX, minY: y - ASCENT * size, maxX: minX + width, maxY: y + DESCENT * size }
}

/** Breaks a text into lines no wider than a measure; a longer word is broken where it must be. @param measure - mm */
export function wrapText(text: string, face: Face, size: number, measure: number): string[] {
  return text.split('\n').flatMap((paragraph) => {
    const lines: string[] = []
    let line = ''
    for (const word of paragraph.split(/[ \t]+/).flatMap((part) => fitting(part, face, size, measure))) {
      const longer = line === '' ? word : `${line} ${word}`
      if (line !== '' && textWidth(longer, face, size) > measure) {
        lines.push(line)
        line = word
      } else line = longer
    }
    return line === '' ? lines : [...lines, line]
  })
}

/** A word in pieces that fit, each of a letter at least. */
function fitting(word: string, face: Face, size: number, measure: number): string[] {
  const pieces: string[] = []
  let piece = ''
  for (const letter of word) {
    if (piece !== '' && textWidth(piece + letter, face, size) > measure) {
      pieces.push(piece)
      piece = letter
    } else piece += letter
  }
  return piece === '' ? pieces : [...pieces, piece]
}
