import { describe, expect, it } from 'vitest'
import { decodeTable, guessDelimiter } from '../../../core/formats/table-reader.ts'

const utf8 = (text: string): Uint8Array => new TextEncoder().encode(text)
const utf16 = (text: string, mark: boolean): Uint8Array => new Uint8Array(Buffer.from((mark ? '\uFEFF' : '') + text, 'utf16le'))

describe('the text of an uploaded file', () => {
  it('reads UTF-8 with and without its mark, UTF-16 with and without, and Latin letters', () => {
    expect(decodeTable(utf8('\uFEFFgalaxy,σ'))).toEqual({ text: 'galaxy,σ', encoding: 'UTF-8' })
    expect(decodeTable(utf16('galaxy,value\n', true))).toEqual({ text: 'galaxy,value\n', encoding: 'UTF-16' })
    expect(decodeTable(utf16('galaxy,value\nOstrel,3\n', false))).toEqual({ text: 'galaxy,value\nOstrel,3\n', encoding: 'UTF-16' })
    expect(decodeTable(new Uint8Array(Buffer.from('Pietrzy\xf1ski \xb1 0.05', 'latin1')))).toEqual({ text: 'Pietrzyñski ± 0.05', encoding: 'Windows-1252' })
  })

  it.each([
    ['nothing', new Uint8Array(), 'empty'],
    ['blanks', utf8('  \n \n'), 'empty'],
    ['a zip archive', new Uint8Array([0x50, 0x4b, 3, 4, 0, 0]), 'spreadsheet'],
    ['a PDF', utf8('%PDF-1.7'), 'PDF'],
    ['NUL bytes', utf8('galaxy,value\nOs\u0000trel,3'), 'NUL'],
    ['control characters', utf8('galaxy\u0001\u0002\u0003\u0004'), 'control characters'],
  ])('refuses %s with a sentence', (_what, bytes, word) => {
    const decoded = decodeTable(bytes)
    expect('problem' in decoded ? decoded.problem : '').toContain(word)
  })

  it('finds what parts the cells', () => {
    expect(guessDelimiter('a,b,c\n1,2,3')).toBe(',')
    expect(guessDelimiter('a\tb\tc\n1,5\t2,5\t3,5')).toBe('\t')
    expect(guessDelimiter('a;b;c\n1,5;2;3')).toBe(';')
    expect(guessDelimiter('# made | by | hand\na|b\n"x,y"|2')).toBe('|')
  })
})
