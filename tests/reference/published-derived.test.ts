/** Published derived values (published_derived.csv), every row within its tolerance. */
import { describe, expect, it } from 'vitest'
import { RELATIVE_PER_MAG, distanceOf, distanceWithErrors, modulusOf } from '../../core/astro/distance.ts'
import { tidalTerm, zeroVelocityMass } from '../../core/astro/environment.ts'
import { convert, supergalacticPosition } from '../../core/astro/frames.ts'
import { separation, unitVector } from '../../core/astro/sphere.ts'
import { velocityLocalGroup } from '../../core/astro/velocities.ts'
import { length, type Vector } from '../../core/astro/vector.ts'
import { rescaling } from '../../core/adoption/rescale.ts'
import { DEFAULT_ANCHORS } from '../../core/scale/anchors.ts'
import { table, type CsvRow } from './published-sample.ts'

const rows = table('published_derived.csv')
const positions = new Map([...table('published.csv').map((r) => [r.galaxy, { ra: Number(r.ra_deg), dec: Number(r.dec_deg) }] as const), ...table('frames.csv').map((r) => [r.name, { ra: Number(r.ra_deg), dec: Number(r.dec_deg) }] as const)])

const of = (kind: string): CsvRow[] => rows.filter((r) => r.kind === kind)
const rest = new Set(rows)
/** Rows of a kind, ticked off; the last test asks for those that nobody looked at. */
function each(kind: string, check: (row: CsvRow) => void, only?: string): void {
  for (const row of of(kind)) {
    if (only !== undefined && row.object !== only) continue
    rest.delete(row)
    it(`${kind}: ${row.object ?? ''}, ${row.published_value ?? ''} (${row.source ?? ''})`, () => check(row))
  }
}
const one = (kind: string, object: string, check: (row: CsvRow) => void): void => each(kind, check, object)

/** The first number of a text, or the one behind some letters; "(1.6+-0.2)e12" is 1.6e12. */
function number(text: string | undefined, behind = ''): number {
  const escaped = behind.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')
  const [, digits = '', , power = ''] = new RegExp(`${escaped}\\(?(-?\\d+(?:\\.\\d+)?)(\\+-[\\d.]+\\))?(e\\d+)?`).exec(text ?? '') ?? []
  return digits === '' ? NaN : Number(digits + power)
}

function place(name: string): { ra: number; dec: number } {
  const found = positions.get(name)
  if (!found) throw new Error(`no position of ${name}`)
  return found
}

function point(name: string, modulus: number): Vector {
  const { ra, dec } = place(name)
  return supergalacticPosition(ra, dec, distanceOf(modulus))
}

const apart = (a: Vector, b: Vector): number => length([a[0] - b[0], a[1] - b[1], a[2] - b[2]])

describe('distances', () => {
  each('modulus->distance', (row) => {
    const perMpc = row.published_value?.endsWith('kpc') ? 1000 : 1
    const published = number(row.published_value)
    const errors = [...(row.inputs ?? '').matchAll(/\+-(\d+\.\d+)/g)].map((m) => Number(m[1]))
    const found = distanceWithErrors(number(row.inputs, 'mu='), errors[0] ?? 0)
    expect(Math.abs(found.value * perMpc - published)).toBeLessThanOrEqual(number(row.tolerance))
    const [error] = [...(row.published_value ?? '').matchAll(/\+-(\d+(\.\d+)?)/g)].map((m) => Number(m[1]))
    // The error that Jang & Lee 2014 print does not follow from their own modulus, as the table notes.
    if (error === undefined || row.object === 'M 74') return
    expect(RELATIVE_PER_MAG * found.value * (errors[0] ?? 0) * perMpc).toBeCloseTo(error, perMpc === 1 ? 1.9 : -0.5)
  })
  each('distance->modulus', (row) => expect(Math.abs(modulusOf(number(row.inputs, 'd=')) - number(row.published_value))).toBeLessThanOrEqual(number(row.tolerance)))
  one('relative modulus', 'M 81', (row) => {
    const lmc = number(row.inputs, 'LMC ')
    expect(Math.abs(distanceOf(lmc + 9.39) - number(row.published_value))).toBeLessThanOrEqual(number(row.tolerance))
  })
  one('zero point change', 'M 81', () => {
    expect(27.78 + (rescaling({ anchor: 'lmc-modulus', anchorValueAssumed: 18.41 }, DEFAULT_ANCHORS) ?? NaN)).toBeCloseTo(27.847, 9)
  })
})

