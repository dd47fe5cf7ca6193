/** The demonstration: an invented neighbourhood in several revisions, two releases, and a desk with work on it. */
import type { Knex } from 'knex'
import { random } from '../../core/random.ts'
import { DEFAULT_ANCHORS } from '../../core/scale/anchors.ts'
import { DEFAULT_POLICY } from '../../core/scale/policy.ts'
import { rebuildCatalogue } from '../../server/services/revision/rebuild.ts'
import type { Services } from '../../server/http/route.ts'
import { personCalled } from '../people.ts'
import { withFaults } from './catalogue-faults.ts'
import { layTheDesk } from './desk.ts'
import { hangTheGallery } from './gallery.ts'
import { literature } from './literature.ts'
import { addGalaxies, addSources, type Invented } from './load.ts'
import { measure } from './measure.ts'
import { drawSystematics } from './systematics.ts'
import { neighbourhood } from './truth.ts'

/** Another seed makes another neighbourhood. */
const SEED = 20260112

/** What was known at each revision: a share of the galaxies, when, and under which release. */
const CHAPTERS = [
  { revision: 2, upTo: 0.86, at: '2026-02-03T10:20:00Z', summary: 'First load: hosts and their brighter satellites', release: { label: '2026.1', title: 'First release' } },
  { revision: 3, upTo: 0.97, at: '2026-06-18T14:05:00Z', summary: 'The Demo Survey III: fainter satellites', release: null },
  { revision: 4, upTo: 1, at: '2026-09-29T08:40:00Z', summary: 'Resolved stars at the edge of three invented systems', release: { label: '2026.2', title: 'Fainter satellites, a better scale' } },
] as const

/** @param services - within the transaction */
export async function fillWithDemonstration(trx: Knex.Transaction, people: ReadonlyMap<string, number>, services: Services): Promise<void> {
  const person = (role: string): number => people.get(`${role}@demo.vicinage.test`) ?? 0
  const draw = random(SEED)
  const sources = literature(draw)
  const systematics = drawSystematics(draw, DEFAULT_POLICY, DEFAULT_ANCHORS)
  const honest = neighbourhood(draw).map((galaxy): Invented => ({ galaxy, measurements: measure(draw, galaxy, sources, systematics) }))
  const invented = shuffledTail(withFaults(honest, sources))
  const sourceIds = await addSources(trx, sources, person('curator'))
  let from = 0
  for (const chapter of CHAPTERS) {
    const to = Math.round(invented.length * chapter.upTo)
    await trx('revisions').insert({ number: chapter.revision, approvedBy: person('approver'), approvedAt: chapter.at, summary: chapter.summary })
    await addGalaxies(trx, chapter.revision, invented.slice(from, to), sourceIds, person('curator'))
    await rebuildCatalogue(trx, chapter.revision)
    if (chapter.release) {
      await trx('releases').insert({
        ...chapter.release, revision: chapter.revision, publishedBy: person('steward'), publishedAt: chapter.at,
        notes: 'An invented catalogue of an invented neighbourhood, for trying Vicinage out. No value in it belongs to a real galaxy.',
      })
    }
    from = to
  }
  await layTheDesk(services, { curator: personCalled(people, 'curator'), approver: personCalled(people, 'approver') })
  await hangTheGallery(services, personCalled(people, 'outreach'))
}

/** Bright galaxies come first, as they do in the sky; the order is otherwise kept. */
function shuffledTail(list: Invented[]): Invented[] {
  return [...list].sort((a, b) => Number(a.galaxy.absV > -11) - Number(b.galaxy.absV > -11))
}
