/** The literature, and what each source contributed. */
import type { Knex } from 'knex'
import { canonicalWords, measureWords } from '../../core/formats/measure-words.ts'
import { method } from '../../core/methods.ts'
import type { PublishedValue, QuantityKey } from '../../core/quantities.ts'
import { quantity } from '../../core/quantities.ts'
import type { Source, SourceDetail } from '../../core/schema/sources.ts'
import { NotFound } from '../http/errors.ts'

const COUNTED = `
  select s.id, s.label, s.title, s.authors, s.year, s.venue, s.kind, s.bibcode, s.doi, s.url,
         count(m.id)::int as measurements, count(distinct m.galaxy)::int as galaxies
    from sources s left join measurements m on m.source = s.id and m.rev_to is null`

const MOST = 2000

/** Sources in which every word of the search occurs (label, title, authors, bibcode, DOI), newest first. */
export async function findSources(knex: Knex, search: string): Promise<Source[]> {
  const words = search.trim().split(/\s+/).filter((w) => w !== '').slice(0, 8)
  const conditions = words.map(() => `concat_ws(' ', s.label, s.title, s.authors::text, s.bibcode, s.doi) ilike ?`)
  const where = conditions.length > 0 ? `where ${conditions.join(' and ')}` : ''
  const { rows } = (await knex.raw(`${COUNTED} ${where} group by s.id order by s.year desc, s.label, s.id limit ${MOST}`, words.map((w) => `%${w.replace(/[\\%_]/g, '\\$&')}%`))) as { rows: Source[] }
  return rows
}

/** @throws NotFound */
export async function sourceById(knex: Knex, id: number): Promise<Source> {
  const { rows } = (await knex.raw(`${COUNTED} where s.id = ? group by s.id`, [id])) as { rows: Source[] }
  if (!rows[0]) throw new NotFound(`There is no source ${id}.`)
  return rows[0]
}

interface ContributedRow {
  lineage: number
  slug: string
  galaxy: string
  quantity: QuantityKey
  value: number | null
  errPlus: number | null
  errMinus: number | null
  errSys: number | null
  textValue: string | null
  limitFlag: 'upper' | 'lower' | null
  published: PublishedValue | null
  method: string | null
  used: boolean
}

/** @throws NotFound */
export async function sourceDetail(knex: Knex, id: number): Promise<SourceDetail> {
  const source = await sourceById(knex, id)
  const { rows } = (await knex.raw(
    `select m.lineage, v.slug, v.designation as galaxy, m.quantity, m.value, m.err_plus as "errPlus", m.err_minus as "errMinus", m.err_sys as "errSys",
            m.text_value as "textValue", m.limit_flag as "limitFlag", m.published, m.method,
            coalesce(a.reasons @> jsonb_build_array(jsonb_build_object('measurementId', m.lineage, 'used', true)), false) as used
       from measurements m
       join galaxy_versions v on v.galaxy = m.galaxy and v.rev_to is null
       left join adopted_values a on a.galaxy = m.galaxy and a.quantity = m.quantity and a.rev_to is null
      where m.source = ? and m.rev_to is null
      order by v.designation, m.quantity, m.lineage`,
    [id],
  )) as { rows: ContributedRow[] }
  return {
    ...source,
    contributed: rows.map((r) => ({
      measurementId: r.lineage, slug: r.slug, galaxy: r.galaxy, quantity: quantity(r.quantity).label,
      value: r.published ? measureWords({ ...r.published, limitFlag: r.limitFlag }) : canonicalWords(r.quantity, r),
      method: r.method === null ? null : method(r.method).label, used: r.used,
    })),
  }
}
