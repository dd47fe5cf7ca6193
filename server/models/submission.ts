import { Model } from 'objection'
import type { RelationMappingsThunk } from 'objection'
import type { SubmissionState } from '../../core/schema/submissions.ts'
import { UserModel } from './user.ts'

/** A set of proposed changes with one summary. */
export class SubmissionModel extends Model {
  static override tableName = 'submissions'

  declare id: number
  declare author: number
  declare title: string
  declare summary: string
  declare state: SubmissionState
  declare baseRevision: number
  declare version: number
  declare contentHash: string | null
  declare createdAt: Date
  declare updatedAt: Date
  declare submittedAt: Date | null
  declare decidedBy: number | null
  declare decidedAt: Date | null
  declare decisionNote: string | null
  declare revision: number | null
  declare lockVersion: number
  declare writer?: UserModel

  static override relationMappings: RelationMappingsThunk = () => ({
    writer: { relation: Model.BelongsToOneRelation, modelClass: UserModel, join: { from: 'submissions.author', to: 'users.id' } },
  })
}
