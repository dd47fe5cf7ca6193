/** The scale at a revision, and what hangs on it. */
import type { Knex } from 'knex'
import { method, METHOD_KEYS } from '../../core/methods.ts'
import type { MethodCount, ScaleAnchor, ScaleAnswer } from '../../core/schema/scale.ts'
import { policySchema } from '../../core/scale/policy.ts'
import { NotFound } from '../http/errors.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'
import { kept } from './kept.ts'

/** The answer of `GET /api/scale`. @throws NotFound in a catalogue whose scale was never laid */
export function scaleAt(knex: Knex, revision: ReadRevision): Promise<ScaleAnswer> {
  return kept(knex, revision, ['scale'], async () => {
    const at = holdsAt(revision)
    const { rows: policies } = await knex.raw<{ rows: { document: unknown; since: number }[] }>(`SELECT p.document, p.rev_from AS since FROM policies p WHERE ${at.sql('p')}`, [...at.bindings])
    const [policy] = policies
    if (!policy) throw new NotFound('This catalogue has no scale yet: it was never laid. Nothing is lost; a steward has to start the catalogue.')
    const anchors = await anchorsAt(knex, revision)
    const methods = await countsAt(knex, revision)
    const { rows: distances } = await knex.raw<{ rows: { n: number }[] }>(`SELECT count(*)::int AS n FROM adopted_values a WHERE a.quantity = 'distance_modulus' AND ${at.sql('a')}`, [...at.bindings])
    return { revision: revision.number, anchors, methods, policy: policySchema.parse(policy.document), policySince: policy.since, galaxies: distances[0]?.n ?? 0 }
  })
}

/** The distances held, each with whether the adopted one uses it. One statement's start: `WITH ... SELECT`. */
function distancesSql(revision: ReadRevision): { sql: string; bindings: readonly Knex.RawBinding[] } {
  const at = holdsAt(revision)
  return {
    sql: `used AS MATERIALIZED (
            SELECT (reason ->> 'measurementId')::int AS lineage FROM adopted_values a, jsonb_array_elements(a.reasons) AS reason
            WHERE a.quantity = 'distance_modulus' AND ${at.sql('a')} AND (reason ->> 'used')::boolean),
          distances AS MATERIALIZED (
            SELECT m.lineage, m.galaxy, m.method, m.anchor, m.anchor_value_assumed IS NOT NULL AND m.anchor IS NOT NULL AS stated, used.lineage IS NOT NULL AS used
            FROM measurements m LEFT JOIN used ON used.lineage = m.lineage WHERE m.quantity = 'distance_modulus' AND ${at.sql('m')})`,
    bindings: [...at.bindings, ...at.bindings],
  }
}

async function anchorsAt(knex: Knex, revision: ReadRevision): Promise<ScaleAnchor[]> {
  const at = holdsAt(revision)
  const distances = distancesSql(revision)
  const { rows } = await knex.raw<{ rows: ScaleAnchor[] }>(
    `WITH ${distances.sql}
     SELECT a.key, a.label, a.kind, a.methods, a.value, a.err, a.source, a.rev_from AS since,
            count(*) FILTER (WHERE d.stated AND d.anchor = a.key)::int AS measurements,
            count(*) FILTER (WHERE NOT d.stated AND d.method = ANY(a.methods))::int AS unscaled,
            count(DISTINCT d.galaxy) FILTER (WHERE d.used AND (d.anchor = a.key OR (NOT d.stated AND d.method = ANY(a.methods))))::int AS galaxies
     FROM anchors a LEFT JOIN distances d ON d.anchor = a.key OR d.method = ANY(a.methods)
     WHERE ${at.sql('a')} GROUP BY a.id ORDER BY a.label, a.key`,
    [...distances.bindings, ...at.bindings],
  )
  return rows
}

async function countsAt(knex: Knex, revision: ReadRevision): Promise<MethodCount[]> {
  const distances = distancesSql(revision)
  const { rows } = await knex.raw<{ rows: MethodCount[] }>(
    `WITH ${distances.sql}
     SELECT d.method, count(*)::int AS measurements, count(*) FILTER (WHERE d.used)::int AS "measurementsUsed",
            count(DISTINCT d.galaxy)::int AS galaxies, count(DISTINCT d.galaxy) FILTER (WHERE d.used)::int AS "galaxiesUsed"
     FROM distances d GROUP BY d.method`,
    [...distances.bindings],
  )
  const found = new Map(rows.map((r) => [r.method, r]))
  return METHOD_KEYS.map((key) => found.get(key) ?? { method: method(key).key as MethodCount['method'], measurements: 0, measurementsUsed: 0, galaxies: 0, galaxiesUsed: 0 })
}
