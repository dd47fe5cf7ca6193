import { Model } from 'objection'
import type { Mapping } from '../../core/schema/imports.ts'

/** An uploaded table; its rows are `import_rows`. */
export class ImportModel extends Model {
  static override tableName = 'imports'
  static override jsonAttributes = ['headers', 'mapping']

  declare id: number
  declare owner: number
  declare fileName: string
  declare format: string
  declare bytes: number
  declare sha256: string
  declare storeKey: string
  declare headers: string[]
  declare mapping: Mapping
  declare submission: number | null
  declare createdAt: Date
}
