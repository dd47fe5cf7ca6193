/** Systems: hosts, their radii and members. */
import type { Knex } from 'knex'
import { virialRadius, zeroVelocityRadius } from '../../core/astro/environment.ts'
import { gapperDispersion } from '../../core/systems/gapper.ts'
import { sphereOf } from '../../core/derive/membership.ts'
import { DEFAULT_POLICY, policySchema, type Policy } from '../../core/scale/policy.ts'
import type { HostAnswer, HostsAnswer } from '../../core/schema/catalogue.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'
import { galaxyNumber } from './galaxy.ts'

const KPC_PER_MPC = 1000

type Summary = HostsAnswer['hosts'][number]
type Member = HostAnswer['members'][number]

interface HostRow {
  slug: string
  name: string
  class: Summary['class']
  distance: number | null
  logMstar: number | null
  members: number
  /** Of the members that have one, km/s. */
  velocities: number[]
}

/** All hosts of satellites, those with most members first. */
export async function hostsAt(knex: Knex, revision: ReadRevision): Promise<HostsAnswer> {
  const policy = await policyAt(knex, revision)
  const rows = await hostRows(knex, revision, null)
  return { revision: revision.number, hosts: rows.map((row) => summaryOf(row, policy)) }
}

/** One system; also of a galaxy that has no satellites. @throws NotFound when there is no such galaxy */
export async function hostAt(knex: Knex, slug: string, revision: ReadRevision): Promise<HostAnswer> {
  const galaxy = await galaxyNumber(knex, slug, revision)
  const [policy, [row], place] = await Promise.all([policyAt(knex, revision), hostRows(knex, revision, galaxy), placeOf(knex, galaxy, revision)])
  if (!row || !place) throw new Error('a galaxy that was found has no row')
  const { centre, ...host } = place
  return {
    revision: revision.number,
    host: { ...summaryOf(row, policy), ...host, ...radiiOf(row.logMstar, policy) },
    members: await membersOf(knex, row.slug, centre, revision),
  }
}

function summaryOf({ velocities, ...row }: HostRow, policy: Policy): Summary {
  const sphere = row.logMstar === null ? null : KPC_PER_MPC * sphereOf(10 ** row.logMstar, policy.host)
  return { ...row, sphere, dispersion: gapperDispersion(velocities) }
}

/** R200 and the zero-velocity radius of the total mass, kpc; null without a stellar mass. */
function radiiOf(logMstar: number | null, policy: Policy): { r200: number | null; zeroVelocityRadius: number | null } {
  if (logMstar === null) return { r200: null, zeroVelocityRadius: null }
  const total = policy.host.totalOverStellar * 10 ** logMstar
  return { r200: KPC_PER_MPC * virialRadius(total, policy.host.hubble), zeroVelocityRadius: KPC_PER_MPC * zeroVelocityRadius(total) }
}

async function policyAt(knex: Knex, revision: ReadRevision): Promise<Policy> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: { document: unknown }[] }>(`SELECT document FROM policies WHERE ${holds.sql()}`, [...holds.bindings])
  const [row] = answer.rows
  return row ? policySchema.parse(row.document) : DEFAULT_POLICY
}

/** All hosts, or (by number) one galaxy whether it is a host or not. */
async function hostRows(knex: Knex, revision: ReadRevision, galaxy: number | null): Promise<HostRow[]> {
  const holds = holdsAt(revision)
  const which = galaxy === null ? 'm.members > 0' : 'h.galaxy = ?'
  const answer = await knex.raw<{ rows: HostRow[] }>(
    `SELECT h.slug, h.name, h.class, h.distance, h.log_mstar AS "logMstar", coalesce(m.members, 0)::int AS members, coalesce(m.velocities, '{}') AS velocities
     FROM catalogue_rows h LEFT JOIN (
       SELECT host, count(*) AS members, array_agg(v_gsr ORDER BY v_gsr) FILTER (WHERE v_gsr IS NOT NULL) AS velocities
       FROM catalogue_rows s WHERE host IS NOT NULL AND status <> 'withdrawn' AND ${holds.sql('s')} GROUP BY host
     ) AS m ON m.host = h.slug
     WHERE ${holds.sql('h')} AND ${which} ORDER BY members DESC, h.name`,
    [...holds.bindings, ...holds.bindings, ...(galaxy === null ? [] : [galaxy])],
  )
  return answer.rows
}

interface HostPlace {
  ra: number
  dec: number
  absV: number | null
  vGsr: number | null
  /** Supergalactic, Mpc; null without a distance. */
  centre: [number, number, number] | null
}

async function placeOf(knex: Knex, galaxy: number, revision: ReadRevision): Promise<HostPlace | undefined> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: HostPlace[] }>(
    `SELECT ra, dec, abs_v AS "absV", v_gsr AS "vGsr", CASE WHEN sgx IS NULL THEN NULL ELSE ARRAY[sgx, sgy, sgz] END AS centre
     FROM catalogue_rows WHERE galaxy = ? AND ${holds.sql()}`,
    [galaxy, ...holds.bindings],
  )
  return answer.rows[0]
}

async function membersOf(knex: Knex, host: string, centre: HostPlace['centre'], revision: ReadRevision): Promise<Member[]> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: (Omit<Member, 'offset'> & { at: [number, number, number] | null })[] }>(
    `SELECT slug, name, class, distance, abs_v AS "absV", host_sep AS separation, host_sep_lo AS "separationLo", host_sep_hi AS "separationHi",
            host_probability AS probability, host_angle AS angle, host_dv AS dv, CASE WHEN sgx IS NULL THEN NULL ELSE ARRAY[sgx, sgy, sgz] END AS at
     FROM catalogue_rows WHERE host = ? AND status <> 'withdrawn' AND ${holds.sql()} ORDER BY host_sep, name`,
    [host, ...holds.bindings],
  )
  return answer.rows.map(({ at, ...member }) => ({
    ...member,
    offset: at && centre ? [KPC_PER_MPC * (at[0] - centre[0]), KPC_PER_MPC * (at[1] - centre[1]), KPC_PER_MPC * (at[2] - centre[2])] : null,
  }))
}
