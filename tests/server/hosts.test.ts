import { describe, expect, it } from 'vitest'
import { modulusOf } from '../../core/astro/distance.ts'
import { DEFAULT_POLICY } from '../../core/scale/policy.ts'
import { hostSchema, hostsSchema } from '../../core/schema/catalogue.ts'
import { changeGalaxy, makeRevision, placeGalaxy } from './harness/catalogue-rows.ts'
import { useReaders } from './harness/readers.ts'

/** Offsets from the host, kpc: rms extents in the ratio 300 : 200 : 60 along SGX, SGZ, SGY. */
const CROSS = [[300, 0, 0], [-300, 0, 0], [0, 0, 200], [0, 0, -200], [0, 60, 0], [0, -60, 0]] as const

/**
 * Ostrel, a host of 5×10¹⁰ solar masses with three satellites, one of which is moved in revision 2; Vael, with six on a flat cross; a galaxy
 * that hosts nothing.
 */
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
  await placeGalaxy(knex, 1, { name: 'Vael', class: 'lenticular', distance: 4, dm: modulusOf(4), dm_err: 0.02, sgx: 4, sgy: 0, sgz: 0, log_mstar: 11, v_gsr: 200, host_relation: 'host' })
  for (const [i, [x, y, z]] of CROSS.entries()) {
    const at = [4 + x / 1000, y / 1000, z / 1000] as const
    await placeGalaxy(knex, 1, {
      name: `Vael ${i + 1}`, host: 'vael', sgx: at[0], sgy: at[1], sgz: at[2], distance: Math.hypot(...at), dm: modulusOf(Math.hypot(...at)), dm_err: i === 0 ? null : 0.02, dm_err_sys: 0.05,
      abs_v: i < 4 ? -16 + 2 * i : null, abs_v_err: i < 4 ? 0.12 : null, v_gsr: i < 5 ? 200 + 40 * (i - 2) : null, host_dv: i < 5 ? 40 * (i - 2) : null, host_dv_err: i < 5 ? 3 : null, host_sep: Math.hypot(x, y, z),
      host_sep_median: Math.hypot(x, y, z) + 3,
    })
  }
  await changeGalaxy(knex, 2, third, { host: null, host_relation: 'field' })
})

describe('GET /api/hosts', () => {
  it('lists hosts with radii in kpc and the gapper dispersion', async () => {
    const { hosts, revision } = await readers().visitor.get('/api/hosts', hostsSchema)
    expect(revision).toBe(1)
    expect(hosts.map((h) => h.name)).toEqual(['Vael', 'Ostrel'])
    // sqrt(pi) / 6 * (2 * 90 + 2 * 30) and 1.5 (G 21.4 M / (100 H0²))^(1/3), by hand.
    expect(hosts[1]).toMatchObject({ slug: 'ostrel', members: 3, distance: 3, dispersion: expect.closeTo(70.898, 2) as number, sphere: expect.closeTo(324.6, 0) as number })
  })

  it('gives the error of the dispersion, the brightest satellite and the flattening; null where there is too little', async () => {
    const { hosts } = await readers().visitor.get('/api/hosts', hostsSchema)
    // Velocities −80, −40, 0, 40, 80 about the host: gaps of 40 weighted 4, 6, 6, 4. Left out one at a time the gapper gives, by hand,
    // sqrt(pi)/12 · (400, 520, 560, 520, 400); their jackknife is 4/5 of the sum of squared deviations.
    const root = Math.sqrt(Math.PI)
    const without = [400, 520, 560, 520, 400].map((sum) => (root / 12) * sum)
    const mean = without.reduce((a, b) => a + b, 0) / 5
    const error = Math.sqrt(0.8 * without.reduce((a, b) => a + (b - mean) ** 2, 0))
    expect(hosts[0]).toMatchObject({
      members: 6, velocities: 5, dispersion: expect.closeTo((root / 20) * 800, 9) as number, dispersionErr: expect.closeTo(error, 9) as number,
      brightest: { slug: 'vael-1', name: 'Vael 1', absV: -16 }, minorToMajor: expect.closeTo(0.2, 9) as number,
    })
    expect(hosts[1]).toMatchObject({ dispersionErr: null, brightest: null, minorToMajor: null })
  })

  it('reads the revision that is asked for', async () => {
    const ostrel = async (path: string) => (await readers().researcher.get(path, hostsSchema)).hosts.find((h) => h.slug === 'ostrel')
    expect(await ostrel('/api/hosts')).toMatchObject({ members: 2, dispersion: null })
    expect((await ostrel('/api/hosts?at=2026.1'))?.members).toBe(3)
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

  it('computes the system: shape with its draws and reshuffles, luminosity function', async () => {
    const { host, members, system } = await readers().visitor.get('/api/hosts/vael', hostSchema)
    expect(system).toMatchObject({ placed: 6, needed: 5 })
    expect(system.shape).toMatchObject({
      minorToMajor: expect.closeTo(0.2, 9) as number, middleToMajor: expect.closeTo(2 / 3, 9) as number, height: expect.closeTo(60 / Math.sqrt(3), 6) as number,
      // Level: the end with SGL in [0, 180).
      pole: { sgl: expect.closeTo(90, 6) as number, sgb: expect.closeTo(0, 6) as number }, drawn: { draws: DEFAULT_POLICY.host.draws }, isotropy: { reshuffles: DEFAULT_POLICY.host.draws },
    })
    const { drawn, isotropy } = system.shape ?? { drawn: undefined, isotropy: undefined }
    expect(drawn?.height.lo).toBeLessThanOrEqual(drawn?.height.median ?? NaN)
    expect(isotropy?.histogram.reduce((a, b) => a + b, 0)).toBe(isotropy?.reshuffles)
    expect(system.luminosity.missing).toBe(2)
    expect(system.luminosity.steps.map((s) => [s.slug, s.absV, s.count])).toEqual([['vael-1', -16, 1], ['vael-2', -14, 2], ['vael-3', -12, 3], ['vael-4', -10, 4]])
    expect(host.totalMass).toBeCloseTo(21.4e11, -6)
    const [first] = members.filter((m) => m.name === 'Vael 1')
    expect(first).toMatchObject({ separation: 300, separationMedian: 303, absVErr: 0.12, dv: -80, dvErr: 3, sight: { direction: [1, 0, 0] } })
    // No error of its own: the policy's 0.3 mag stands in, D (10^0.06 − 1).
    expect(first?.sight?.farther).toBeCloseTo(4300 * (10 ** 0.06 - 1), 6)
    expect(await readers().visitor.get('/api/hosts/vael', hostSchema)).toEqual({ revision: 1, host, members, system })
  })

  it('says how many satellites there are and how many a shape needs', async () => {
    const { system } = await readers().visitor.get('/api/hosts/ostrel', hostSchema)
    expect(system).toMatchObject({ placed: 3, needed: 5, shape: null, luminosity: { steps: [], missing: 3 } })
  })

  it('answers for a galaxy without satellites and without a mass, with nothing made up', async () => {
    const { host, members } = await readers().visitor.get('/api/hosts/tarn', hostSchema)
    expect(members).toEqual([])
    expect(host).toMatchObject({ members: 0, sphere: null, r200: null, zeroVelocityRadius: null, totalMass: null, dispersion: null, brightest: null, distance: null })
  })

  it('says 404 with names like it', async () => {
    expect((await readers().visitor.problem('/api/hosts/ostrell', 404)).detail).toBe('No galaxy of this catalogue has the identifier "ostrell". Did you mean ostrel, ostrel-i or ostrel-ii?')
  })
})
