import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { drawnDistances } from '../../../core/derive/draws.ts'
import { membershipOf, reachOf } from '../../../core/derive/membership.ts'
import { mayHost, pull } from '../../../core/derive/disturber.ts'
import { neighbourhoodOf, withChanges, type Neighbour } from '../../../core/derive/neighbourhood.ts'
import { possibleHostsOf, spansAfter, spansOf, tidalReach } from '../../../core/derive/possible-hosts.ts'
import { possibleHostSearch } from '../../../core/derive/possible-hosts-tree.ts'
import { assignedHost, relationOf, relationsOf } from '../../../core/derive/relation.ts'
import { DEFAULT_POLICY } from '../../../core/scale/policy.ts'
import { anyCrowd, crowd, moved, neighbour } from './neighbours.ts'

const policy = DEFAULT_POLICY.host
const few = { ...DEFAULT_POLICY, host: { ...policy, draws: 200 } }

describe('possible hosts', () => {
  it('are found by the tree as by looking at all', () => {
    fc.assert(
      fc.property(anyCrowd, (n) => {
        const search = possibleHostSearch(n, policy)
        for (let i = 0; i < n.size; i++) expect(search.of(i)).toEqual(possibleHostsOf(n, i, policy))
        expect([...search.order].sort((a, b) => a - b)).toEqual([...n.ids.keys()])
      }),
    )
    const many = neighbourhoodOf(crowd(11, 1500))
    const search = possibleHostSearch(many, policy)
    for (let i = 0; i < many.size; i += 5) expect(search.of(i)).toEqual(possibleHostsOf(many, i, policy))
  })

  it('leave nobody out who holds the galaxy in some draw within three standard deviations', () => {
    fc.assert(
      fc.property(anyCrowd, fc.double({ min: -2.9, max: 2.9, noNaN: true }), fc.double({ min: -2.9, max: 2.9, noNaN: true }), (n, a, b) => {
        for (let i = 0; i < Math.min(n.size, 8); i++) {
          const galaxy = n.galaxies[i] as Neighbour
          const possible = new Set(possibleHostsOf(n, i, policy))
          for (let j = 0; j < n.size; j++) {
            const host = n.galaxies[j] as Neighbour
            if (i === j || !mayHost(n, j, i, policy.massRatio)) continue
            const there = moved(galaxy, galaxy.modulus + a * Math.hypot(galaxy.statistical ?? 0, galaxy.systematic ?? 0))
            const then = moved(host, host.modulus + b * Math.hypot(host.statistical ?? 0, host.systematic ?? 0))
            if (Math.hypot(there.x - then.x, there.y - then.y, there.z - then.z) < tidalReach(host.mass)) expect(possible.has(j)).toBe(true)
          }
        }
      }),
      { numRuns: 60 },
    )
  })
})

describe('spans', () => {
  it('follow a change to what working them all out anew gives', () => {
    const list = crowd(21, 80)
    const before = neighbourhoodOf(list)
    for (const changes of [new Map<number, Neighbour | null>([[3, moved(list[2] as Neighbour, 28)], [9, { ...(list[8] as Neighbour), mass: 1e9, statistical: 0.4 }]]), new Map<number, Neighbour | null>([[5, null], [900, neighbour(900, [4, 1, 1], 1e8)]])]) {
      const after = withChanges(before, changes)
      expect(spansAfter(before, after, changes.keys(), policy)).toEqual(spansOf(neighbourhoodOf(after.galaxies), policy))
    }
  })
})

