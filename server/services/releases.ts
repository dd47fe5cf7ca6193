/** Publishing: a label on the current revision, exact for ever. */
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
export async function releaseByLabel(services: Services, label: string): Promise<Release> {
  const release = await ReleaseModel.query(services.knex).findById(label).withGraphFetched('publisher')
  if (!release) throw new NotFound(`There is no release "${label}". The list is at /releases.`)
  return presented(services, release)
}

export interface ReleaseList {
  releases: Release[]
  current: { revision: number; unreleased: number } | null
}

/** Newest first; for the signed-in, also how far the catalogue has moved since. */
export async function listReleases(services: Services, reader: Reader): Promise<ReleaseList> {
  const models = await ReleaseModel.query(services.knex).withGraphFetched('publisher').orderBy('revision', 'desc').orderBy('publishedAt', 'desc')
  const releases = await Promise.all(models.map((m) => presented(services, m)))
  if (!reader.user) return { releases, current: null }
  const newest = (await services.knex('revisions').max('number as number').first()) as { number: number | null } | undefined
  const revision = newest?.number ?? 0
  return { releases, current: { revision, unreleased: revision - (releases[0]?.revision ?? 0) } }
}

async function presented({ knex }: Services, release: ReleaseModel): Promise<Release> {
  const at = [release.revision, release.revision]
  const { rows } = (await knex.raw(
    `select (select count(*)::int from catalogue_rows where status <> 'withdrawn' and rev_from <= ? and (rev_to is null or rev_to > ?)) as galaxies,
            (select count(*)::int from measurements where rev_from <= ? and (rev_to is null or rev_to > ?)) as measurements`,
    [...at, ...at],
  )) as { rows: { galaxies: number; measurements: number }[] }
  const counts = rows[0] ?? { galaxies: 0, measurements: 0 }
  return {
    label: release.label, revision: release.revision, title: release.title, notes: release.notes, publishedBy: release.publisher?.name ?? null,
    publishedAt: release.publishedAt.toISOString(), ...counts,
  }
}