describe('frames and velocities', () => {
  one('frame', 'CMB dipole', (row) => {
    const { lon, lat } = convert(264.021, 48.253, 'galactic', 'equatorial')
    expect(Math.abs(lon - number(row.published_value, 'RA '))).toBeLessThanOrEqual(number(row.tolerance))
    expect(Math.abs(lat - number(row.published_value, 'Dec '))).toBeLessThanOrEqual(number(row.tolerance))
  })
  one('frame', 'Local-Group solar apex KM96', () => {
    // Towards the Galactic centre, rotation and the pole, what is added is the apex's component.
    const found = [velocityLocalGroup(0, 0, 0), velocityLocalGroup(0, 90, 0), velocityLocalGroup(0, 0, 90)]
    expect(found.map((v) => Number(v.toFixed(3)))).toEqual([-16.498, 314.798, -22.043])
  })
  one('frame', 'Local-Group solar apex CvdB99', () => {
    // Not the one that we use; its components test the geometry.
    expect(unitVector(99, -4).map((u) => Number((306 * u).toFixed(2)))).toEqual([-47.75, 301.5, -21.35].map((v) => expect.closeTo(v, 1) as number))
  })
  each('V_LG (KM96)', (row) => {
    const { ra, dec } = place(row.object ?? '')
    const { lon, lat } = convert(ra, dec, 'equatorial', 'galactic')
    expect(Math.abs(velocityLocalGroup(number(row.inputs, 'Vh='), lon, lat) - number(row.published_value))).toBeLessThanOrEqual(number(row.tolerance))
  })
})

describe('separations', () => {
  each('distance from M 31', (row) => {
    const m31 = point('M 31', number(row.inputs, 'M31 mu='))
    const found = 1000 * apart(point(row.object ?? '', number(row.inputs, 'mu=')), m31)
    const published = number(row.published_value)
    const tolerance = row.tolerance?.includes('per cent') ? (number(row.tolerance) / 100) * published : number(row.tolerance)
    expect(Math.abs(found - published)).toBeLessThanOrEqual(tolerance)
  })
  one('separation', 'NGC 55 - NGC 300', () => {
    const [a, b] = [place('NGC 55'), place('NGC 300')]
    expect(separation({ lon: a.ra, lat: a.dec }, { lon: b.ra, lat: b.dec })).toBeCloseTo(7.9724, 3)
    expect(Math.abs(1000 * apart(point('NGC 55', 26.434), point('NGC 300', 26.37)) - 300)).toBeLessThan(0.2 * 300)
  })
  one('separation', 'Maffei 2 behind IC 342 group', (row) => expect(Math.abs(number(row.inputs) - 3.28 - number(row.published_value))).toBeLessThanOrEqual(number(row.tolerance)))
})

describe('masses and environment', () => {
  each('R0->mass, flat LCDM', (row) => {
    const r0 = number(row.inputs, 'R0=')
    const cosmology = row.inputs?.includes('Planck') ? { hubble: 67.3, omegaMatter: 0.315 } : { hubble: 73, omegaMatter: 0.24 }
    expect(Math.abs(zeroVelocityMass(cosmology) * r0 ** 3 - number(row.published_value))).toBeLessThanOrEqual(number(row.tolerance))
  })
  one('R0->mass, Lambda=0', 'Local Group', () => {
    // Nothing here offers a universe without a cosmological constant. The mass that ours gives for the same radius is the larger, as it must be:
    // the constant helps a shell outwards, so that more mass is needed to have stopped it by now.
    expect(zeroVelocityMass() * 0.96 ** 3).toBeGreaterThan(1.29e12)
  })
  one('tidal index', 'LMC', (row) => expect(Math.abs(tidalTerm(5e10, distanceOf(18.477)) - number(row.published_value))).toBeLessThanOrEqual(number(row.tolerance)))
})

it('every row of the table is looked at', () => {
  expect([...rest].map((r) => `${r.kind ?? ''}: ${r.object ?? ''}`)).toEqual([])
})
