/** Adding to the literature. */
import type { Knex } from 'knex'
import type { Source, SourceInput } from '../../core/schema/sources.ts'
import { BadInput } from '../http/errors.ts'
import type { Reader, Services } from '../http/route.ts'
import { HttpError } from '../http/errors.ts'
import { SourceModel } from '../models/source.ts'
import { sourceById, sourcesSeen } from '../queries/sources.ts'
import { record } from './audit.ts'
import { personOf } from './submissions/load.ts'

/**
 * "Cole 1999", "Jang & Lee 2014", "Gieren et al. 2005": what a source is called in tables and sentences.
 *
 * @param authors - surname first, at least one
 */
export function sourceLabel(authors: readonly string[], year: number): string {
  const surnames = authors.map((a) => (a.split(',')[0] ?? a).trim())
  const [first = 'Anonymous', second] = surnames
  const who = surnames.length > 2 ? `${first} et al.` : second === undefined ? first : `${first} & ${second}`
  return `${who} ${year}`
}

/** @throws HttpError 409 naming the source that has this bibcode or DOI already */
export async function addSource(services: Services, reader: Reader, input: SourceInput): Promise<Source> {
  const person = personOf(reader)
  if (input.kind === 'demonstration') throw new BadInput('Only the demonstration has invented sources. Nothing was added.', [{ path: 'kind', message: 'Choose another kind.' }])
  const id = await services.knex.transaction(async (trx) => {
    await refuseKnown(trx, input)
    const made = await SourceModel.query(trx).insert({ ...input, label: sourceLabel(input.authors, input.year), createdBy: person.id })
    await record(trx, person.id, 'source.add', `source:${made.id}`, { label: made.label })
    return made.id
  })
  return sourceById(services.knex, await sourcesSeen(services.knex, reader), id)
}

async function refuseKnown(trx: Knex.Transaction, { bibcode, doi }: SourceInput): Promise<void> {
  for (const [path, value] of [['bibcode', bibcode], ['doi', doi]] as const) {
    if (value === null) continue
    const known = await SourceModel.query(trx).findOne({ [path]: value })
    if (known) {
      throw new HttpError(409, 'Already there', `This is ${known.label}, which the catalogue has already (source ${known.id}). Nothing was added.`, {
        kind: 'duplicate', errors: [{ path, message: `${known.label} has it.` }],
      })
    }
  }
}
