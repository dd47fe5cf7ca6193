/** Advance widths of the shipped fonts, read from the font files. */
import * as fontkit from 'fontkit'
import { FACES, type Face } from '../../core/figure/scene.ts'
import { fontBytes } from './fonts.ts'

/** Runs of code points that layout measures exactly; others are taken at an average width. */
const MEASURED: readonly (readonly [number, number])[] = [
  [0x20, 0x7e],
  [0xa0, 0x17f],
  [0x391, 0x3c9],
  [0x410, 0x44f],
  [0x2009, 0x2009],
  [0x2010, 0x2026],
  [0x2032, 0x2033],
  [0x2212, 0x2212],
  [0x2264, 0x2265],
]

export type AdvanceTable = Record<Face, [first: number, widths: number[]][]>

/** First code point and widths of each run, thousandths of an em. */
export async function advanceTable(): Promise<AdvanceTable> {
  const rows = await Promise.all(
    FACES.map(async (face): Promise<[Face, AdvanceTable[Face]]> => {
      const font = fontkit.create(await fontBytes(face))
      if (!('glyphForCodePoint' in font)) throw new Error(`the file of ${face} is a collection of fonts`)
      const width = (codePoint: number): number => Math.round((font.glyphForCodePoint(codePoint).advanceWidth / font.unitsPerEm) * 1000)
      return [face, MEASURED.map(([from, to]) => [from, Array.from({ length: to - from + 1 }, (_, i) => width(from + i))])]
    }),
  )
  return Object.fromEntries(rows) as AdvanceTable
}
