import { Model, type RelationMappingsThunk } from 'objection'
import { UserModel } from './user.ts'

/** A kept recipe for a map. */
export class FigureModel extends Model {
  static override tableName = 'figures'
  static override jsonAttributes = ['recipe']

  declare id: number
  declare owner: number
  declare title: string
  declare shared: boolean
  declare recipe: object
  declare updatedAt: Date
  declare keeper?: UserModel

  static override relationMappings: RelationMappingsThunk = () => ({
    keeper: { relation: Model.BelongsToOneRelation, modelClass: UserModel, join: { from: 'figures.owner', to: 'users.id' } },
  })
}
