/** What every format of a table is written by: piece by piece, so that a table of any size passes through. */
import type { CatalogueValue } from '../columns.ts'

export interface TableWriter {
  /** With its character set. */
  mediaType: string
  /** Everything before the first row. */
  begin: () => string
  /** One row; values in the order of the columns. */
  row: (values: readonly CatalogueValue[]) => string
  /** Everything after the last row. */
  end: () => string
}

/** What a table says about itself, in the formats that can. */
export interface TableNotes {
  /** The revision it was read at, and the release where that was chosen. */
  revision: number
  release: string | null
  /** What the filter lets through, as a sentence. */
  filter: string
  /** The same as query parameters, so that it can be asked for again. */
  query: string
}
