import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { parse } from 'csv-parse/sync'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { convert } from '../../core/astro/frames.ts'
import { separation } from '../../core/astro/sphere.ts'
import { hostSchema, hostsSchema, type HostAnswer } from '../../core/schema/catalogue.ts'
import { seedWhenEmpty } from '../../seeds/index.ts'
import { loadConfig } from '../../server/config.ts'
import { useReaders } from './harness/readers.ts'

const uploads = mkdtempSync(join(tmpdir(), 'vicinage-uploads-'))
afterAll(() => rmSync(uploads, { recursive: true }))

const readers = useReaders(async (knex) => {
  const config = loadConfig({ DATABASE_URL: 'postgres://unused', SESSION_SECRET: 'x'.repeat(40), NODE_ENV: 'test', UPLOADS_DIR: uploads, CATALOGUE: 'published' })
  await seedWhenEmpty({ knex, config, log: { info: () => undefined } })
})

interface Placed {
  slug: string
  name: string
  host: string | null
  position: [number, number, number] | null
}
let sample: Placed[] = []
const named = (name: string): Placed => {
  const found = sample.find((g) => g.name === name)
  if (!found) throw new Error(`no galaxy is called ${name}`)
  return found
}
const placeOf = (name: string): [number, number, number] => named(name).position ?? [NaN, NaN, NaN]
const apart = (a: readonly number[], b: readonly number[]): number => Math.hypot(...a.map((x, i) => x - (b[i] ?? NaN)))

beforeAll(async () => {
  const { rows } = await readers().knex.raw<{ rows: Placed[] }>(
    `SELECT slug, name, host, CASE WHEN sgx IS NULL THEN NULL ELSE ARRAY[sgx, sgy, sgz] END AS position FROM catalogue_rows WHERE rev_to IS NULL`,
  )
  sample = rows
})

describe('the published sample, through the application', () => {
  const membership = parse<{ galaxy: string; host: string }>(readFileSync(new URL('../reference/membership.csv', import.meta.url)), { columns: true, skip_empty_lines: true })

  it('gives every companion to its host, and our Galaxy its satellites', async () => {
    // tests/reference/membership.csv: common practice of the field, no source.
    for (const { galaxy, host } of membership) expect([galaxy, named(galaxy).host]).toEqual([galaxy, host === '' ? null : named(host).slug])
    const { hosts } = await readers().visitor.get('/api/hosts', hostsSchema)
    for (const name of ['Milky Way', 'M 31']) expect(hosts.find((h) => h.name === name)?.members).toBeGreaterThanOrEqual(membership.filter((m) => m.host === name).length)
  })

  describe('our own Galaxy', () => {
    let home: HostAnswer
    beforeAll(async () => {
      home = await readers().visitor.get(`/api/hosts/${named('Milky Way').slug}`, hostSchema)
    })

    it('is a row at the distance of its centre, and its satellites are as far from there, not from us', async () => {
      // GRAVITY Collaboration 2019: 8.178 kpc.
      expect(home.host.distance).toBeCloseTo(0.008178, 5)
      for (const m of home.members) {
        const direct = 1000 * apart(placeOf(m.name), placeOf('Milky Way'))
        expect(m.separation).toBeCloseTo(direct, 3)
        expect(Math.hypot(...(m.offset ?? [NaN]))).toBeCloseTo(direct, 3)
      }
      // The Sextans dwarf stands away from the centre as seen from us: farther from it than from us.
      const sextans = home.members.find((m) => m.name === 'Sextans dSph')
      expect(sextans?.separation).toBeGreaterThan(1000 * (sextans?.distance ?? NaN))
    })

    it('is at rest in the Galactic standard of rest, so its satellites have velocities against it', async () => {
      expect(home.host.vGsr).toBeNull()
      const { rows } = await readers().knex.raw<{ rows: { name: string; v: number }[] }>(`SELECT name, v_gsr AS v FROM catalogue_rows WHERE host = ? AND v_gsr IS NOT NULL AND rev_to IS NULL`, [home.host.slug])
      expect(rows.length).toBeGreaterThan(2)
      for (const { name, v } of rows) expect(home.members.find((m) => m.name === name)?.dv).toBe(v)
    })

    it('has its satellites in the polar plane that the literature finds', () => {
      // Metz, Kroupa & Jerjen 2007, MNRAS 374, 1125, for eleven satellites (this sample lacks the Sagittarius dwarf): c/a = 0.18, normal at
      // l = 157.3, b = −12.7, rms height 18.5 kpc. All from memory.
      const { shape } = home.system
      expect(Math.abs((shape?.minorToMajor ?? NaN) - 0.18)).toBeLessThan(0.03)
      const published = convert(157.3, -12.7, 'galactic', 'supergalactic')
      const apart = separation({ lon: shape?.pole.sgl ?? NaN, lat: shape?.pole.sgb ?? NaN }, published)
      expect(Math.min(apart, 180 - apart)).toBeLessThan(8)
      expect(Math.abs((shape?.height ?? NaN) - 18.5)).toBeLessThan(4)
      expect(shape?.isotropy.p).toBeLessThan(0.02)
    })
  })

  it('leaves the middle between the two large spirals empty: no galaxy within 100 kpc of it', () => {
    // Common practice of the field, no source.
    const [a, b] = [placeOf('Milky Way'), placeOf('M 31')]
    const middle = a.map((x, i) => (x + (b[i] ?? NaN)) / 2)
    const nearest = Math.min(...sample.flatMap((g) => (g.position ? [apart(g.position, middle)] : [])))
    expect(nearest).toBeGreaterThan(0.1)
    expect(apart(a, b)).toBeCloseTo(0.77, 1)
  })

  it('spans about three million light-years with its two large spirals and their satellites', () => {
    // Common practice, no source: the largest distance between any two galaxies of both systems. 1 Mpc is 3.2616 million light-years.
    const hosts = [named('Milky Way').slug, named('M 31').slug]
    const group = sample.filter((g) => g.position && (hosts.includes(g.slug) || (g.host !== null && hosts.includes(g.host))))
    const widest = Math.max(...group.flatMap((g, i) => group.slice(i + 1).map((other) => apart(g.position ?? [NaN], other.position ?? [NaN]))))
    expect(3.2616 * widest).toBeGreaterThan(2.7)
    expect(3.2616 * widest).toBeLessThan(3.6)
  })
})
