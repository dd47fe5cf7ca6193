/** Systems: hosts, their radii, their members, and what is computed of them together. */
import type { Knex } from 'knex'
import { virialRadius, zeroVelocityRadius } from '../../core/astro/environment.ts'
import type { Vector } from '../../core/astro/vector.ts'
import { sphereOf } from '../../core/derive/membership.ts'
import { DEFAULT_POLICY, policySchema, type Policy } from '../../core/scale/policy.ts'
import type { HostAnswer, HostsAnswer } from '../../core/schema/catalogue.ts'
import { flatteningOf } from '../../core/systems/flattening.ts'
import { dispersionOf } from '../../core/systems/gapper.ts'
import { offsetsOf, systemOf, type SystemGalaxy } from '../../core/systems/system.ts'
import { holdsAt, type ReadRevision } from './at-revision.ts'
import { galaxyNumber } from './galaxy.ts'
import { memberOf, memberRows, SYSTEM_COLUMNS } from './host-members.ts'
import { kept } from './kept.ts'

const KPC_PER_MPC = 1000

type Summary = HostsAnswer['hosts'][number]

interface HostRow {
  slug: string
  name: string
  class: Summary['class']
  distance: number | null
  logMstar: number | null
  centre: Vector | null
  members: number
  brightest: Summary['brightest']
  /** Of the members that have one, km/s. */
  velocityList: number[]
  /** Of the members that have a distance: supergalactic, Mpc. */
  positions: Vector[]
}

/** All hosts of satellites, those with most members first. */
export function hostsAt(knex: Knex, revision: ReadRevision): Promise<HostsAnswer> {
  return kept(knex, revision, ['hosts'], async () => {
    const policy = await policyAt(knex, revision)
    const rows = await hostRows(knex, revision, null)
    return { revision: revision.number, hosts: rows.map((row) => summaryOf(row, policy)) }
  })
}

/** One system; also of a galaxy that has no satellites. @throws NotFound when there is no such galaxy */
export async function hostAt(knex: Knex, slug: string, revision: ReadRevision): Promise<HostAnswer> {
  const galaxy = await galaxyNumber(knex, slug, revision)
  // The draws and reshuffles of a rich system take some 50 ms.
  return kept(knex, revision, ['host', galaxy], () => computedHost(knex, galaxy, revision))
}

async function computedHost(knex: Knex, galaxy: number, revision: ReadRevision): Promise<HostAnswer> {
  const [policy, [row], own] = await Promise.all([policyAt(knex, revision), hostRows(knex, revision, galaxy), ownOf(knex, galaxy, revision)])
  if (!row || !own) throw new Error('a galaxy that was found has no row')
  const satellites = await memberRows(knex, row.slug, revision)
  const host = { ...own, distance: row.distance }
  const { luminosity, placed, needed, shape } = systemOf(host, satellites, policy.host)
  return {
    revision: revision.number,
    host: { ...summaryOf(row, policy), ra: own.ra, dec: own.dec, absV: own.absV, vGsr: own.vGsr, ...radiiOf(row.logMstar, policy) },
    members: satellites.map((satellite) => memberOf(satellite, host, policy.host)),
    system: {
      luminosity, placed, needed,
      shape: shape && { ...shape, axes: [plain(shape.axes[0]), plain(shape.axes[1]), plain(shape.axes[2])], isotropy: { ...shape.isotropy, histogram: [...shape.isotropy.histogram] } },
    },
  }
}

function plain(v: Vector): [number, number, number] {
  return [...v]
}

function summaryOf({ velocityList, positions, centre, ...row }: HostRow, policy: Policy): Summary {
  const sphere = row.logMstar === null ? null : KPC_PER_MPC * sphereOf(10 ** row.logMstar, policy.host)
  const dispersion = dispersionOf(velocityList)
  const flattening = centre && flatteningOf(offsetsOf(centre, positions.map((position) => ({ position }))))
  return {
    ...row, sphere, dispersion: dispersion?.value ?? null, dispersionErr: dispersion?.error ?? null, velocities: velocityList.length, minorToMajor: flattening?.minorToMajor ?? null,
  }
}

/** R200 and the zero-velocity radius of the total mass, kpc, and that mass, Msun; null without a stellar mass. */
function radiiOf(logMstar: number | null, policy: Policy): { r200: number | null; zeroVelocityRadius: number | null; totalMass: number | null } {
  if (logMstar === null) return { r200: null, zeroVelocityRadius: null, totalMass: null }
  const totalMass = policy.host.totalOverStellar * 10 ** logMstar
  return { r200: KPC_PER_MPC * virialRadius(totalMass, policy.host.hubble), zeroVelocityRadius: KPC_PER_MPC * zeroVelocityRadius(totalMass), totalMass }
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
    `SELECT h.slug, h.name, h.class, h.distance, h.log_mstar AS "logMstar", CASE WHEN h.sgx IS NULL THEN NULL ELSE ARRAY[h.sgx, h.sgy, h.sgz] END AS centre,
            coalesce(m.members, 0)::int AS members, coalesce(m.velocities, '{}') AS "velocityList", m.brightest, coalesce(m.positions, '[]') AS positions
     FROM catalogue_rows h LEFT JOIN (
       SELECT host, count(*) AS members, array_agg(v_gsr ORDER BY v_gsr) FILTER (WHERE v_gsr IS NOT NULL) AS velocities,
              (array_agg(json_build_object('slug', slug, 'name', name, 'absV', abs_v) ORDER BY abs_v, slug) FILTER (WHERE abs_v IS NOT NULL))[1] AS brightest,
              json_agg(json_build_array(sgx, sgy, sgz) ORDER BY slug) FILTER (WHERE sgx IS NOT NULL) AS positions
       FROM catalogue_rows s WHERE host IS NOT NULL AND status <> 'withdrawn' AND ${holds.sql('s')} GROUP BY host
     ) AS m ON m.host = h.slug
     WHERE ${holds.sql('h')} AND ${which} ORDER BY members DESC, h.name`,
    [...holds.bindings, ...holds.bindings, ...(galaxy === null ? [] : [galaxy])],
  )
  return answer.rows
}

async function ownOf(knex: Knex, galaxy: number, revision: ReadRevision): Promise<(SystemGalaxy & { ra: number; dec: number }) | undefined> {
  const holds = holdsAt(revision)
  const answer = await knex.raw<{ rows: (SystemGalaxy & { ra: number; dec: number })[] }>(
    `SELECT ra, dec, ${SYSTEM_COLUMNS} FROM catalogue_rows WHERE galaxy = ? AND ${holds.sql()}`,
    [galaxy, ...holds.bindings],
  )
  return answer.rows[0]
}
