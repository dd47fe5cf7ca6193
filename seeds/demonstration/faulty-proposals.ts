/** What the invented curator proposes in a hurry: each slip stands in faults.ts, with the check that finds it. */
import type { Knex } from 'knex'
import { roundedDesignation } from './rounded-designation.ts'
import { CANDIDATES, HURRY, OWN_SCALE, VELOCITIES } from './faults.ts'
import { fourOf, knownSatellites, velocitiesHeld } from './known.ts'
import { add, modulus, printed, turned, velocityForm, type Proposal } from './proposal.ts'

export async function faultyProposals(knex: Knex, source: number): Promise<Proposal[]> {
  const known = await knownSatellites(knex)
  const far = known.filter((g) => g.distance > 6.5 && g.method === 'trgb')
  const near = known.filter((g) => g.distance < 4)
  // Only where another good value by the same method stands can a bad one stand out.
  const tips = near.filter((g) => g.method === 'trgb' && g.nDistance === 1)
  const [slipped, bare, precise] = fourOf(far)
  const [outlying] = fourOf(tips.slice(8))
  const [twin] = fourOf(near.slice(4))
  const shifted = fourOf(tips.slice(12))
  const moving = known.filter((g) => Math.abs(g.velocity ?? 0) > 120)
  const [lost, wrong, doubled, next] = fourOf(moving.slice(12))
  const [entered] = await velocitiesHeld(knex, 1)
  if (!entered) throw new RangeError('the invented neighbourhood has no velocity')
  const candidate = { ra: turned(twin.ra + 2.4), dec: printed(twin.dec * 0.98) }
  return [
    {
      title: HURRY, becomes: 'submitted',
      summary: 'Four more rows of the same paper, typed in a hurry.',
      changes: [
        add(slipped, { ...modulus(slipped, source, 0), value: Number(slipped.distance.toFixed(2)), unit: 'kpc', errPlus: 0.4, errMinus: 0.4, errSys: null, locator: 'table 5, row 1' }),
        add(outlying, { ...modulus(outlying, source, 0.78), errPlus: 0.08, errMinus: 0.08, locator: 'table 5, row 2' }),
        add(bare, { ...modulus(bare, source, 0.04), anchor: null, anchorValueAssumed: null, locator: 'table 5, row 3' }),
        add(precise, { ...modulus(precise, source, 0.02), errPlus: 0.0007, errMinus: 0.0007, locator: 'table 5, row 4' }),
      ],
    },
    {
      title: CANDIDATES, becomes: 'submitted',
      summary: 'Overdensities of red giants in the survey’s second release. Membership is open until somebody measures velocities.',
      changes: [
        { action: 'galaxy.add', payload: { designation: 'Candidate 26A', ra: turned(twin.ra + 1.3), dec: printed(twin.dec), class: 'ultra-faint', status: 'candidate', names: ['Demo Overdensity 7'] } },
        { action: 'galaxy.add', payload: { designation: 'Candidate 26B', ra: turned(twin.ra + 0.008), dec: printed(twin.dec), class: 'ultra-faint', status: 'candidate' } },
        (earlier) => add({ change: earlier[0] ?? 0 }, { ...modulus(twin, source, 0.1), errPlus: 0.15, errMinus: 0.15 }),
        { action: 'galaxy.add', payload: { designation: roundedDesignation('Demo', candidate.ra, candidate.dec), ...candidate, class: 'dwarf-irregular', status: 'candidate' } },
        (earlier) => add({ change: earlier[1] ?? 0 }, { ...modulus(twin, source, 0.06), errPlus: 0.2, errMinus: 0.2 }),
      ],
    },
    {
      title: OWN_SCALE, becomes: 'submitted',
      summary: 'A careful paper, on a zero point of its own.',
      changes: shifted.map((g, i) => add(g, { ...modulus(g, source, 0.6), anchor: null, anchorValueAssumed: null, locator: `table 1, row ${i + 1}` })),
    },
    {
      title: VELOCITIES, becomes: 'draft',
      summary: '',
      changes: [
        add(lost, velocityForm(-(lost.velocity ?? 0), source, 'table 4, row 1')),
        add(wrong, velocityForm((wrong.velocity ?? 0) + 1000, source, 'table 4, row 2')),
        add(doubled, velocityForm(next.velocity ?? 0, source, 'table 4, row 3')),
        add(next, velocityForm(next.velocity ?? 0, source, 'table 4, row 4')),
        add({ slug: entered.galaxy }, { ...velocityForm(entered.value, entered.source, 'table 2'), errPlus: entered.errPlus, errMinus: entered.errPlus }),
      ],
    },
  ]
}
