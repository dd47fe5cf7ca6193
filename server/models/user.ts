import { Model } from 'objection'
import type { Role } from '../../core/permissions.ts'

/** A person with an account. */
export class UserModel extends Model {
  static override tableName = 'users'

  declare id: number
  declare name: string
  declare email: string
  declare orcid: string | null
  declare roles: Role[]
  declare state: 'invited' | 'active' | 'suspended'
  declare lastSeenAt: Date | null
}
