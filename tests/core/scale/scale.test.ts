import { describe, expect, it } from 'vitest'
import { anchorFields, anchorFieldWords, methodsOfField } from '../../../core/scale/anchor-fields.ts'
import { anchorShiftSentence, distanceFactor, modulusShift } from '../../../core/scale/anchor-effect.ts'
import { DEFAULT_ANCHORS } from '../../../core/scale/anchors.ts'
import { policyDifferences, policyLeaves, policyValues, policyWith } from '../../../core/scale/policy-leaves.ts'
import { completePolicySchema, DEFAULT_POLICY, policySchema } from '../../../core/scale/policy.ts'
import { METHOD_KEYS } from '../../../core/methods.ts'

const GAP = '\u00a0'

describe('a policy', () => {
  it('is its leaves: taken apart and put together it is itself, and every number of it has a name', () => {
    expect(policyWith(DEFAULT_POLICY, policyValues(DEFAULT_POLICY))).toEqual(DEFAULT_POLICY)
    const bare = { ...DEFAULT_POLICY, methods: [] }
    expect(new Set(policyWith(bare, policyValues(DEFAULT_POLICY)).methods.map((m) => m.method))).toEqual(new Set(METHOD_KEYS))
    const leaves = policyLeaves(DEFAULT_POLICY)
    expect(leaves).toHaveLength(2 + 4 * METHOD_KEYS.length + Object.keys(DEFAULT_POLICY.host).length)
    expect(new Set(leaves.map((l) => l.label)).size).toBe(leaves.length)
    expect(leaves.find((l) => l.path === 'methods.trgb.systematic')).toMatchObject({ label: 'TRGB: systematic error', words: `0.05${GAP}mag` })
  })

  it('differs from another one in just the leaves that were set, whatever the order of its methods', () => {
    const next = policyWith({ ...DEFAULT_POLICY, methods: [...DEFAULT_POLICY.methods].reverse() }, { 'methods.trgb.tier': 2, 'host.sphere': 2, 'nowhere.at.all': 5 })
    expect(policyDifferences(DEFAULT_POLICY, next)).toEqual([
      { path: 'methods.trgb.tier', label: 'TRGB: tier', before: '1', after: '2' },
      { path: 'host.sphere', label: 'Hosts: radius of the sphere', before: `1.5${GAP}R200`, after: `2.0${GAP}R200` },
    ])
    expect(policyDifferences(DEFAULT_POLICY, DEFAULT_POLICY)).toEqual([])
  })

  it('may be read without a rule for a method, but not proposed so', () => {
    const partial = { ...DEFAULT_POLICY, methods: DEFAULT_POLICY.methods.filter((m) => m.method !== 'jagb') }
    expect(policySchema.safeParse(partial).success).toBe(true)
    expect(completePolicySchema.safeParse(DEFAULT_POLICY).success).toBe(true)
    expect(completePolicySchema.safeParse(partial).error?.issues[0]).toMatchObject({ path: ['methods'], message: 'No rule for JAGB: every method needs one.' })
  })
})

describe('an anchor', () => {
  it('moves moduli with its own, and against a candle that gets fainter', () => {
    expect(modulusShift('modulus', 18.477, 18.527)).toBeCloseTo(0.05, 12)
    expect(modulusShift('absolute-magnitude', -4.049, -3.999)).toBeCloseTo(-0.05, 12)
    // 10^(-0.05 / 5), by hand.
    expect(distanceFactor(-0.05)).toBeCloseTo(0.977237, 6)
  })

  it('says what a new value does to distances', () => {
    const [lmc, trgb] = DEFAULT_ANCHORS
    if (!lmc || !trgb) throw new Error('two anchors were there')
    expect(anchorShiftSentence(trgb, -4.049, -3.999)).toBe(`+0.05${GAP}mag: distances by TRGB shrink by 2.3${GAP}%`)
    expect(anchorShiftSentence(lmc, 18.477, 18.377)).toBe(`−0.10${GAP}mag: distances by Cepheids, RR Lyrae, Red clump and Miras shrink by 4.5${GAP}%`)
    expect(anchorShiftSentence(lmc, 18.477, 18.4775)).toBe(`+0.0005${GAP}mag: distances by Cepheids, RR Lyrae, Red clump and Miras grow by less than 0.1${GAP}%`)
    expect(anchorShiftSentence(lmc, 18.477, 18.477)).toBeNull()
  })

  it('is equal to one whose methods stand in another order', () => {
    const [lmc] = DEFAULT_ANCHORS
    if (!lmc) throw new Error('an anchor was there')
    expect(anchorFields({ ...lmc, methods: [...lmc.methods].reverse() })).toEqual(anchorFields(lmc))
    expect(anchorFieldWords('methods', anchorFields(lmc).methods)).toBe('Cepheids, RR Lyrae, Red clump, Miras')
    expect(methodsOfField('')).toEqual([])
  })
})
