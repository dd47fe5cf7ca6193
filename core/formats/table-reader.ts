/** From the bytes of an uploaded file to the text of a table: what it is, how it is encoded, what parts its cells. */

export type DecodedTable = { text: string; encoding: 'UTF-8' | 'UTF-16' | 'Windows-1252' } | { problem: string }

const KNOWN_FILES: readonly { starts: readonly number[]; what: string }[] = [
  { starts: [0x50, 0x4b, 0x03, 0x04], what: 'a spreadsheet or another zip archive' },
  { starts: [0xd0, 0xcf, 0x11, 0xe0], what: 'an old spreadsheet or text document' },
  { starts: [0x25, 0x50, 0x44, 0x46], what: 'a PDF' },
  { starts: [0x1f, 0x8b], what: 'a gzip archive' },
  { starts: [0x89, 0x50, 0x4e, 0x47], what: 'a PNG picture' },
  { starts: [0xff, 0xd8, 0xff], what: 'a JPEG picture' },
  { starts: [0x53, 0x49, 0x4d, 0x50, 0x4c, 0x45, 0x20, 0x20, 0x3d], what: 'a FITS file' },
]

const SAVE_AS = 'Save the table as CSV (UTF-8) and upload that.'

/** Nothing is guessed silently: what is no table is refused with a sentence. */
export function decodeTable(bytes: Uint8Array): DecodedTable {
  const known = KNOWN_FILES.find((f) => f.starts.every((byte, i) => bytes[i] === byte))
  if (known) return { problem: `This is ${known.what}, not a table of text. ${SAVE_AS}` }
  const decoded = decode(bytes)
  if ('problem' in decoded) return decoded
  const text = decoded.text.replace(/^\uFEFF/, '')
  if (text.trim() === '') return { problem: 'The file is empty. Choose one with a line of column heads and at least one row.' }
  if (text.includes('\u0000')) return { problem: `The file holds NUL characters, which no table of text does: it is probably a program's own format. ${SAVE_AS}` }
  const odd = (text.slice(0, 20_000).match(/[\u0001-\u0008\u000B\u000C\u000E-\u001F\u007F]/g) ?? []).length
  if (odd > 2) return { problem: `The file holds control characters and is no table of text, whatever its name says. ${SAVE_AS}` }
  return { ...decoded, text }
}

function decode(bytes: Uint8Array): DecodedTable {
  const utf16 = bytes[0] === 0xff && bytes[1] === 0xfe ? 'utf-16le' : bytes[0] === 0xfe && bytes[1] === 0xff ? 'utf-16be' : unmarkedUtf16(bytes)
  if (utf16 !== undefined) {
    try {
      return { text: new TextDecoder(utf16, { fatal: true }).decode(bytes), encoding: 'UTF-16' }
    } catch {
      return { problem: `The file begins like UTF-16 text but is damaged further on. ${SAVE_AS}` }
    }
  }
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes), encoding: 'UTF-8' }
  } catch {
    return { text: new TextDecoder('windows-1252').decode(bytes), encoding: 'Windows-1252' }
  }
}

/** UTF-16 without its mark: every other byte of the beginning is nought. */
function unmarkedUtf16(bytes: Uint8Array): 'utf-16le' | 'utf-16be' | undefined {
  const head = bytes.subarray(0, 400)
  if (head.length < 8) return undefined
  let even = 0
  let odd = 0
  head.forEach((byte, i) => {
    if (byte !== 0) return
    if (i % 2 === 0) even += 1
    else odd += 1
  })
  const half = head.length / 2
  if (odd > half * 0.8 && even === 0) return 'utf-16le'
  return even > half * 0.8 && odd === 0 ? 'utf-16be' : undefined
}

export const DELIMITERS = [',', '\t', ';', '|'] as const
export type Delimiter = (typeof DELIMITERS)[number]

/** What parts the cells: the mark that the first lines have most often, and all equally often. */
export function guessDelimiter(text: string): Delimiter {
  const lines = text
    .slice(0, 100_000)
    .split(/\r\n|\n|\r/)
    .filter((line) => line.trim() !== '' && !line.startsWith('#'))
    .slice(0, 30)
  const score = (mark: string): number => {
    const counts = lines.map((line) => line.replace(/"[^"]*"/g, '').split(mark).length - 1)
    const first = counts[0] ?? 0
    return first === 0 ? 0 : first * (counts.filter((c) => c === first).length / counts.length)
  }
  return DELIMITERS.reduce((best, mark) => (score(mark) > score(best) ? mark : best), ',' as Delimiter)
}
