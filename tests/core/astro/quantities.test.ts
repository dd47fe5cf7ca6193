/** Numbers against published values and worked examples; where a check value was computed, with what is said beside it. */
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { distanceOf, distanceWithErrors, modulusOf, modulusWithErrors } from '../../../core/astro/distance.ts'
import { ageGyr, tidalTerm, virialRadius, zeroVelocityMass, zeroVelocityRadius } from '../../../core/astro/environment.ts'
import { absoluteMagnitude, extinction, meanSurfaceBrightness, meanSurfaceBrightnessFromAbsolute } from '../../../core/astro/magnitudes.ts'
import { hiMass, logStellarMass, meanBMinusK, stellarMass } from '../../../core/astro/masses.ts'
import { circularisedPc, diameterKpc, semiMajorPc } from '../../../core/astro/sizes.ts'
import { velocityCmb, velocityGsr, velocityLocalGroup } from '../../../core/astro/velocities.ts'

describe('distance', () => {
  it.each([[24.407, 0.7610268859], [18.477, 0.0495906728], [29.397, 7.5753028499]])('a modulus of %f mag is %f Mpc (computed with mpmath)', (mu, d) => {
    expect(distanceOf(mu)).toBeCloseTo(d, 9)
    expect(modulusOf(d)).toBeCloseTo(mu, 8)
  })

  it('carries errors through the exact map (computed with mpmath)', () => {
    const there = distanceWithErrors(27.7, 0.1, 0.25)
    expect([there.value, there.plus, there.minus].map((x) => Number(x.toFixed(9)))).toEqual([3.467368505, 0.163412043, 0.377073072])
    const back = modulusWithErrors(3.56, 0.31, 0.22)
    expect([back.value, back.plus, back.minus].map((x) => Number(x.toFixed(9)))).toEqual([27.75724999, 0.181304835, 0.138517656])
  })

  it('goes there and back', () => {
    fc.assert(fc.property(fc.double({ min: 10, max: 40, noNaN: true }), (mu) => {
        expect(modulusOf(distanceOf(mu))).toBeCloseTo(mu, 10)
      }))
  })

  it('refuses a distance that is none', () => {
    expect(() => modulusOf(0)).toThrow(/distance \(Mpc\)/)
    expect(() => modulusWithErrors(1, 0.1, 1)).toThrow(RangeError)
  })
})

describe('light', () => {
  it('M 31 by both conventions of reddening: 13 % apart in A_V (V = 3.44, E = 0.062, μ = 24.407; computed)', () => {
    expect(absoluteMagnitude(3.44, 24.407, extinction('V', 0.062, 'true'))).toBeCloseTo(-21.1592, 6)
    expect(absoluteMagnitude(3.44, 24.407, extinction('V', 0.062, 'sfd'))).toBeCloseTo(-21.137004, 6)
  })

  it('mean surface brightness is one number by both ways (computed: 24.3328704220)', () => {
    expect(meanSurfaceBrightness(8.6, 11.3, 0.68)).toBeCloseTo(24.332870422, 8)
    const d = 0.086
    const kpc = semiMajorPc(d, 11.3) / 1000
    expect(meanSurfaceBrightnessFromAbsolute(8.6 - modulusOf(d), kpc, 0.68)).toBeCloseTo(24.332870422, 6)
  })
})

describe('sizes', () => {
  it('half-light radii, semi-major and circularised, kept apart (11.30′, e = 0.32, 86 kpc; computed)', () => {
    expect(semiMajorPc(0.086, 11.3)).toBeCloseTo(282.6851612, 5)
    expect(circularisedPc(0.086, 11.3, 0.68)).toBeCloseTo(233.1081557, 5)
  })

  it('diameters by the tangent (computed)', () => {
    expect(diameterKpc(3.6, 26.9 / 60)).toBeCloseTo(28.16975786, 6)
    expect(diameterKpc(0.04959, 645.7 / 60)).toBeCloseTo(9.34179706, 6)
  })
})

