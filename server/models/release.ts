import { Model, type RelationMappingsThunk } from 'objection'
import { UserModel } from './user.ts'

/** A label on a revision; never changed once made. */
export class ReleaseModel extends Model {
  static override tableName = 'releases'
  static override idColumn = 'label'

  declare label: string
  declare revision: number
  declare title: string
  declare notes: string
  declare publishedBy: number | null
  declare publishedAt: Date
  declare publisher?: UserModel

  static override relationMappings: RelationMappingsThunk = () => ({
    publisher: { relation: Model.BelongsToOneRelation, modelClass: UserModel, join: { from: 'releases.publishedBy', to: 'users.id' } },
  })
}
