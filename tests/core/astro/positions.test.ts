import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { designationOf } from '../../../core/astro/designation.ts'
import { convert, FRAMES } from '../../../core/astro/frames.ts'
import { formatDeclination, formatPosition, formatRightAscension } from '../../../core/astro/position-format.ts'
import { readPosition } from '../../../core/astro/position-reader.ts'
import { distanceBetween, separation, unitVector } from '../../../core/astro/sphere.ts'
import { wrap360 } from '../../../core/astro/units.ts'

const longitude = fc.double({ min: 0, max: 359.999999, noNaN: true })
const latitude = fc.double({ min: -90, max: 90, noNaN: true })

describe('reading a position', () => {
  it.each([
    '00 42 44.3 +41 16 09', '00:42:44.3, +41:16:09', '0h42m44.3s +41d16m09s', '00ʰ 42ᵐ 44.3ˢ +41° 16′ 09″', '00 42 44.3 + 41 16 09', 'J004244.3+411609', 'Demo J004244.3+411609',
  ])('%s', (text) => {
    const read = readPosition(text)
    expect(read).toMatchObject({ ok: true })
    if (!read.ok) return
    expect(read.ra).toBeCloseTo(10.684583333, 8)
    expect(read.dec).toBeCloseTo(41.269166667, 8)
  })

  it('takes degrees, a true minus, and −00 degrees for what they are', () => {
    expect(readPosition('10.6847 41.2688')).toEqual({ ok: true, ra: 10.6847, dec: 41.2688, form: 'degrees' })
    expect(readPosition('360 -5')).toMatchObject({ ra: 0, dec: -5 })
    expect(readPosition('00 42 44.3 −41 16 09')).toMatchObject({ ok: true, dec: -(41 + 16 / 60 + 9 / 3600) })
    expect(readPosition('0 1 2 -00 00 01')).toMatchObject({ ok: true, dec: -1 / 3600 })
  })

  it.each([
    ['', 'Type a position'],
    ['abc 3', '"abc" is no number'],
    ['12 60 0 +1 2 3', 'Minutes of right ascension'],
    ['12 10 60 +1 2 3', 'Seconds of right ascension'],
    ['24 0 0 +1 2 3', 'Hours of right ascension'],
    ['12 0 0 +91 0 0', 'Declination runs from'],
    ['10 91.2', 'you typed 91.2'],
    ['361 0', 'you typed 361'],
    ['1 2 3', 'not 3'],
    ['12 0 0 1 -2 3', 'Only the declination has a sign'],
  ])('says what is wrong with "%s"', (text, words) => {
    const read = readPosition(text)
    expect(read).toMatchObject({ ok: false })
    expect(read.ok ? '' : read.error).toContain(words)
  })

  it('reads back what is printed, to the last place', () => {
    fc.assert(
      fc.property(longitude, latitude, (ra, dec) => {
        const read = readPosition(formatPosition(ra, dec, 3))
        expect(read.ok).toBe(true)
        if (!read.ok) return
        expect(separation({ lon: ra, lat: dec }, { lon: read.ra, lat: read.dec }) * 3600).toBeLessThan(0.0012)
      }),
    )
  })
})

describe('printing a position', () => {
  it('never prints 60 seconds', () => {
    expect(formatRightAscension(15 * (59.9995 / 3600), 2)).toBe('00ʰ 01ᵐ 00.00ˢ')
    expect(formatDeclination(-(59.9999 / 3600), 1)).toBe('−00° 01′ 00.0″')
    expect(formatRightAscension(359.9999999, 1)).toBe('00ʰ 00ᵐ 00.0ˢ')
  })
})

describe('a designation', () => {
  it('is truncated, not rounded', () => {
    // Worked example of the IAU's recommendations for nomenclature: 19h57m40.558s +33°38′27.96″ is J195740.55+333827.9.
    expect(designationOf('X', 15 * (19 + 57 / 60 + 40.558 / 3600), 33 + 38 / 60 + 27.96 / 3600, 2)).toBe('X J195740.55+333827.9')
    expect(designationOf('X', 359.999999, -0.0001, 2)).toBe('X J235959.99-000000.3')
  })
})

describe('directions', () => {
  it('survive every change of frame and back', () => {
    fc.assert(
      fc.property(longitude, latitude, fc.constantFrom(...FRAMES), fc.constantFrom(...FRAMES), (lon, lat, from, to) => {
        const there = convert(lon, lat, from, to)
        const back = convert(there.lon, there.lat, to, from)
        expect(separation({ lon, lat }, back)).toBeLessThan(1e-10)
        expect(there.lon).toBeGreaterThanOrEqual(0)
        expect(there.lon).toBeLessThan(360)
      }),
    )
  })

  it('are as far apart in every frame', () => {
    fc.assert(
      fc.property(longitude, latitude, longitude, latitude, (lon1, lat1, lon2, lat2) => {
        const here = separation({ lon: lon1, lat: lat1 }, { lon: lon2, lat: lat2 })
        const there = separation(convert(lon1, lat1, 'equatorial', 'supergalactic'), convert(lon2, lat2, 'equatorial', 'supergalactic'))
        expect(there).toBeCloseTo(here, 9)
      }),
    )
  })

  it('keep their digits when close', () => {
    expect(separation({ lon: 10, lat: 0 }, { lon: 10 + 1e-9, lat: 0 })).toBeCloseTo(1e-9, 15)
    expect(distanceBetween(unitVector(10, 20), 3, unitVector(10, 20), 3)).toBe(0)
  })

  it('wrap into [0, 360)', () => {
    expect([wrap360(-0.25), wrap360(360), wrap360(-1e-20), wrap360(725)]).toEqual([359.75, 0, 0, 5])
  })

  it('refuse what is no direction', () => {
    expect(() => convert(0, 90.001, 'equatorial', 'galactic')).toThrow(/latitude \(deg\)/)
    expect(() => convert(NaN, 0, 'equatorial', 'galactic')).toThrow(/longitude \(deg\)/)
  })
})
