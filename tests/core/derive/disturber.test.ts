import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { disturberSearch } from '../../../core/derive/disturber-tree.ts'
import { disturbersOf, pull } from '../../../core/derive/disturber.ts'
import { neighbourhoodOf } from '../../../core/derive/neighbourhood.ts'
import { anyCrowd, crowd, neighbour } from './neighbours.ts'

describe('disturbersOf', () => {
  const n = neighbourhoodOf([
    neighbour(1, [4, 0, 0], 5e10),
    neighbour(2, [4.05, 0, 0], 2e9),
    neighbour(3, [4.1, 0, 0], 1e8),
    neighbour(4, [5, 0, 0], 0),
  ])

  it('gives the largest M★/d³ over all, and over those that outweigh the galaxy', () => {
    expect(disturbersOf(n, 0, 5)).toMatchObject({ index: 1, main: -1 })
    expect(disturbersOf(n, 1, 5)).toMatchObject({ index: 0, main: 0 })
    // 2e9 at 50 kpc pulls less than 5e10 at 100 kpc: 1.6e13 against 5e13.
    expect(disturbersOf(n, 2, 5)).toMatchObject({ index: 0, main: 0 })
    expect(disturbersOf(n, 2, 5).mainPull).toBeCloseTo(5e13, -3)
  })

  it('lets a galaxy without photometry be disturbed, and disturb nobody', () => {
    expect(disturbersOf(n, 3, 5).main).toBe(0)
    for (let i = 0; i < 3; i++) expect(disturbersOf(n, i, 5).index).not.toBe(3)
  })

  it('finds nobody where nobody is', () => {
    expect(disturbersOf(neighbourhoodOf([neighbour(1, [4, 0, 0], 5e10)]), 0, 5)).toEqual({ index: -1, indexPull: 0, main: -1, mainPull: 0 })
  })

  it('keeps two galaxies at one point finite, and settles equal pulls by id', () => {
    const same = neighbourhoodOf([neighbour(7, [4, 0, 0], 1e9), neighbour(3, [4, 0, 0], 1e9), neighbour(5, [4, 0, 0], 1e8)])
    expect(disturbersOf(same, 1, 5)).toMatchObject({ index: 0, main: 0 })
    expect(disturbersOf(same, 1, 5).indexPull).toBeLessThan(Infinity)
  })

  it('makes hosts a forest: mass rises along every chain, whatever the ratio', () => {
    fc.assert(
      fc.property(anyCrowd, fc.double({ min: 1, max: 10, noNaN: true }), (some, ratio) => {
        for (let i = 0; i < some.size; i++) {
          const seen = new Set([i])
          for (let at = disturbersOf(some, i, ratio).main; at !== -1; at = disturbersOf(some, at, ratio).main) {
            expect(seen.has(at)).toBe(false)
            seen.add(at)
          }
        }
      }),
      { numRuns: 30 },
    )
  })
})

describe('disturberSearch', () => {
  it('answers as the plain search does, to the last digit', () => {
    fc.assert(
      fc.property(anyCrowd, fc.constantFrom(1, 2.5, 5), (some, ratio) => {
        const search = disturberSearch(some, ratio)
        for (let i = 0; i < some.size; i++) expect(search(i)).toEqual(disturbersOf(some, i, ratio))
      }),
    )
  })

  it('also among thousands, and among galaxies at the very same points', () => {
    const many = crowd(5, 3000)
    const doubled = neighbourhoodOf([...many, ...many.slice(0, 300).map((g) => ({ ...g, id: g.id + 10_000 }))])
    const search = disturberSearch(doubled, 5)
    for (let i = 0; i < doubled.size; i += 7) expect(search(i)).toEqual(disturbersOf(doubled, i, 5))
  })
})

describe('pull', () => {
  it('is M★/d³', () => {
    const n = neighbourhoodOf([neighbour(1, [4, 0, 0], 5e10), neighbour(2, [4, 0.78, 0], 1e6)])
    // log10 of it less 10.96 is the published worked value 0.062686.
    expect(Math.log10(pull(n, 0, 1)) - 10.96).toBeCloseTo(0.062686, 6)
  })
})
