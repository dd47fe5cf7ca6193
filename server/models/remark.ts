import { Model } from 'objection'

/** What somebody said of a submission, or of one of its changes. */
export class RemarkModel extends Model {
  static override tableName = 'remarks'

  declare id: number
  declare submission: number
  declare change: number | null
  declare author: number
  declare body: string
  declare at: Date
  declare resolvedAt: Date | null
}
