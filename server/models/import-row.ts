import { Model } from 'objection'
import type { RowProblem } from '../../core/formats/import-row.ts'

/** A row of an uploaded table, as it stands in the file and as it was read. */
export class ImportRowModel extends Model {
  static override tableName = 'import_rows'
  static override idColumn = ['import', 'number']
  static override jsonAttributes = ['raw', 'parsed', 'problems']

  declare import: number
  declare number: number
  declare raw: string[]
  declare parsed: object | null
  declare problems: RowProblem[]
  declare leftOut: string | null
  declare change: number | null
}
