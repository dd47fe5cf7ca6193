import { describe, expect, it } from 'vitest'
import { hostSchema, hostsSchema } from '../../core/schema/catalogue.ts'
import { changeGalaxy, makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import { useReaders } from './harness/readers.ts'
import { DEFAULT_POLICY } from '../../core/scale/policy.ts'

/** A host of 5×10¹⁰ solar masses with three satellites, one of which is moved in revision 2; a galaxy that hosts nothing. */
const readers = useReaders(async (knex) => {
  await makeRevision(knex, 1, { release: '2026.1' })
  await makeRevision(knex, 2)
  await knex('policies').insert({ document: JSON.stringify(DEFAULT_POLICY), revFrom: 1 })
  await placeGalaxy(knex, 1, { name: 'Ostrel', class: 'spiral', distance: 3, log_mstar: Math.log10(5e10), abs_v: -21, v_gsr: 100, host_relation: 'host' })
  const satellite = (name: string, v: number | null, separation: number) =>
    placeGalaxy(knex, 1, { name, host: 'ostrel', host_sep: separation, host_sep_lo: separation - 10, host_sep_hi: separation + 20, host_probability: 0.9, v_gsr: v, distance: 3 + separation / 1000 })
  await satellite('Ostrel I', 60, 120)
  await satellite('Ostrel II', 150, 40)
  const third = await satellite('Ostrel III', 180, 200)
  await placeGalaxy(knex, 1, { name: 'Ostrel IV', host: 'ostrel', status: 'withdrawn' })
  await placeGalaxy(knex, 1, { name: 'Tarn' })
  await changeGalaxy(knex, 2, third, { host: null, host_relation: 'field' })
})

describe('GET /api/hosts', () => {
  it('lists hosts with radii in kpc and the gapper dispersion', async () => {
    const { hosts, revision } = await readers().visitor.get('/api/hosts', hostsSchema)
    expect(revision).toBe(1)
    expect(hosts).toHaveLength(1)
    // sqrt(pi) / 6 * (2 * 90 + 2 * 30) and 1.5 (G 21.4 M / (100 H0²))^(1/3), by hand.
    expect(hosts[0]).toMatchObject({ slug: 'ostrel', members: 3, distance: 3, dispersion: expect.closeTo(70.898, 2) as number, sphere: expect.closeTo(324.6, 0) as number })
  })

  it('reads the revision that is asked for', async () => {
    const now = await readers().researcher.get('/api/hosts', hostsSchema)
    expect(now.hosts[0]).toMatchObject({ members: 2, dispersion: null })
    expect((await readers().researcher.get('/api/hosts?at=2026.1', hostsSchema)).hosts[0]?.members).toBe(3)
  })
})

describe('GET /api/hosts/:slug', () => {
  it('gives the members, nearest first, with their offsets in kpc', async () => {
    const { host, members } = await readers().visitor.get('/api/hosts/ostrel', hostSchema)
    expect(members.map((m) => m.name)).toEqual(['Ostrel II', 'Ostrel I', 'Ostrel III'])
    expect(members[0]).toMatchObject({ separation: 40, separationLo: 30, separationHi: 60, probability: 0.9 })
    // All lie in the host's own direction, so the offset is as long as the difference of the distances.
    for (const m of members) expect(Math.hypot(...(m.offset ?? [0, 0, 0]))).toBeCloseTo(m.separation ?? 0, 6)
    expect(host.r200).toBeCloseTo((host.sphere ?? 0) / 1.5, 6)
    expect(host.zeroVelocityRadius).toBeGreaterThan(host.sphere ?? 0)
    expect(host).toMatchObject({ absV: -21, vGsr: 100, members: 3 })
  })

  it('answers for a galaxy without satellites and without a mass, with nothing made up', async () => {
    const { host, members } = await readers().visitor.get('/api/hosts/tarn', hostSchema)
    expect(members).toEqual([])
    expect(host).toMatchObject({ members: 0, sphere: null, r200: null, zeroVelocityRadius: null, dispersion: null, distance: null })
  })

  it('says 404 with names like it', async () => {
    expect((await readers().visitor.problem('/api/hosts/ostrell', 404)).detail).toBe('No galaxy of this catalogue has the identifier "ostrell". Did you mean ostrel, ostrel-i or ostrel-ii?')
  })
})