describe('masses', () => {
  it('H I: 2.356e5 D² S', () => expect(hiMass(3.6, 1000)).toBeCloseTo(3.053376e9, -2))

  it('stars of M 31 from K = 0.98 (E = 0.062, SFD; computed with M_sun = 3.27)', () => {
    const absK = absoluteMagnitude(0.98, 24.407, 0.302 * 0.062)
    expect(stellarMass(absK) / 4.8561221235e10).toBeCloseTo(1, 2)
  })

  it('takes the best way there is', () => {
    const light = { logMassMeasured: null, absK: null, absB: -18, absV: -18.5, stage: 6 }
    expect(logStellarMass({ ...light, logMassMeasured: 10.7 })).toEqual({ value: 10.7, route: 'measured' })
    expect(logStellarMass({ ...light, absK: -22 })?.route).toBe('K')
    expect(logStellarMass(light)?.route).toBe('B and type')
    expect(logStellarMass({ ...light, absB: null })?.route).toBe('V')
    expect(logStellarMass({ ...light, absB: null, absV: null })).toBeNull()
  })

  it('B − K by stage is one curve', () => {
    expect([-5, 2, 3, 8, 9, 10].map((stage) => Number(meanBMinusK(stage).toFixed(9)))).toEqual([4.1, 4.1, 3.85, 2.6, 2.35, 2.35])
  })
})

describe('velocities', () => {
  // Heliocentric, Local Group, GSR and CMB of five galaxies, computed with astropy from the published apices.
  it.each([
    ['M 31', 121.1744, -21.573, -301, -34.481, -114.656, null],
    ['NGC 253', 97.3662, -87.9641, 243, 276.196, 243.819, null],
    ['M 81', 142.0918, 40.9001, -34, 107.597, 77.456, null],
    ['NGC 5128', 309.5158, 19.4172, 547, 300.734, 378.636, 801.984],
    ['M 101', 102.0375, 59.7714, 241, 378.687, 367.296, null],
  ])('%s', (_name, l, b, v, lg, gsr, cmb) => {
    expect(velocityLocalGroup(v, l, b)).toBeCloseTo(lg, 2)
    expect(velocityGsr(v, l, b)).toBeCloseTo(gsr, 2)
    // Redshifts compose by product: 801.984, where a plain sum would give 801.520.
    if (cmb !== null) expect(velocityCmb(v, l, b)).toBeCloseTo(cmb, 2)
  })
})

describe('environment', () => {
  it('tidal term (computed)', () => {
    expect(tidalTerm(5e10, 0.78)).toBeCloseTo(0.062686, 6)
    expect(tidalTerm(5e10, 0.05)).toBeCloseTo(3.64206, 5)
    expect(tidalTerm(5e10, 0.81844595)).toBeCloseTo(0, 6)
  })

  it('R200 (computed)', () => {
    expect(virialRadius(1e12, 67.4)).toBeCloseTo(0.21155, 5)
    expect(virialRadius(1e12, 73)).toBeCloseTo(0.200588, 5)
  })

  it.each([[67.3, 0.315, 1.95264e12], [67.4, 0.315, 1.95845e12], [70, 0.3, 2.08372e12], [72, 0.24, 2.07718e12], [73, 0.24, 2.13528e12]])(
    'zero-velocity mass for H0 = %f, Ω_m = %f is %f Msun/Mpc³ (integrated with scipy)',
    (hubble, omegaMatter, mass) => expect(zeroVelocityMass({ hubble, omegaMatter }) / mass).toBeCloseTo(1, 5),
  )

  it('gives the Local Group’s published mass from its radius: 0.96 Mpc, 1.9e12 ± 0.2e12 Msun (Karachentsev et al. 2009, MNRAS 393, 1265)', () => {
    expect(Math.abs(zeroVelocityMass({ hubble: 73, omegaMatter: 0.24 }) * 0.96 ** 3 - 1.9e12)).toBeLessThan(0.1e12)
    expect(zeroVelocityRadius(1.95e12)).toBeCloseTo(1, 2)
  })

  it('the age of the universe, Planck parameters: 13.8 Gyr', () => expect(ageGyr()).toBeCloseTo(13.8, 1))
})
