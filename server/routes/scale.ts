/** The scale: anchors and adoption policy. */
import { scaleSchema } from '../../core/schema/catalogue.ts'
import { route, type Route } from '../http/route.ts'
import { holdsAt, readRevision } from '../queries/at-revision.ts'
import { atQuery } from './parameters.ts'

export const scaleRoutes: Route[] = [
  route({
    method: 'get', path: '/api/scale', summary: 'Adopted anchors, and the policy', permission: 'catalogue.read', query: atQuery, answer: scaleSchema,
    handle: async ({ knex, reader, query }) => {
      const revision = await readRevision(knex, reader, query.at)
      const at = holdsAt(revision)
      const anchors = (await knex.raw(
        `select a.key, a.label, a.kind, a.methods, a.value, a.err, a.source,
                (select count(*)::int from measurements m where m.anchor = a.key and ${at.sql('m')}) as measurements
           from anchors a where ${at.sql('a')} order by a.label`,
        [...at.bindings, ...at.bindings],
      )) as { rows: unknown[] }
      const policy = (await knex.raw(`select document from policies p where ${at.sql('p')}`, [...at.bindings])) as { rows: { document: unknown }[] }
      return { revision: revision.number, anchors: anchors.rows, policy: policy.rows[0]?.document ?? null }
    },
  }),
]
