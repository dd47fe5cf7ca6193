import { Model } from 'objection'

/** What was submitted, frozen; never changed once made. */
export class SubmissionVersionModel extends Model {
  static override tableName = 'submission_versions'
  static override idColumn = ['submission', 'version']
  static override jsonAttributes = ['content']

  declare submission: number
  declare version: number
  declare contentHash: string
  declare content: object
  declare submittedBy: number
  declare submittedAt: Date
}
