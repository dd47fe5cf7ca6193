import { Model } from 'objection'

/** A publication or data set that measurements come from. */
export class SourceModel extends Model {
  static override tableName = 'sources'
  static override jsonAttributes = ['authors']

  declare id: number
  declare label: string
  declare title: string
  declare authors: string[]
  declare year: number
  declare venue: string
  declare kind: 'article' | 'catalogue' | 'thesis' | 'private' | 'demonstration'
  declare bibcode: string | null
  declare doi: string | null
  declare url: string | null
  declare citedAs: string[]
  declare createdBy: number | null
}
