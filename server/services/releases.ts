/** Publishing: a label on the current revision, exact for ever. */
import type { Knex } from 'knex'
import type { Release, ReleaseInput } from '../../core/schema/releases.ts'
import { HttpError, NotFound } from '../http/errors.ts'
import type { Reader, Services } from '../http/route.ts'
import { ReleaseModel } from '../models/release.ts'
import { record } from './audit.ts'
import { lockCatalogue } from './review/catalogue-lock.ts'
import { personOf } from './submissions/load.ts'

/** @throws HttpError 409 when the label is taken or there is nothing to publish */
export async function publish(services: Services, reader: Reader, input: ReleaseInput): Promise<Release> {
  const person = personOf(reader)
  await services.knex.transaction(async (trx) => {
    // No revision may come in between reading its number and giving it the label.
    await lockCatalogue(trx)
    if (await ReleaseModel.query(trx).findById(input.label)) {
      throw new HttpError(409, 'The label is taken', `Release ${input.label} exists already, and a release never changes. Nothing was published; choose another label.`, { kind: 'duplicate', errors: [{ path: 'label', message: 'This label is taken.' }] })
    }
    const newest = (await trx('revisions').max('number as number').first()) as { number: number | null } | undefined
    if (!newest?.number) throw new HttpError(409, 'Nothing to publish', 'The catalogue has no revision yet. Nothing was published.', { kind: 'conflict' })
    await ReleaseModel.query(trx).insert({ ...input, revision: newest.number, publishedBy: person.id })
    await record(trx, person.id, 'release.publish', `release:${input.label}`, { revision: newest.number })
  })
  return releaseByLabel(services, input.label)
}

/** @throws NotFound */
export async function releaseByLabel({ knex }: Services, label: string): Promise<Release> {
  const [release] = await releases(knex, 'where r.label = ?', [label])
  if (!release) throw new NotFound(`There is no release "${label}". The list is at /releases.`)
  return release
}

export interface ReleaseList {
  releases: Release[]
  current: { revision: number; unreleased: number } | null
}

/** Newest first; for the signed-in, also how far the catalogue has moved since. */
export async function listReleases({ knex }: Services, reader: Reader): Promise<ReleaseList> {
  const found = await releases(knex, '', [])
  if (!reader.user) return { releases: found, current: null }
  const newest = (await knex('revisions').max('number as number').first()) as { number: number | null } | undefined
  const revision = newest?.number ?? 0
  return { releases: found, current: { revision, unreleased: revision - (found[0]?.revision ?? 0) } }
}

type ReleaseRow = Omit<Release, 'publishedAt' | 'galaxies' | 'measurements'> & { publishedAt: Date }

async function releases(knex: Knex, where: string, bindings: string[]): Promise<Release[]> {
  const { rows } = (await knex.raw(
    `select r.label, r.revision, r.title, r.notes, u.name as "publishedBy", r.published_at as "publishedAt",
            (select e.label from releases e where e.revision = r.revision and e.published_at < r.published_at order by e.published_at desc limit 1) as "sameAs"
       from releases r left join users u on u.id = r.published_by ${where} order by r.revision desc, r.published_at desc`,
    bindings,
  )) as { rows: ReleaseRow[] }
  const counts = await countsAt(knex, rows.map((row) => row.revision))
  return rows.map((row) => ({ ...row, publishedAt: row.publishedAt.toISOString(), ...(counts.get(row.revision) ?? { galaxies: 0, measurements: 0 }) }))
}

type Counts = Pick<Release, 'galaxies' | 'measurements'>

/** What each revision holds never changes, so it is counted once for each database handle. */
const counted = new WeakMap<object, Map<number, Counts>>()

async function countsAt(knex: Knex, revisions: readonly number[]): Promise<ReadonlyMap<number, Counts>> {
  const known = counted.get(knex) ?? new Map<number, Counts>()
  counted.set(knex, known)
  const missing = [...new Set(revisions)].filter((revision) => !known.has(revision))
  if (missing.length === 0) return known
  const { rows } = (await knex.raw(
    `select r.number,
            (select count(*)::int from catalogue_rows where status <> 'withdrawn' and rev_from <= r.number and (rev_to is null or rev_to > r.number)) as galaxies,
            (select count(*)::int from measurements where rev_from <= r.number and (rev_to is null or rev_to > r.number)) as measurements
       from unnest(?::int[]) as r(number)`,
    [missing],
  )) as { rows: (Counts & { number: number })[] }
  for (const { number, galaxies, measurements } of rows) known.set(number, { galaxies, measurements })
  return known
}
