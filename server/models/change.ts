import { Model } from 'objection'
import type { RelationMappingsThunk } from 'objection'
import type { ChangeAction } from '../../core/schema/changes.ts'
import { SubmissionModel } from './submission.ts'

/** One proposed change of a submission. */
export class ChangeModel extends Model {
  static override tableName = 'changes'
  static override jsonAttributes = ['payload', 'base']

  declare id: number
  declare submission: number
  declare position: number
  declare action: ChangeAction
  declare payload: object
  declare base: object | null
  declare galaxy: number | null
  declare updatedAt: Date
  declare parent?: SubmissionModel

  static override relationMappings: RelationMappingsThunk = () => ({
    parent: { relation: Model.BelongsToOneRelation, modelClass: SubmissionModel, join: { from: 'changes.submission', to: 'submissions.id' } },
  })
}
