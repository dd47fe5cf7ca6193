/** The published sample, brought in the way anybody brings in a table: imported, submitted, approved by somebody else, released. */
import { readFile } from 'node:fs/promises'
import type { Reader, Services } from '../../server/http/route.ts'
import { draftOfImport } from '../../server/services/imports/draft.ts'
import { createImport } from '../../server/services/imports/imports.ts'
import { publish } from '../../server/services/releases.ts'
import { approve } from '../../server/services/review/approve.ts'
import { answerOf } from '../../server/services/submissions/answer.ts'
import { submit } from '../../server/services/submissions/transitions.ts'

const TABLE = new URL('./published.csv', import.meta.url)

export interface Hands {
  curator: Reader
  approver: Reader
  steward: Reader
}

/** @throws Error when a row of the sample cannot be read, which a test would have shown */
export async function fillWithPublishedSample(services: Services, { curator, approver, steward }: Hands): Promise<void> {
  const brought = await createImport(services, curator, { name: 'published.csv', bytes: await readFile(TABLE) })
  if (brought.rowsBad > 0) throw new Error(`${brought.rowsBad} rows of the published sample cannot be read`)
  const { submission } = await draftOfImport(services, curator, brought.id, {
    title: 'The published sample',
    summary: 'Published values of well-known galaxies of the neighbourhood, each with its source. The note of each says whether it was verified or written from memory.',
  })
  const draft = await answerOf(services.knex, submission, curator)
  const waiting = await submit(services, curator, submission, draft.lockVersion)
  await approve(services, approver, submission, { contentHash: waiting.contentHash ?? '', note: 'Compared with the table it came in.' })
  await publish(services, steward, {
    label: '1',
    title: 'The published sample',
    notes: 'Published values of well-known galaxies of the neighbourhood. Where a note says “from memory”, look the value up before you rely on it.',
  })
}
