/** What the invented curator proposes: the sound part of it. The rest is in faulty-proposals.ts. */
import type { Knex } from 'knex'
import { doublyMeasured, fourOf, knownSatellites, measurementsBy, velocitiesHeld } from './known.ts'
import { faultyProposals } from './faulty-proposals.ts'
import { add, modulus, velocityForm, type Proposal } from './proposal.ts'

/** In the order in which they are made: what is approved first is the ground for the rest. */
export async function proposals(knex: Knex, source: number): Promise<Proposal[]> {
  const known = await knownSatellites(knex)
  const near = known.filter((g) => g.distance < 4)
  const photographic = await measurementsBy(knex, 'brightest-stars')
  const [velocity] = await velocitiesHeld(knex, 1)
  const twice = await doublyMeasured(knex)
  const [a, b, c, d] = fourOf(near)
  const [first, second] = fourOf(known.filter((g) => g.velocity !== null))
  const [, aliased, doubtful] = fourOf(near.slice(4))
  if (!velocity) throw new RangeError('the invented neighbourhood has no velocity')
  return [
    {
      title: `Which tip of ${twice.name} to believe`, becomes: 'approved',
      summary: 'The fainter of the two tips is that of the disc behind it, as the colour-magnitude diagram shows. Both values stay; one is adopted.',
      changes: [{ action: 'override.set', payload: { galaxy: { slug: twice.galaxy }, about: 'distance_modulus', choice: { measurements: [twice.id] }, reason: 'The other tip is contaminated by the disc behind.' } }],
      note: 'Agreed, having looked at the diagram.',
    },
    {
      title: 'Two old photographic distances go', becomes: 'approved',
      summary: 'Brightest-star distances from photographic plates, with errors of half a magnitude or none at all. Both galaxies have better ones.',
      changes: photographic.map((m) => ({ action: 'measurement.exclude', payload: { measurementId: m.id, reason: 'Brightest stars on photographic plates; superseded by resolved stars.' } })),
      note: 'Agreed: the adopted values do not hang on them.',
    },
    {
      title: `Velocity of ${first.name}`, becomes: 'returned',
      summary: 'A newer velocity from absorption lines.',
      changes: [add(first, velocityForm((first.velocity ?? 0) + 1.5, source))],
      note: 'The paper’s table 2 gives velocities relative to the Local Group, not heliocentric ones. Please look at the caption and convert.',
      remark: 'Typed from table 2.',
    },
    {
      title: `Distance of ${second.name} from a poster`, becomes: 'rejected',
      summary: 'Seen at a meeting; the paper is said to follow.',
      changes: [add(second, { ...modulus(second, source, 0.05), method: 'trgb', note: 'From a poster.' })],
      note: 'No publication that a reader could look up. Submit it when the paper is out.',
    },
    {
      title: `${first.name} and ${second.name} once more`, becomes: 'withdrawn',
      summary: 'The same table, entered twice by mistake.',
      changes: [add(first, modulus(first, source, -0.02)), add(second, modulus(second, source, 0.04))],
      remark: 'I will withdraw this: the values are in another submission.',
    },
    {
      title: `TRGB distances of four satellites`, becomes: 'submitted',
      summary: 'Table 3 of the new paper: tips of the red giant branch of four faint satellites, all on the anchor value −4.01. Converted by the catalogue to its own.',
      changes: [a, b, c, d].map((g, i) => add(g, { ...modulus(g, source, [0.03, -0.05, 0.06, -0.02][i] ?? 0), anchor: 'trgb-absolute-i', anchorValueAssumed: -4.01, locator: `table 3, row ${String(i + 1)}` })),
      remark: 'The errors in table 3 are statistical only; the paper gives 0.05 mag of systematic error in the text, entered with each value.',
      question: 'Thank you. I shall look at the colours of the second one before deciding.',
    },
    {
      title: `${aliased.name}: another name, and a class`, becomes: 'draft',
      summary: 'The survey’s second release lists it under its own number.',
      changes: [
        { action: 'name.add', payload: { galaxy: { slug: aliased.slug }, name: 'Demo Overdensity 3', sourceId: source } },
        { action: 'galaxy.amend', payload: { galaxy: { slug: doubtful.slug }, set: { class: 'transition' }, reason: 'Gas and no young stars, according to the new paper.' } },
      ],
    },
    {
      title: 'A slip in a velocity', becomes: 'draft',
      summary: '',
      changes: [{
        action: 'measurement.replace',
        payload: {
          measurementId: velocity.id, reason: 'The last digit was misread.',
          measurement: { quantity: 'velocity', value: Number((velocity.value + 3.3).toFixed(1)), errPlus: velocity.errPlus, errMinus: velocity.errPlus, unit: 'km/s', sourceId: velocity.source, locator: 'table 2' },
        },
      }],
    },
    ...(await faultyProposals(knex, source)),
    {
      title: 'A newer zero point of the tip', becomes: 'submitted',
      summary: 'Three geometric calibrations of the last two years agree on a tip 0.02 mag fainter than ours. All TRGB distances would shrink by 0.9 %.',
      changes: [{
        action: 'anchor.set',
        payload: {
          key: 'trgb-absolute-i', label: 'TRGB absolute I magnitude', kind: 'absolute-magnitude', methods: ['trgb'], value: -4.029, err: 0.03, source: 'Mean of three invented calibrations, 2025 and 2026',
          reason: 'Three independent calibrations agree; the old error was generous.',
        },
      }],
      remark: 'Please look at the plot of the effect before deciding: a few satellites change host.',
    },
  ]
}
