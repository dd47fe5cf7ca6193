/** Which sources the citations of a table mean; those that are unknown are made when the draft is. */
import type { Knex } from 'knex'
import { readCitation } from '../../../core/formats/citation.ts'
import type { Citation } from '../../../core/formats/citation.ts'
import { sourcesById } from '../changes/current.ts'
import { insertMany } from '../changes/insert-many.ts'

export type SourceMatch =
  | { kind: 'held'; id: number; label: string; year: number }
  /** Citations with one key are one source. */
  | { kind: 'new'; key: string; citation: Citation }
  | { kind: 'none'; problem: string }

interface HeldSource {
  id: number
  label: string
  year: number
  venue: string
  bibcode: string | null
  doi: string | null
  citedAs: string[]
}

/** A match for each citation. */
export async function matchSources(knex: Knex, citations: Iterable<string>): Promise<Map<string, SourceMatch>> {
  const texts = [...new Set(citations)].filter((text) => text !== '')
  const read = new Map(texts.map((text) => [text, readCitation(text)]))
  const labels = [...read.values()].flatMap((c) => c?.label ?? [])
  const held = (texts.length === 0
    ? []
    : await knex('sources')
        .select('id', 'label', 'year', 'venue', 'bibcode', 'doi', 'citedAs')
        .whereRaw('cited_as && ?::text[]', [texts])
        .orWhereRaw('bibcode = ANY(?)', [texts])
        .orWhereRaw('doi = ANY(?)', [texts.map(doiOf)])
        .orWhereRaw('label = ANY(?)', [[...texts, ...labels]])
        .orderBy('id')) as HeldSource[]
  return new Map(texts.map((text) => [text, matchOne(text, read.get(text), held)]))
}

function matchOne(text: string, citation: Citation | undefined, held: readonly HeldSource[]): SourceMatch {
  const same = held.filter((s) => s.citedAs.includes(text) || s.bibcode === text || s.doi === doiOf(text))
  const venue = citation ? simplify(citation.venue) : ''
  const alike = same.length > 0 ? same : held.filter((s) => (citation && venue !== '' ? s.label === citation.label && simplify(s.venue) === venue : s.label === text))
  const [first, second] = alike
  if (first && second) return { kind: 'none', problem: `"${text}" may mean more than one source of the catalogue. Write its bibcode or DOI instead.` }
  if (first) return { kind: 'held', id: first.id, label: first.label, year: first.year }
  if (citation) return { kind: 'new', key: `${citation.label} ${venue}`, citation }
  return { kind: 'none', problem: `"${text}" gives no year, so no source can be made of it. Write authors and year, such as "Gieren+2005 ApJ 628 695", or enter the source first.` }
}

/** The source that the mapping gives to rows without a citation. */
export async function constantSource(knex: Knex, id: number | null): Promise<SourceMatch> {
  const source = id === null ? undefined : (await sourcesById(knex, [id])).get(id)
  if (source) return { kind: 'held', ...source }
  return { kind: 'none', problem: 'The row names no source: fill the column, or choose one source for all rows.' }
}

/**
 * Makes the sources that are new, and keeps with those that are not the words by which this table cites them, so that the next one finds them.
 *
 * @returns the id of each citation's source
 */
export async function keepSources(trx: Knex.Transaction, matches: ReadonlyMap<string, SourceMatch>, person: number): Promise<Map<string, number>> {
  const ids = new Map<string, number>()
  const fresh = new Map<string, { citation: Citation; texts: string[] }>()
  for (const [text, match] of matches) {
    if (match.kind === 'held') {
      ids.set(text, match.id)
      await trx.raw('UPDATE sources SET cited_as = cited_as || ? WHERE id = ? AND NOT cited_as && ?', [[text], match.id, [text]])
    }
    if (match.kind === 'new') {
      const known = fresh.get(match.key) ?? { citation: match.citation, texts: [] }
      known.texts.push(text)
      fresh.set(match.key, known)
    }
  }
  const made = [...fresh.values()]
  const newIds = await insertMany<number>(
    trx,
    'sources',
    made.map(({ citation: c, texts }) => ({
      label: c.label, title: texts[0] ?? c.label, authors: JSON.stringify(c.authors), year: c.year, venue: c.venue, kind: c.kind, citedAs: texts, createdBy: person,
    })),
    'id',
  )
  made.forEach(({ texts }, i) => {
    for (const text of texts) ids.set(text, newIds[i] ?? 0)
  })
  return ids
}

function doiOf(text: string): string {
  return text.toLowerCase().replace(/^(https?:\/\/(dx\.)?doi\.org\/|doi:\s*)/, '')
}

function simplify(venue: string): string {
  return venue.toLowerCase().replace(/\([^)]*\)/g, '').replace(/[^a-z0-9]+/g, '')
}
