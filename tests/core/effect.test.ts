import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { COLUMNS, type CatalogueRow, type CatalogueValue } from '../../core/columns.ts'
import { effectOfRows } from '../../core/effect.ts'

const row = (more: Partial<CatalogueRow> = {}): CatalogueRow => ({ slug: 'ostrel-ix', name: 'Ostrel IX', status: 'confirmed', distance: 3.6, host: 'ostrel', host_relation: 'satellite', v_lg: 40, ...more })
const effect = (before: CatalogueRow | null, after: CatalogueRow) => effectOfRows([{ galaxyId: 1, before, after }], (slug) => (slug === 'ostrel' ? 5 : 2), (slug) => slug.toUpperCase())

describe('effectOfRows', () => {
  it('of nothing is nothing', () => {
    expect(effectOfRows([], () => 0, String)).toEqual({ galaxies: [], systems: [], shifts: [], counts: { galaxiesAdded: 0, galaxiesChanged: 0, distancesMoved: 0, hostsChanged: 0 } })
    const value = fc.oneof(fc.double({ noDefaultInfinity: true, noNaN: true }), fc.string(), fc.constant(null)) as fc.Arbitrary<CatalogueValue>
    fc.assert(
      fc.property(fc.record(Object.fromEntries(COLUMNS.map((c) => [c.key, value]))), (any) => {
        expect(effect(any, { ...any }).galaxies).toEqual([])
      }),
    )
  })

  it('tells what prints differently, with both values as they are', () => {
    expect(effect(row(), row({ distance: 3.7123 })).galaxies).toEqual([
      { slug: 'ostrel-ix', name: 'Ostrel IX', kind: 'changed', changes: [{ column: 'distance', label: 'Distance', unit: 'Mpc', before: 3.6, after: 3.7123 }] },
    ])
  })

  it('keeps quiet about less than the printed precision, and about a sign of 0', () => {
    expect(effect(row(), row({ distance: 3.6001 })).galaxies).toEqual([])
    expect(effect(row({ v_lg: 0.01 }), row({ v_lg: -0.01 })).galaxies).toEqual([])
  })

  it('tells a value that comes or goes', () => {
    expect(effect(row({ distance: null }), row()).galaxies[0]?.changes).toMatchObject([{ column: 'distance', before: null, after: 3.6 }])
    expect(effect(row(), row({ distance: null })).galaxies[0]?.changes).toMatchObject([{ column: 'distance', before: 3.6, after: null }])
  })

  it('leaves out bookkeeping and what merely follows', () => {
    expect(effect(row(), row({ revision: 9, updated_at: '2026-01-01', distance_lo: 3.1, n_sources: 4 })).galaxies).toEqual([])
  })

  it('counts what systems gain and lose', () => {
    const found = effect(row(), row({ host: 'marl' }))
    expect(found.systems).toEqual([
      { slug: 'ostrel', name: 'OSTREL', before: 5, after: 4, gained: [], lost: ['Ostrel IX'] },
      { slug: 'marl', name: 'MARL', before: 2, after: 3, gained: ['Ostrel IX'], lost: [] },
    ])
    expect(found.counts).toEqual({ galaxiesAdded: 0, galaxiesChanged: 1, distancesMoved: 0, hostsChanged: 1 })
  })

  it('tells which distance moduli move, the farthest first', () => {
    const at = (slug: string, dm: number, more: Partial<CatalogueRow> = {}): CatalogueRow => row({ slug, name: slug, dm, dm_err: 0.03, dm_err_sys: 0.04, distance_method: 'trgb', ...more })
    const rows = [
      { galaxyId: 1, before: at('a', 27.5), after: at('a', 27.52) },
      { galaxyId: 2, before: at('b', 27.5), after: at('b', 27.45, { host: 'marl' }) },
      { galaxyId: 3, before: at('c', 27.5), after: at('c', 27.50001) },
      { galaxyId: 4, before: null, after: at('d', 27.5) },
    ]
    const found = effectOfRows(rows, () => 0, String)
    expect(found.shifts).toMatchObject([
      { slug: 'b', before: 27.5, after: 27.45, method: 'trgb', hostChanged: true, distance: 3.6 },
      { slug: 'a', before: 27.5, after: 27.52, hostChanged: false },
    ])
    expect(found.shifts[0]?.error).toBeCloseTo(0.05, 12)
    expect(found.counts.distancesMoved).toBe(2)
  })

  it('puts new galaxies first, and counts them apart', () => {
    const rows = [
      { galaxyId: 1, before: row(), after: row({ distance: 3.7 }) },
      { galaxyId: 2, before: null, after: row({ slug: 'new', name: 'New', host: null, host_relation: 'field' }) },
    ]
    const found = effectOfRows(rows, () => 0, String)
    expect(found.galaxies.map((g) => [g.slug, g.kind])).toEqual([['new', 'added'], ['ostrel-ix', 'changed']])
    expect(found.counts).toEqual({ galaxiesAdded: 1, galaxiesChanged: 1, distancesMoved: 0, hostsChanged: 0 })
    expect(found.systems).toEqual([])
  })
})
