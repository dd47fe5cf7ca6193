import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalJson, hashInput } from '../../../core/submission/content.ts'

describe('the canonical text of a content', () => {
  it('does not depend on the order in which members were written', () => {
    fc.assert(
      fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (value) => {
        const turned = Object.fromEntries(Object.entries(value).reverse())
        expect(canonicalJson(turned)).toBe(canonicalJson(value))
      }),
    )
  })

  it('is JSON that reads back as what it was made from', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)))
      }),
    )
  })

  it('tells contents apart by each of their parts, and leaves out what is no content', () => {
    const change = { change: 7, action: 'name.add' as const, payload: { galaxy: { slug: 'ostrel' }, name: 'Ostrel A', sourceId: null } }
    const content = { title: 'Names', summary: '', changes: [change] }
    const same = hashInput({ ...content, changes: [{ ...change, base: { versionId: 3 } } as typeof change] })
    expect(same).toBe(hashInput(content))
    const others = [
      { ...content, title: 'Other names' },
      { ...content, summary: 'Why' },
      { ...content, changes: [] },
      { ...content, changes: [{ ...change, payload: { ...change.payload, name: 'Ostrel B' } }] },
    ]
    expect(new Set([...others, content].map(hashInput)).size).toBe(5)
  })

  it('refuses what JSON cannot hold', () => {
    expect(() => canonicalJson({ value: NaN })).toThrow(RangeError)
    expect(() => canonicalJson({ value: () => 1 })).toThrow(RangeError)
  })
})
