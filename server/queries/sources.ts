/** The literature, and what each source contributed. */
import type { Knex } from 'knex'
import { canonicalWords, measureWords } from '../../core/formats/measure-words.ts'
import { method } from '../../core/methods.ts'
import type { PublishedValue, QuantityKey } from '../../core/quantities.ts'
import { quantity } from '../../core/quantities.ts'
import type { Source, SourceDetail } from '../../core/schema/sources.ts'
import { can } from '../../core/permissions.ts'
import { NotFound } from '../http/errors.ts'
import type { Reader } from '../http/route.ts'
import { holdsAt, readRevision, type Holds, type ReadRevision } from './at-revision.ts'

/** A source with what it contributes at a revision. */
function counted(at: Holds): string {
  return `
  select s.id, s.label, s.title, s.authors, s.year, s.venue, s.kind, s.bibcode, s.doi, s.url,
         count(m.id)::int as measurements, count(distinct m.galaxy)::int as galaxies
    from sources s left join measurements m on m.source = s.id and ${at.sql('m')}`
}

const MOST = 2000

/** What a reader may know of the literature: a visitor only what is behind the release that he reads. */
export interface SourcesSeen {
  revision: ReadRevision
  /** Also sources that nothing at this revision came from. */
  unused: boolean
}

/** The sources that this reader may see, at the revision that he reads or names. @throws NotFound */
export async function sourcesSeen(knex: Knex, reader: Pick<Reader, 'permissions'>, at?: string): Promise<SourcesSeen> {
  return { revision: await readRevision(knex, reader, at), unused: can(reader.permissions, 'catalogue.read-current') }
}

/** Sources in which every word of the search occurs (label, title, authors, bibcode, DOI), newest first. */
export async function findSources(knex: Knex, { revision, unused }: SourcesSeen, search: string): Promise<Source[]> {
  const at = holdsAt(revision)
  const words = search.trim().split(/\s+/).filter((w) => w !== '').slice(0, 8)
  const conditions = words.map(() => `concat_ws(' ', s.label, s.title, s.authors::text, s.bibcode, s.doi) ilike ?`)
  const where = conditions.length > 0 ? `where ${conditions.join(' and ')}` : ''
  const { rows } = (await knex.raw(
    `${counted(at)} ${where} group by s.id ${unused ? '' : 'having count(m.id) > 0'} order by s.year desc, s.label, s.id limit ${MOST}`,
    [...at.bindings, ...words.map((w) => `%${w.replace(/[\\%_]/g, '\\$&')}%`)],
  )) as { rows: Source[] }
  return rows
}

/** @throws NotFound */
export async function sourceById(knex: Knex, { revision, unused }: SourcesSeen, id: number): Promise<Source> {
  const at = holdsAt(revision)
  const { rows } = (await knex.raw(`${counted(at)} where s.id = ? group by s.id`, [...at.bindings, id])) as { rows: Source[] }
  const [source] = rows
  if (!source || (source.measurements === 0 && !unused)) throw new NotFound(`There is no source ${id}${unused ? '' : ' behind the release that you read'}. The sources are listed at /sources.`)
  return source
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
export async function sourceDetail(knex: Knex, seen: SourcesSeen, id: number): Promise<SourceDetail> {
  const source = await sourceById(knex, seen, id)
  const at = holdsAt(seen.revision)
  const { rows } = (await knex.raw(
    `select m.lineage, v.slug, v.designation as galaxy, m.quantity, m.value, m.err_plus as "errPlus", m.err_minus as "errMinus", m.err_sys as "errSys",
            m.text_value as "textValue", m.limit_flag as "limitFlag", m.published, m.method,
            coalesce(a.reasons @> jsonb_build_array(jsonb_build_object('measurementId', m.lineage, 'used', true)), false) as used
       from measurements m
       join galaxy_versions v on v.galaxy = m.galaxy and ${at.sql('v')}
       left join adopted_values a on a.galaxy = m.galaxy and a.quantity = m.quantity and ${at.sql('a')}
      where m.source = ? and ${at.sql('m')}
      order by v.designation, m.quantity, m.lineage`,
    [...at.bindings, ...at.bindings, id, ...at.bindings],
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
