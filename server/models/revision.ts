import { Model } from 'objection'

/** One step of the catalogue, made by one approval; never changed once made. */
export class RevisionModel extends Model {
  static override tableName = 'revisions'
  static override idColumn = 'number'

  declare number: number
  declare submission: number | null
  declare approvedBy: number | null
  declare approvedAt: Date
  declare summary: string
}
