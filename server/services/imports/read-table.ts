/** An uploaded file as a table of cells, within limits that are said in words. */
import { Readable } from 'node:stream'
import { parse } from 'csv-parse'
import { decodeTable, guessDelimiter } from '../../../core/formats/table-reader.ts'
import type { Delimiter } from '../../../core/formats/table-reader.ts'
import { BadInput, TooLarge } from '../../http/errors.ts'

export const MOST_BYTES = 20_000_000
const MOST_ROWS = 100_000
const MOST_COLUMNS = 500
const MOST_CELL = 4000

export interface Table {
  /** "CSV, UTF-8" */
  format: string
  headers: string[]
  rows: string[][]
}

const FORMATS: Readonly<Record<Delimiter, string>> = { ',': 'CSV', '\t': 'TSV', ';': 'CSV parted by semicolons', '|': 'Table parted by bars' }

/** @throws BadInput or TooLarge, naming the field `file` and what is wrong with it */
export async function readTable(bytes: Uint8Array): Promise<Table> {
  const refuse = (message: string): never => {
    throw new BadInput(`${message} Nothing was kept.`, [{ path: 'file', message }])
  }
  if (bytes.length === 0) refuse('The file is empty.')
  if (bytes.length > MOST_BYTES) throw new TooLarge(`A table may have up to ${MOST_BYTES / 1e6} MB. Nothing was kept: cut the table into parts and upload them one by one.`)
  const decoded = decodeTable(bytes)
  if ('problem' in decoded) return refuse(decoded.problem)

  const delimiter = guessDelimiter(decoded.text)
  const parser = Readable.from(slices(decoded.text)).pipe(
    parse({ delimiter, relax_column_count: true, skip_empty_lines: true, trim: true, comment: '#', comment_no_infix: true, relax_quotes: true, max_record_size: 2_000_000 }),
  )
  let headers: string[] | undefined
  const rows: string[][] = []
  try {
    for await (const record of parser as AsyncIterable<string[]>) {
      if (!headers) {
        headers = record
        if (headers.length > MOST_COLUMNS) refuse(`The table has ${headers.length} columns, and up to ${MOST_COLUMNS} can be read. Leave out those that hold no measurements.`)
        if (headers.length < 2) refuse('The table has only one column. Its cells must be parted by commas, semicolons, tabs or bars.')
        continue
      }
      if (record.every((cell) => cell === '')) continue
      if (record.length > MOST_COLUMNS) refuse(`Row ${rows.length + 1} has ${record.length} cells, and up to ${MOST_COLUMNS} can be read. Check its separators.`)
      const long = record.findIndex((cell) => cell.length > MOST_CELL)
      if (long >= 0) refuse(`Row ${rows.length + 1} has a cell of ${record[long]?.length} characters, and up to ${MOST_CELL} can be read. Check its quotation marks.`)
      rows.push(record)
      if (rows.length > MOST_ROWS) refuse(`The table has more than ${MOST_ROWS} rows. Cut it into parts and upload them one by one.`)
    }
  } catch (error) {
    if (error instanceof BadInput || !(error instanceof Error)) throw error
    return refuse(`The table cannot be read beyond row ${rows.length + 1}: ${wordsOf(error)}`)
  }
  if (!headers || rows.length === 0) return refuse('The table has a line of column heads at most, and no rows below it.')
  return { format: `${FORMATS[delimiter]}, ${decoded.encoding}`, headers, rows }
}

function* slices(text: string): Generator<string> {
  for (let at = 0; at < text.length; at += 65_536) yield text.slice(at, at + 65_536)
}

function wordsOf(error: Error): string {
  const code = 'code' in error ? String(error.code) : ''
  if (code === 'CSV_QUOTE_NOT_CLOSED') return 'a quotation mark is opened there and never closed.'
  if (code === 'CSV_MAX_RECORD_SIZE') return 'a row there is far too long; probably a quotation mark is never closed.'
  return 'its quotation marks or separators do not fit together.'
}
