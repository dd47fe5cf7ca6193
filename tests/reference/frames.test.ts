/** Frames against tests/reference/frames.csv (astropy 5.2.1), and against the astropy that Debian ships, run live. */
import { execFileSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { convert } from '../../core/astro/frames.ts'
import { angleBetween, unitVector } from '../../core/astro/sphere.ts'
import { velocityGsr } from '../../core/astro/velocities.ts'
import { random } from '../../core/random.ts'
import { table } from './published-sample.ts'

const rows = table('frames.csv')
const radiansApart = (a: { lon: number; lat: number }, lon: number, lat: number): number => angleBetween(unitVector(a.lon, a.lat), unitVector(lon, lat))
const MAS = Math.PI / 180 / 3600_000

describe('frames', () => {
  it('agree with astropy to 1e-9 rad in every row', () => {
    expect(rows.length).toBeGreaterThan(70)
    for (const r of rows) {
      const galactic = convert(Number(r.ra_deg), Number(r.dec_deg), 'equatorial', 'galactic')
      const supergalactic = convert(Number(r.ra_deg), Number(r.dec_deg), 'equatorial', 'supergalactic')
      expect(radiansApart(galactic, Number(r.l_deg), Number(r.b_deg)), r.name).toBeLessThan(1e-9)
      expect(radiansApart(supergalactic, Number(r.sgl_deg), Number(r.sgb_deg)), r.name).toBeLessThan(1e-9)
    }
  })

  it('differ from the Hipparcos convention by less than 25 mas, and not by nothing', () => {
    const apart = rows.map((r) => radiansApart(convert(Number(r.ra_deg), Number(r.dec_deg), 'equatorial', 'galactic'), Number(r.l_erfa_deg), Number(r.b_erfa_deg)) / MAS)
    expect(Math.max(...apart)).toBeLessThan(25)
    expect(Math.max(...apart)).toBeGreaterThan(20)
  })

  it('agree with the astropy of this machine on 200 random directions, and so does v_GSR', () => {
    const draw = random(42)
    const sky = Array.from({ length: 200 }, () => [360 * draw.uniform(), (Math.asin(2 * draw.uniform() - 1) * 180) / Math.PI] as const)
    const script = `
import json, sys
import astropy.units as u
from astropy.coordinates import SkyCoord, Galactocentric
sky = json.load(sys.stdin)
c = SkyCoord([s[0] for s in sky] * u.deg, [s[1] for s in sky] * u.deg)
g, s = c.galactic, c.supergalactic
sun = Galactocentric().galcen_v_sun.d_xyz.to_value(u.km / u.s)
unit = g.cartesian.xyz.value
json.dump({"l": list(g.l.deg), "b": list(g.b.deg), "sgl": list(s.sgl.deg), "sgb": list(s.sgb.deg), "gsr": [float(sum(sun[k] * unit[k][i] for k in range(3))) for i in range(len(sky))]}, sys.stdout)`
    const answer = JSON.parse(execFileSync('/usr/bin/python3', ['-c', script], { input: JSON.stringify(sky), encoding: 'utf8' })) as Record<'l' | 'b' | 'sgl' | 'sgb' | 'gsr', number[]>
    sky.forEach(([ra, dec], i) => {
      const galactic = convert(ra, dec, 'equatorial', 'galactic')
      expect(radiansApart(galactic, answer.l[i] ?? NaN, answer.b[i] ?? NaN)).toBeLessThan(1e-9)
      expect(radiansApart(convert(ra, dec, 'equatorial', 'supergalactic'), answer.sgl[i] ?? NaN, answer.sgb[i] ?? NaN)).toBeLessThan(1e-9)
      expect(velocityGsr(100, galactic.lon, galactic.lat) - 100).toBeCloseTo(answer.gsr[i] ?? NaN, 6)
    })
  }, 60_000)
})
