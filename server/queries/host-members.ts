/** The members of a system, as they are read and as they are answered. */
import type { Knex } from 'knex'
import type { Policy } from '../../core/scale/policy.ts'
import type { HostAnswer } from '../../core/schema/catalogue.ts'
import { restOf } from '../../core/derive/rest.ts'
import { sightOf } from '../../core/systems/sight.ts'
import { offsetsOf, type SystemGalaxy } from '../../core/systems/system.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'

type Member = HostAnswer['members'][number]

interface MemberRow extends SystemGalaxy, Omit<Member, 'offset' | 'sight' | 'absV'> {
  vErr: number | null
}

/** What `SystemGalaxy` wants, of catalogue_rows. */
export const SYSTEM_COLUMNS = `slug, CASE WHEN sgx IS NULL THEN NULL ELSE ARRAY[sgx, sgy, sgz] END AS position, dm AS modulus, dm_err AS statistical, dm_err_sys AS systematic,
  abs_v AS "absV", v_gsr AS "vGsr"`

/** Nearest first. */
export async function memberRows(knex: Knex, host: string, revision: ReadRevision): Promise<MemberRow[]> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: MemberRow[] }>(
    `SELECT ${SYSTEM_COLUMNS}, name, class, distance, abs_v_err AS "absVErr", v_hel_err AS "vErr", host_sep AS separation, host_sep_median AS "separationMedian",
            host_sep_lo AS "separationLo", host_sep_hi AS "separationHi", host_probability AS probability, host_angle AS angle, host_dv AS dv, host_dv_err AS "dvErr"
     FROM catalogue_rows WHERE host = ? AND status <> 'withdrawn' AND ${holds.sql()} ORDER BY host_sep, name`,
    [host, ...holds.bindings],
  )
  return answer.rows
}

/** A member as it is answered: with its offset from the host and its velocity against it. */
export function memberOf(row: MemberRow, host: Pick<SystemGalaxy, 'position' | 'vGsr'> & { distance: number | null }, policy: Policy['host']): Member {
  const { position, modulus, statistical, systematic: _systematic, vGsr, vErr, dv, dvErr, ...told } = row
  const [offset] = position && host.position ? offsetsOf(host.position, [{ position }]) : []
  const rest = restOf(host.vGsr, host.distance)
  // The catalogue's column needs a velocity of the host; our own Galaxy, at rest by definition, has none.
  const known = dv !== null
  const sight = position && modulus !== null ? sightOf(position, modulus, statistical ?? policy.unknownError) : null
  return {
    ...told, dv: known || rest === null || vGsr === null ? dv : vGsr - rest, dvErr: known || rest === null ? dvErr : vErr, offset: offset ? [...offset] : null,
    sight: sight && { ...sight, direction: [...sight.direction] },
  }
}
