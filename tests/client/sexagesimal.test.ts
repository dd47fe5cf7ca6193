import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { declinationParts, rightAscensionParts, type Sexagesimal } from '../../src/lib/sexagesimal.ts'

const read = ({ sign, units, minutes, seconds }: Sexagesimal): number => (sign === '\u2212' ? -1 : 1) * (Number(units) + Number(minutes) / 60 + Number(seconds) / 3600)

describe('sexagesimal parts', () => {
  it('carry instead of writing sixty', () => {
    expect(rightAscensionParts(359.99999)).toEqual({ sign: '', units: '00', minutes: '00', seconds: '00.0' })
    expect(declinationParts(-29.99999)).toEqual({ sign: '\u2212', units: '30', minutes: '00', seconds: '00' })
    expect(declinationParts(-0.5)).toEqual({ sign: '\u2212', units: '00', minutes: '30', seconds: '00' })
  })

  it('are the angle again, to half of the last digit', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 359.9995, noNaN: true }), fc.double({ min: -90, max: 90, noNaN: true }), (ra, dec) => {
        expect(Math.abs(read(rightAscensionParts(ra)) * 15 - ra) * 240).toBeLessThan(0.0501)
        expect(Math.abs(read(declinationParts(dec)) - dec) * 3600).toBeLessThan(0.5001)
      }),
    )
  })
})
