/** What the invented curator proposes: some of it sound, some with the slips that the automatic checks are there to find. */
import type { Knex } from 'knex'
import type { ChangeForm } from '../../core/schema/changes.ts'
import type { MeasurementForm } from '../../core/schema/measurement.ts'
import type { SubmissionState } from '../../core/schema/submissions.ts'

/** A change, or one made from the numbers of those before it. */
export type Proposed = ChangeForm | ((earlier: readonly number[]) => ChangeForm)

export interface Proposal {
  title: string
  summary: string
  becomes: SubmissionState
  changes: readonly Proposed[]
  /** The author's. */
  remark?: string
  /** The reviewer's, before deciding. */
  question?: string
  /** Of the decision. */
  note?: string
}

interface KnownGalaxy {
  slug: string
  name: string
  ra: number
  dec: number
  /** Adopted distance modulus, mag; distance, Mpc. */
  dm: number
  distance: number
  velocity: number | null
  nDistance: number
}

interface KnownMeasurement {
  id: number
  galaxy: string
  value: number
  source: number
  errPlus: number | null
}

/** In the order in which they are made: what is approved first is the ground for the rest. */
export async function proposals(knex: Knex, source: number): Promise<Proposal[]> {
  const known = (await knex('catalogueRows')
    .select('slug', 'name', 'ra', 'dec', 'dm', 'distance', 'nDistance', 'vHel as velocity')
    .whereNull('revTo').whereNotNull('host').whereNotNull('dm')
    .orderBy('slug')) as KnownGalaxy[]
  const near = known.filter((g) => g.distance < 4)
  const far = known.filter((g) => g.distance > 6.5)
  const moving = known.filter((g) => g.velocity !== null)
  const photographic = await measurementBy(knex, 'brightest-stars')
  const velocity = await velocityToMend(knex)
  const [a, b, c, d] = fourOf(near)
  const [slipped, bare] = fourOf(far)
  // Only where other good values stand can a bad one stand out.
  const [outlying] = fourOf(near.filter((g) => g.nDistance >= 2).slice(8))
  const [first, second] = fourOf(moving)
  const [twin] = fourOf(near.slice(4))
  const [, aliased, doubtful] = fourOf(near.slice(4))
  return [
    {
      title: 'Two old photographic distances go', becomes: 'approved',
      summary: 'Brightest-star distances from photographic plates, with errors of half a magnitude or none at all. Both galaxies have better ones.',
      changes: photographic.map((m) => ({ action: 'measurement.exclude', payload: { measurementId: m.id, reason: 'Brightest stars on photographic plates; superseded by resolved stars.' } })),
      note: 'Agreed: the adopted values do not hang on them.',
    },
    {
      title: `Velocity of ${first.name}`, becomes: 'returned',
      summary: 'A newer velocity from absorption lines.',
      changes: [add(first, velocityOf(first, source, 1.5))],
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
      title: 'Three more satellites, from table 5', becomes: 'submitted',
      summary: 'Three more rows of the same paper, typed in a hurry.',
      changes: [
        // The paper's megaparsecs, entered as kiloparsecs.
        add(slipped, { ...modulus(slipped, source, 0), value: Number(slipped.distance.toFixed(2)), unit: 'kpc', errPlus: 0.4, errMinus: 0.4, errSys: null, locator: 'table 5, row 1' }),
        add(outlying, { ...modulus(outlying, source, 0.78), errPlus: 0.08, errMinus: 0.08, locator: 'table 5, row 2' }),
        add(bare, { ...modulus(bare, source, 0.04), anchor: null, anchorValueAssumed: null, locator: 'table 5, row 3' }),
      ],
    },
    {
      title: 'Two new candidates', becomes: 'submitted',
      summary: 'Overdensities of red giants in the survey’s second release. Membership is open until somebody measures velocities.',
      changes: [
        { action: 'galaxy.add', payload: { designation: 'Candidate 26A', ra: turned(twin.ra + 1.3), dec: twin.dec, class: 'ultra-faint', status: 'candidate', names: ['Demo Overdensity 7'] } },
        { action: 'galaxy.add', payload: { designation: 'Candidate 26B', ra: turned(twin.ra + 0.008), dec: twin.dec, class: 'ultra-faint', status: 'candidate' } },
        (earlier) => add({ change: earlier[0] ?? 0 }, { ...modulus(twin, source, 0.1), errPlus: 0.15, errMinus: 0.15 }),
      ],
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
      changes: velocity === undefined ? [] : [{
        action: 'measurement.replace',
        payload: {
          measurementId: velocity.id, reason: 'The last digit was misread.',
          measurement: { quantity: 'velocity', value: Number((velocity.value + 4).toFixed(1)), errPlus: velocity.errPlus, errMinus: velocity.errPlus, unit: 'km/s', sourceId: velocity.source, locator: 'table 2' },
        },
      }],
    },
  ]
}

function add(galaxy: { slug: string } | { change: number }, measurement: MeasurementForm): ChangeForm {
  return { action: 'measurement.add', payload: { galaxy: 'slug' in galaxy ? { slug: galaxy.slug } : galaxy, measurement } }
}

/** @param off - from what is adopted, mag */
function modulus(g: KnownGalaxy, sourceId: number, off: number): MeasurementForm {
  return { quantity: 'distance_modulus', value: Number((g.dm + off).toFixed(2)), errPlus: 0.07, errMinus: 0.07, errSys: 0.05, unit: 'mag', method: 'trgb', anchor: 'trgb-absolute-i', anchorValueAssumed: -4.049, sourceId }
}

/** @param off - from what is adopted, km/s */
function velocityOf(g: KnownGalaxy, sourceId: number, off: number): MeasurementForm {
  return { quantity: 'velocity', value: Number(((g.velocity ?? 0) + off).toFixed(1)), errPlus: 2.5, errMinus: 2.5, unit: 'km/s', sourceId, locator: 'table 2' }
}

const turned = (ra: number): number => Number((ra % 360).toFixed(4))

function fourOf(list: readonly KnownGalaxy[]): [KnownGalaxy, KnownGalaxy, KnownGalaxy, KnownGalaxy] {
  const [a, b, c, d] = list
  if (!a || !b || !c || !d) throw new RangeError(`the invented neighbourhood is too small for the desk: ${list.length} of a kind`)
  return [a, b, c, d]
}

const MEASURED = ['m.id', 'r.slug as galaxy', 'm.value', 'm.source', 'm.errPlus']

/** Two measurements by a method, of galaxies that have others. */
async function measurementBy(knex: Knex, method: string): Promise<KnownMeasurement[]> {
  return (await knex('measurements as m')
    .join('catalogueRows as r', (on) => void on.on('r.galaxy', 'm.galaxy').onNull('r.revTo'))
    .select(MEASURED)
    .whereNull('m.revTo').where('m.method', method).where('r.nDistanceAll', '>=', 2)
    .orderBy([{ column: 'm.errPlus', order: 'desc', nulls: 'first' }, { column: 'm.id' }]).limit(2)) as KnownMeasurement[]
}

async function velocityToMend(knex: Knex): Promise<KnownMeasurement | undefined> {
  return (await knex('measurements as m')
    .join('catalogueRows as r', (on) => void on.on('r.galaxy', 'm.galaxy').onNull('r.revTo'))
    .select(MEASURED)
    .whereNull('m.revTo').where('m.quantity', 'velocity').whereNotNull('r.host').whereNotNull('m.errPlus')
    .orderBy('m.id').first()) as KnownMeasurement | undefined
}
