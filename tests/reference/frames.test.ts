/** Frames against tests/reference/frames.csv (astropy 5.2.1), and against the astropy that Debian ships, run live. */
import { execFileSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { convert } from '../../core/astro/frames.ts'
import { angleBetween, unitVector } from '../../core/astro/sphere.ts'
import { velocityCmb, velocityGsr, velocityLocalGroup } from '../../core/astro/velocities.ts'
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

  it('agree with the astropy of this machine on 10,000 random directions, and so do the velocities', () => {
    const draw = random(42)
    const sky = Array.from({ length: 10_000 }, () => ({ ra: 360 * draw.uniform(), dec: (Math.asin(2 * draw.uniform() - 1) * 180) / Math.PI, v: 1500 * draw.uniform() - 400 }))
    const script = `
import json, sys
import numpy as np
import astropy.units as u
from astropy.constants import c as light
from astropy.coordinates import SkyCoord, Galactocentric
sky = json.load(sys.stdin)
v = np.array([s["v"] for s in sky])
c = SkyCoord([s["ra"] for s in sky] * u.deg, [s["dec"] for s in sky] * u.deg)
g, s = c.galactic, c.supergalactic
unit = g.cartesian.xyz.value.T
sun = Galactocentric().galcen_v_sun.d_xyz.to_value(u.km / u.s)
towards = lambda l, b: SkyCoord(l * u.deg, b * u.deg, frame="galactic").cartesian.xyz.value
kms = light.to_value(u.km / u.s)
dipole = 369.82 * unit @ towards(264.021, 48.253)
json.dump({"l": list(g.l.deg), "b": list(g.b.deg), "sgl": list(s.sgl.deg), "sgb": list(s.sgb.deg),
  "gsr": list(v + unit @ sun), "lg": list(v + 316 * unit @ towards(93, -4)),
  "cmb": list(kms * ((1 + v / kms) * (1 + dipole / kms) - 1))}, sys.stdout)`
    const answer = JSON.parse(execFileSync('/usr/bin/python3', ['-c', script], { input: JSON.stringify(sky), encoding: 'utf8', maxBuffer: 2 ** 26 })) as Record<'l' | 'b' | 'sgl' | 'sgb' | 'gsr' | 'lg' | 'cmb', number[]>
    const worst = { galactic: 0, supergalactic: 0, gsr: 0, lg: 0, cmb: 0 }
    sky.forEach(({ ra, dec, v }, i) => {
      const galactic = convert(ra, dec, 'equatorial', 'galactic')
      const { lon, lat } = galactic
      const of = (key: keyof typeof answer): number => answer[key][i] ?? NaN
      worst.galactic = Math.max(worst.galactic, radiansApart(galactic, of('l'), of('b')))
      worst.supergalactic = Math.max(worst.supergalactic, radiansApart(convert(ra, dec, 'equatorial', 'supergalactic'), of('sgl'), of('sgb')))
      worst.gsr = Math.max(worst.gsr, Math.abs(velocityGsr(v, lon, lat) - of('gsr')))
      worst.lg = Math.max(worst.lg, Math.abs(velocityLocalGroup(v, lon, lat) - of('lg')))
      worst.cmb = Math.max(worst.cmb, Math.abs(velocityCmb(v, lon, lat) - of('cmb')))
    })
    process.stdout.write(`astropy on 10,000 directions, worst difference: Galactic ${worst.galactic.toExponential(1)} rad, supergalactic ${worst.supergalactic.toExponential(1)} rad; v_GSR ${worst.gsr.toExponential(1)}, v_LG ${worst.lg.toExponential(1)}, v_CMB ${worst.cmb.toExponential(1)} km/s\n`)
    expect(worst.galactic).toBeLessThan(1e-9)
    expect(worst.supergalactic).toBeLessThan(1e-9)
    expect(Math.max(worst.gsr, worst.lg, worst.cmb)).toBeLessThan(1e-5)
  }, 120_000)
})
