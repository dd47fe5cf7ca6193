/** What sources do not say of themselves. */
import type { Knex } from 'knex'

/** What is missing of each source, in words; sources that are complete are left out. Private and invented ones need no identifier. */
export async function sourcesLack(knex: Knex, ids: readonly number[]): Promise<Map<number, string[]>> {
  const wanted = [...new Set(ids)]
  if (wanted.length === 0) return new Map()
  const rows = (await knex('sources')
    .whereRaw('id = ANY(?)', [wanted])
    .select('id', 'kind', knex.raw('bibcode is null and doi is null and url is null as unidentified'), knex.raw('jsonb_array_length(authors) = 0 as anonymous'), knex.raw("venue = '' as unplaced"), knex.raw('year > extract(year from now()) as "yetToCome"'))) as {
    id: number; kind: string; unidentified: boolean; anonymous: boolean; unplaced: boolean; yetToCome: boolean
  }[]
  return new Map(
    rows.flatMap((s) => {
      const published = s.kind !== 'private' && s.kind !== 'demonstration'
      const lacks = [...(s.unidentified && published ? ['a DOI, bibcode or address'] : []), ...(s.anonymous ? ['its authors'] : []), ...(s.yetToCome ? ['a year that has come'] : []), ...(s.unplaced && published && s.unidentified ? ['where it appeared'] : [])]
      return lacks.length > 0 ? [[s.id, lacks] as const] : []
    }),
  )
}