describe('membership among several hosts', () => {
  it('gives probabilities that sum to at most 1, the assignment among them', () => {
    fc.assert(
      fc.property(anyCrowd, (n) => {
        for (const id of n.ids) {
          const { columns, isSatellite, possibleHosts } = relationOf(n, id, few)
          const sum = possibleHosts.reduce((total, h) => total + h.p, 0)
          expect(sum).toBeLessThanOrEqual(1 + 1e-12)
          const p = columns.host_probability as number | null
          if (p === null) continue
          // Hosts of less than 1 draw in 200 are not listed.
          if (isSatellite) expect(possibleHosts.find((h) => h.host === columns.host)?.p ?? 0).toBeCloseTo(p, p < 0.005 ? 2 : 12)
          else expect(p + sum).toBeLessThanOrEqual(1 + 1e-12)
        }
      }),
      { numRuns: 40 },
    )
  })

  it('follows the rule of the assignment, draw by draw', () => {
    const hosts = [neighbour(1, [3.6, 0, 0], 5e10), neighbour(2, [3.75, 0.3, 0], 4e10)] as const
    const galaxy = neighbour(3, [3.7, 0.16, 0], 1e7)
    const found = membershipOf(galaxy, hosts[0], [hosts[1]], policy)
    // The same by moving the galaxies about and asking the rule itself.
    const drawn = [galaxy, ...hosts].map((g) => drawnDistances(g, policy))
    const counts = new Map<number, number>()
    for (let k = 0; k < policy.draws; k++) {
      const [there, ...then] = [galaxy, ...hosts].map((g, i) => moved(g, 5 * Math.log10(drawn[i]?.[k] ?? NaN) + 25))
      const n = neighbourhoodOf([there as Neighbour, ...then])
      const at = n.indexOf.get(3) ?? -1
      const strongest = [...hosts].sort((a, b) => pull(n, n.indexOf.get(b.id) ?? -1, at) - pull(n, n.indexOf.get(a.id) ?? -1, at))[0] as Neighbour
      const host = n.galaxies[n.indexOf.get(strongest.id) ?? -1] as Neighbour
      const separation = Math.hypot(host.x - (there?.x ?? 0), host.y - (there?.y ?? 0), host.z - (there?.z ?? 0))
      if (separation <= reachOf(host.mass, policy)) counts.set(host.id, (counts.get(host.id) ?? 0) + 1)
    }
    expect(new Map(found.hosts.map((h) => [h.slug, h.probability]))).toEqual(new Map([...counts].map(([id, c]) => [`g-${id}`, c / policy.draws])))
    expect(found.hosts.length).toBe(2)
    expect(found.hosts.reduce((sum, h) => sum + h.probability, 0)).toBeLessThan(1)
  })
})

describe('a host by decree', () => {
  const n = neighbourhoodOf([neighbour(1, [3.6, 0, 0], 5e10), neighbour(2, [3.6, 0.9, 0], 4e10), neighbour(3, [3.6, 0.1, 0], 1e7, { modulus: neighbour(1, [3.6, 0, 0], 1).modulus })])

  it('stands against the rule, with the probability that the draws give it', () => {
    expect(relationOf(n, 3, few)).toMatchObject({ mainDisturber: 1, isSatellite: true, columns: { host: 'g-1' } })
    const elsewhere = relationOf(n, 3, few, new Map([[3, 2]]))
    expect(elsewhere).toMatchObject({ mainDisturber: 2, isSatellite: true, columns: { host: 'g-2', main_disturber: 'g-2' } })
    expect(elsewhere.columns.host_probability).toBeLessThan(0.2)
    expect(elsewhere.columns.host_sep as number).toBeCloseTo(800, -1)
    const alone = relationOf(n, 3, few, new Map([[3, null]]))
    expect(alone).toMatchObject({ mainDisturber: 1, isSatellite: false, columns: { host: null, main_disturber: 'g-1' } })
    expect((alone.columns.host_probability as number) + (relationOf(n, 3, few).columns.host_probability as number)).toBeLessThanOrEqual(1)
  })

  it('is passed over where it has no distance', () => {
    expect(relationOf(n, 3, few, new Map([[3, 99]]))).toEqual(relationOf(n, 3, few))
  })

  it('is what the assignment alone says', () => {
    const some = neighbourhoodOf(crowd(31, 150))
    const overrides = new Map<number, number | null>([[3, 2], [5, null], [7, 999]])
    for (const id of some.ids) {
      const { isSatellite, mainDisturber } = relationOf(some, id, few, overrides)
      expect(assignedHost(some, id, few, overrides)?.id ?? null).toBe(isSatellite ? mainDisturber : null)
    }
  })

  it('is the same for one and for many', () => {
    const overrides = new Map<number, number | null>([[3, 2], [2, null]])
    for (const [id, relation] of relationsOf(n, n.ids, few, overrides)) expect(relation).toEqual(relationOf(n, id, few, overrides))
  })
})
