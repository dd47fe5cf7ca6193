import { Model } from 'objection'

/** A verdict on one version of a submission; never changed once made. */
export class ReviewModel extends Model {
  static override tableName = 'reviews'

  declare id: number
  declare submission: number
  declare version: number
  declare contentHash: string
  declare reviewer: number
  declare verdict: 'approved' | 'returned' | 'rejected'
  declare note: string
  declare at: Date
}
