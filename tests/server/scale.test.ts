import { describe, expect, it } from 'vitest'
import type { ScaleAnswer, ScaleHistory } from '../../core/schema/scale.ts'
import { DEFAULT_ANCHORS } from '../../core/scale/anchors.ts'
import { DEFAULT_POLICY, type Policy } from '../../core/scale/policy.ts'
import type { Effect, SubmissionAnswer } from '../../core/schema/submissions.ts'
import { footprint, galaxyAdd, measurementAdd, modulus } from './desk/catalogue.ts'
import { useDesk } from './desk/desk.ts'
import type { Person } from './desk/desk.ts'

const desk = useDesk()

const LMC = 'lmc-modulus'
const TRGB = 'trgb-absolute-i'
const REASON = 'a newer word of the authors'

async function draft(author: Person, title: string, ...changes: unknown[]): Promise<SubmissionAnswer> {
  let submission = (await author.post('/api/submissions', { title })).ok<SubmissionAnswer>(201)
  for (const change of changes) submission = (await author.post(`/api/submissions/${submission.id}/changes`, change)).ok<SubmissionAnswer>(201)
  return submission
}

async function submit(author: Person, submission: SubmissionAnswer): Promise<SubmissionAnswer> {
  const fresh = (await author.get(`/api/submissions/${submission.id}`)).ok<SubmissionAnswer>(200)
  return (await author.post(`/api/submissions/${submission.id}/submit`, { lockVersion: fresh.lockVersion })).ok<SubmissionAnswer>(200)
}

const approve = (waiting: SubmissionAnswer) => desk().approver.post(`/api/submissions/${waiting.id}/approve`, { contentHash: waiting.contentHash, note: '' })

/** Approved, after every value of its effect has been compared with what came of it. */
async function approved(author: Person, title: string, ...changes: unknown[]): Promise<{ submission: SubmissionAnswer; effect: Effect }> {
  const waiting = await submit(author, await draft(author, title, ...changes))
  const effect = (await desk().approver.get(`/api/submissions/${waiting.id}/effect`)).ok<Effect>(200)
  const before = await rowsNow()
  const submission = (await approve(waiting)).ok<SubmissionAnswer>(200)
  const after = await rowsNow()
  for (const foretold of effect.galaxies) {
    for (const c of foretold.changes) expect([foretold.slug, c.column, after.get(foretold.slug)?.[c.column] ?? null]).toEqual([foretold.slug, c.column, c.after])
  }
  const told = new Set(effect.galaxies.map((g) => g.slug))
  for (const [slug, row] of after) if (!told.has(slug)) expect(row).toEqual(before.get(slug))
  return { submission, effect }
}

async function rowsNow(): Promise<Map<string, Record<string, unknown>>> {
  const { rows } = (await desk().knex.raw('SELECT * FROM catalogue_rows WHERE rev_to IS NULL')) as { rows: Record<string, unknown>[] }
  return new Map(rows.map((r) => [String(r['slug']), r]))
}

async function galaxy(designation: string, ra: number, dec: number, ...measurements: object[]): Promise<{ slug: string; measurements: number[] }> {
  const { curator, knex, ground } = desk()
  const made = await draft(curator, designation, galaxyAdd(designation, ra, dec))
  const added = made.items[0]?.id ?? 0
  for (const more of measurements) (await curator.post(`/api/submissions/${made.id}/changes`, measurementAdd({ change: added }, { ...modulus(ground.source), ...more }))).ok(201)
  const done = (await approve(await submit(curator, made))).ok<SubmissionAnswer>(200)
  const slug = done.items[0]?.galaxy?.slug ?? ''
  const held = (await knex('measurements as m').join('galaxyVersions as g', 'g.galaxy', 'm.galaxy').where('g.slug', slug).whereNull('m.revTo').whereNull('g.revTo').orderBy('m.lineage').select('m.lineage')) as { lineage: number }[]
  return { slug, measurements: held.map((m) => m.lineage) }
}

async function scale(at?: string | number): Promise<ScaleAnswer> {
  return (await desk().curator.get(`/api/scale${at === undefined ? '' : `?at=${at}`}`)).ok<ScaleAnswer>(200)
}

async function anchorSet(key: string, set: object): Promise<{ action: 'anchor.set'; payload: object }> {
  const now = (await scale()).anchors.find((a) => a.key === key) ?? DEFAULT_ANCHORS.find((a) => a.key === key)
  if (!now) throw new Error(`no anchor ${key}`)
  const { label, kind, methods, value, err, source } = now
  return { action: 'anchor.set', payload: { key, label, kind, methods, value, err, source, reason: REASON, ...set } }
}

async function policySet(change: (policy: Policy) => void): Promise<{ action: 'policy.set'; payload: { document: Policy; reason: string } }> {
  const document = structuredClone((await scale()).policy)
  change(document)
  return { action: 'policy.set', payload: { document, reason: REASON } }
}

const rule = (policy: Policy, key: string): Policy['methods'][number] => {
  const found = policy.methods.find((m) => m.method === key)
  if (!found) throw new Error(`no rule for ${key}`)
  return found
}

const adopted = async (slug: string): Promise<number> => Number((await rowsNow()).get(slug)?.['dm'])

describe('an anchor', () => {
  it('moves every distance that states which value it assumed, by just the difference, and the effect says so beforehand', async () => {
    const { steward } = desk()
    const stated = await galaxy('Corvane', 10, 10, { value: 28, anchor: TRGB, anchorValueAssumed: -4.05 })
    const silent = await galaxy('Delm', 12, 10, { value: 27 })
    const before = await scale()
    expect(before.anchors.find((a) => a.key === TRGB)).toMatchObject({ measurements: 1, unscaled: 1, galaxies: 2, since: 1 })
    expect(before.methods.find((m) => m.method === 'trgb')).toEqual({ method: 'trgb', measurements: 2, measurementsUsed: 2, galaxies: 2, galaxiesUsed: 2 })
    const [was, silentWas] = [await adopted(stated.slug), await adopted(silent.slug)]

    const { submission, effect } = await approved(steward, 'TRGB zero point', await anchorSet(TRGB, { value: -3.999 }))
    expect(effect.shifts.map((s) => [s.slug, Number((s.after - s.before).toFixed(6))])).toEqual([[stated.slug, -0.05]])
    expect(effect.counts).toMatchObject({ distancesMoved: 1, measurements: 0 })
    expect([await adopted(stated.slug), await adopted(silent.slug)]).toEqual([expect.closeTo(was - 0.05, 9), silentWas])
    expect(submission.items[0]).toMatchObject({
      subject: 'TRGB absolute I magnitude, value',
      diff: [{ field: 'Value', before: '−4.049\u00a0mag', after: '−3.999\u00a0mag' }, { field: 'Reason', before: null, after: REASON }],
    })

    expect((await scale()).anchors.find((a) => a.key === TRGB)).toMatchObject({ value: -3.999, since: submission.revision })
    expect((await scale((submission.revision ?? 0) - 1)).anchors.find((a) => a.key === TRGB)).toMatchObject({ value: -4.049, since: 1 })
    const { entries } = (await steward.get('/api/scale/history')).ok<ScaleHistory>(200)
    expect(entries[0]).toMatchObject({
      revision: submission.revision, submission: submission.id, summary: 'TRGB zero point', by: desk().approver.name,
      changes: [{ subject: 'TRGB absolute I magnitude', field: 'Value', before: '−4.049\u00a0mag', after: '−3.999\u00a0mag' }],
    })
    expect(entries.at(-1)).toMatchObject({ revision: 1, changes: expect.arrayContaining([{ subject: 'Adoption policy', field: 'Name', before: null, after: 'First policy' }]) as unknown })
    expect((await steward.get('/api/scale/history?at=1')).ok<ScaleHistory>(200).entries).toHaveLength(1)
  })

  it('can be added, and takes over the methods that another one gives up', async () => {
    const { curator } = desk()
    const miras = { key: 'mira-zero', label: 'Mira zero point', kind: 'absolute-magnitude', methods: ['miras'], value: -7.3, err: 0.05, source: 'Ansel et al. 2021', reason: REASON }
    const given = await anchorSet(LMC, { methods: ['cepheids', 'rr-lyrae', 'red-clump'] })
    const { submission } = await approved(curator, 'Miras on their own', given, { action: 'anchor.set', payload: miras })
    expect(submission.items[1]?.subject).toBe('Mira zero point, a new anchor')
    expect(submission.items[1]?.diff.map((d) => d.field)).toEqual(['Label', 'Kind', 'Methods', 'Value', 'Error', 'Source', 'Reason'])
    const now = await scale()
    expect(now.anchors.map((a) => [a.key, a.methods.includes('miras')])).toEqual([[LMC, false], ['mira-zero', true], [TRGB, false]])
  })

  it('is refused, field by field, where it cannot stand', async () => {
    const { curator, knex } = desk()
    const made = await draft(curator, 'Refused', await anchorSet(TRGB, { value: -4.1 }))
    const policy = await policySet((p) => { p.tension = 3.5 })
    const before = await footprint(knex)
    const add = { key: 'new-one', label: 'New one', kind: 'modulus', methods: ['sbf'], value: 31, err: 0.1, source: 'Ansel et al. 2021', reason: REASON }
    const table: [unknown, string, string][] = [
      [await anchorSet(LMC, {}), 'payload.value', 'holds these values already'],
      [await anchorSet(LMC, { kind: 'absolute-magnitude', value: -1 }), 'payload.kind', 'keeps its kind'],
      [await anchorSet(LMC, { methods: ['cepheids', 'trgb'] }), 'payload.methods.1', 'hangs on TRGB absolute I magnitude already'],
      [await anchorSet(LMC, { value: -18.5 }), 'payload.value', 'Check the value and its sign'],
      [await anchorSet(LMC, { value: 18.5, err: -1 }), 'payload.err', 'cannot be negative'],
      [await anchorSet(LMC, { value: 18.5, reason: '' }), 'payload.reason', 'Give the reason'],
      [await anchorSet(LMC, { methods: [] }), 'payload.methods', 'at least one method'],
      [await anchorSet(TRGB, { value: -4 }), 'payload.key', 'already sets the anchor'],
      [{ action: 'anchor.set', payload: { ...add, label: 'lmc distance MODULUS' } }, 'payload.label', 'Another anchor is called'],
      [{ action: 'anchor.set', payload: { ...add, key: 'Not A Key' } }, 'payload.key', 'small letters'],
      [galaxyAdd('Beside the scale', 1, 1), 'action', 'judged alone'],
      [{ ...policy, payload: { ...policy.payload, document: { ...policy.payload.document, methods: policy.payload.document.methods.slice(1) } } }, 'payload.document.methods', 'No rule for Detached eclipsing binaries'],
      [{ ...policy, payload: { ...policy.payload, document: { ...policy.payload.document, tension: 40 } } }, 'payload.document.tension', 'from 2 to 10'],
      [{ ...policy, payload: { ...policy.payload, document: (await scale()).policy } }, 'payload.document', 'says this already'],
    ]
    for (const [change, path, words] of table) {
      const refused = await curator.post(`/api/submissions/${made.id}/changes`, change)
      expect([path, refused.status, refused.problem().errors]).toEqual([path, 400, expect.arrayContaining([{ path, message: expect.stringContaining(words) as string }])])
    }
    expect(await footprint(knex)).toBe(before)
    const other = await draft(curator, 'Galaxies', galaxyAdd('Alone', 2, 2))
    const mixed = await curator.post(`/api/submissions/${other.id}/changes`, await anchorSet(LMC, { value: 18.5 }))
    expect([mixed.status, mixed.problem().errors]).toEqual([400, [{ path: 'action', message: expect.stringContaining('Begin another submission for the scale') as string }]])
  })

  it('set by two people conflicts where they differ, and keeps both where they do not', async () => {
    const { curator, otherCurator } = desk()
    const first = await draft(curator, 'One value', await anchorSet(TRGB, { value: -4.03, source: 'Ansel et al. 2021' }))
    const second = await submit(otherCurator, await draft(otherCurator, 'Another value', await anchorSet(TRGB, { value: -4.02 })))
    const third = await submit(otherCurator, await draft(otherCurator, 'Only the error', await anchorSet(TRGB, { err: 0.04 })))
    const open = (await otherCurator.get(`/api/submissions/${second.id}`)).ok<SubmissionAnswer>(200)
    expect(open.overlaps.map((o) => o.submission)).toEqual([third.id])
    const waiting = await submit(curator, first)
    ;(await approve(waiting)).ok(200)

    const late = await approve(second)
    expect([late.status, late.problem().conflicts]).toEqual([
      409,
      [{
        change: second.items[0]?.id, subject: 'TRGB absolute I magnitude, value', field: 'Value', base: '−3.999\u00a0mag', theirs: '−4.030\u00a0mag', yours: '−4.020\u00a0mag',
        by: curator.name, revision: expect.any(Number) as number,
      }],
    ])
    ;(await approve(third)).ok(200)
    expect((await scale()).anchors.find((a) => a.key === TRGB)).toMatchObject({ value: -4.03, err: 0.04, source: 'Ansel et al. 2021' })
  })

  it('cannot be approved with a method that another one claimed meanwhile', async () => {
    const { curator, otherCurator } = desk()
    const add = (key: string, label: string) => ({ action: 'anchor.set', payload: { key, label, kind: 'modulus', methods: ['sbf'], value: 31, err: 0.1, source: 'Ansel et al. 2021', reason: REASON } })
    const one = await submit(curator, await draft(curator, 'A', add('sbf-a', 'First of fluctuations')))
    const two = await submit(otherCurator, await draft(otherCurator, 'B', add('sbf-b', 'Second of fluctuations')))
    ;(await approve(one)).ok(200)
    const late = await approve(two)
    expect([late.status, late.problem().conflicts]).toEqual([409, [expect.objectContaining({ field: 'Methods', theirs: 'Surface-brightness fluctuations hangs on First of fluctuations' })]])
  })
})

describe('the policy', () => {
  it('is set leaf by leaf: what its effect foretold comes, and the words name each leaf', async () => {
    const { steward } = desk()
    const both = await galaxy('Esker', 30, 10, { value: 27.5 }, { value: 27.9, method: 'tully-fisher' })
    expect(await adopted(both.slug)).toBeCloseTo(27.5, 9)
    const { submission, effect } = await approved(steward, 'Tully–Fisher first', await policySet((p) => { rule(p, 'tully-fisher').tier = 1; p.host.sphere = 2 }))
    expect(submission.items[0]?.diff).toEqual([
      { field: 'Tully–Fisher: tier', before: '4', after: '1' },
      { field: 'Hosts: radius of the sphere', before: '1.5\u00a0R200', after: '2.0\u00a0R200' },
      { field: 'Reason', before: null, after: REASON },
    ])
    expect(effect.shifts.map((s) => s.slug)).toContain(both.slug)
    expect(await adopted(both.slug)).toBeGreaterThan(27.5)
    expect(rule((await scale()).policy, 'tully-fisher').tier).toBe(1)
    expect(DEFAULT_POLICY.host.sphere).toBe(1.5)
  })

  it('set by two people conflicts on the leaf that both moved, and keeps what only one moved', async () => {
    const { curator, otherCurator } = desk()
    const mine = await draft(curator, 'Sphere', await policySet((p) => { p.host.sphere = 1.4 }))
    const theirs = await submit(otherCurator, await draft(otherCurator, 'Sphere too', await policySet((p) => { p.host.sphere = 1.6; p.tension = 4 })))
    const aside = await submit(otherCurator, await draft(otherCurator, 'Mass ratio', await policySet((p) => { p.host.massRatio = 6 })))
    const waiting = await submit(curator, mine)
    expect((await curator.get(`/api/submissions/${mine.id}`)).ok<SubmissionAnswer>(200).overlaps.map((o) => o.submission).sort()).toEqual([theirs.id, aside.id].sort())
    ;(await approve(waiting)).ok(200)
    const late = await approve(theirs)
    expect([late.status, late.problem().conflicts]).toEqual([409, [expect.objectContaining({ field: 'Hosts: radius of the sphere', yours: '1.6\u00a0R200', theirs: '1.4\u00a0R200', by: curator.name })]])
    ;(await approve(aside)).ok(200)
    expect((await scale()).policy).toMatchObject({ tension: 3, host: { sphere: 1.4, massRatio: 6 } })
  })
})

describe('an override', () => {
  it('adopts the measurement that somebody chose, says why, and can be cleared', async () => {
    const { curator } = desk()
    const g = await galaxy('Fennimor', 50, 20, { value: 27 }, { value: 27.6, errPlus: 0.05, errMinus: 0.05 })
    const policyValue = await adopted(g.slug)
    const set = { action: 'override.set', payload: { galaxy: { slug: g.slug }, about: 'distance_modulus', choice: { measurements: [g.measurements[0]] }, reason: 'the other one is of a blend' } }
    const { submission, effect } = await approved(curator, 'Override', set)
    expect(effect.shifts.map((s) => s.slug)).toEqual([g.slug])
    expect(await adopted(g.slug)).toBeCloseTo(27, 9)
    expect(submission.items[0]).toMatchObject({
      subject: 'Fennimor, override of the distance modulus',
      diff: [{ field: 'Distance modulus', before: expect.stringContaining(', by the policy') as string, after: 'from Ansel et al. 2021 (27.000\u00a0±\u00a00.100\u00a0mag), by an override' }, { field: 'Reason', before: null, after: 'the other one is of a blend' }],
    })
    const excluded = await draft(curator, 'Exclude it')
    const refused = await curator.post(`/api/submissions/${excluded.id}/changes`, { action: 'measurement.exclude', payload: { measurementId: g.measurements[0], reason: 'blended' } })
    expect([refused.status, refused.problem().errors?.[0]?.message]).toEqual([400, expect.stringContaining('An override adopts the distance modulus from this measurement')])

    const cleared = await approved(curator, 'Clear', { action: 'override.clear', payload: { galaxy: { slug: g.slug }, about: 'distance_modulus', reason: 'it was no blend' } })
    expect(await adopted(g.slug)).toBe(policyValue)
    expect(cleared.submission.items[0]?.diff).toEqual([
      { field: 'Distance modulus', before: 'from Ansel et al. 2021 (27.000\u00a0±\u00a00.100\u00a0mag), by an override', after: 'by the policy' },
      { field: 'Reason so far', before: 'the other one is of a blend', after: null },
      { field: 'Reason', before: null, after: 'it was no blend' },
    ])
  })

  it('decides the host, or that there is none', async () => {
    const { curator, ground } = desk()
    const host = await galaxy('Grandis', 80, 30, { value: 27.5, errPlus: 0.02, errMinus: 0.02 }, { quantity: 'log_mstar', value: 10.8, unit: '', method: null, errPlus: 0.1, errMinus: 0.1 })
    const small = await galaxy('Grandis I', 80.5, 30.2, { value: 27.5, sourceId: ground.otherSource }, { quantity: 'log_mstar', value: 7, unit: '', method: null, errPlus: 0.1, errMinus: 0.1 })
    expect((await rowsNow()).get(small.slug)).toMatchObject({ host: host.slug })
    const choose = (choice: string | null, reason = 'its velocity says so') => ({ action: 'override.set', payload: { galaxy: { slug: small.slug }, about: 'host', choice: { host: choice }, reason } })
    const none = await approved(curator, 'No host', choose(null))
    expect((await rowsNow()).get(small.slug)).toMatchObject({ host: null, host_relation: 'field' })
    expect(none.effect.systems).toMatchObject([{ slug: host.slug, before: 1, after: 0, lost: ['Grandis I'] }])
    expect(none.submission.items[0]?.diff[0]).toEqual({ field: 'Host', before: 'Grandis, by the rule', after: 'none, by an override' })
    const shown = (await curator.get(`/api/galaxies/${small.slug}`)).ok<{ hostOverride: string | null }>(200)
    expect(shown.hostOverride).toBe('its velocity says so')
    const other = await galaxy('Hallam', 85, 30, { value: 27.6 }, { quantity: 'log_mstar', value: 9, unit: '', method: null, errPlus: 0.1, errMinus: 0.1 })
    await approved(curator, 'Another host', choose(other.slug))
    expect((await rowsNow()).get(small.slug)).toMatchObject({ host: other.slug, host_relation: 'satellite' })
    const back = await draft(curator, 'Round about')
    const loop = await curator.post(`/api/submissions/${back.id}/changes`, { action: 'override.set', payload: { galaxy: { slug: other.slug }, about: 'host', choice: { host: small.slug }, reason: 'why not' } })
    expect([loop.status, loop.problem().errors?.[0]?.message]).toEqual([400, expect.stringContaining('cannot host each other')])
    await approved(curator, 'By the rule again', { action: 'override.clear', payload: { galaxy: { slug: small.slug }, about: 'host', reason: 'the velocity was wrong' } })
    expect((await rowsNow()).get(small.slug)).toMatchObject({ host: host.slug })
  })

  it('is refused where it cannot stand', async () => {
    const { curator, knex } = desk()
    const g = await galaxy('Ivenor', 120, 5, { value: 27 }, { value: 28, limitFlag: 'lower' }, { value: 27.2, errPlus: 0.2, errMinus: 0.2 })
    const bare = await galaxy('Jasmund', 125, 5)
    const gone = await galaxy('Kelda', 126, 5, { value: 27 })
    await approved(curator, 'Kelda goes', { action: 'galaxy.amend', payload: { galaxy: { slug: gone.slug }, set: { status: 'withdrawn' }, reason: 'a plate flaw' } })
    await approved(curator, 'Exclude', { action: 'measurement.exclude', payload: { measurementId: g.measurements[2], reason: 'a blend.' } })
    const other = await galaxy('Lorn', 130, 5, { value: 27 })
    const made = await draft(curator, 'Refused overrides')
    const before = await footprint(knex)
    const set = (about: string, choice: unknown, slug = g.slug, reason = REASON) => ({ action: 'override.set', payload: { galaxy: { slug }, about, choice, reason } })
    const table: [unknown, string, string][] = [
      [set('distance_modulus', { measurements: [other.measurements[0]] }), 'payload.choice.measurements.0', 'holds no measurement'],
      [set('velocity', { measurements: [g.measurements[0]] }), 'payload.choice.measurements.0', 'is none of the heliocentric velocity'],
      [set('distance_modulus', { measurements: [g.measurements[0], g.measurements[1]] }), 'payload.choice.measurements.1', 'gives a limit'],
      [set('distance_modulus', { measurements: [g.measurements[2]] }), 'payload.choice.measurements.0', 'is excluded: a blend. Restore it first'],
      [set('distance_modulus', { host: null }), 'payload.choice', 'Choose the measurements'],
      [set('host', { measurements: [g.measurements[0]] }), 'payload.choice', 'Choose the host, or none'],
      [set('host', { host: g.slug }), 'payload.choice.host', 'its own host'],
      [set('host', { host: 'nowhere' }), 'payload.choice.host', 'no galaxy "nowhere"'],
      [set('host', { host: gone.slug }), 'payload.choice.host', 'is withdrawn'],
      [set('host', { host: bare.slug }), 'payload.choice.host', 'has no distance'],
      [set('host', { host: g.slug }, bare.slug), 'payload.galaxy.slug', 'has no distance'],
      [set('distance_modulus', { measurements: [g.measurements[0]] }, g.slug, ''), 'payload.reason', 'Give the reason'],
      [set('luck', { measurements: [1] }), 'payload.about', ''],
      [{ action: 'override.clear', payload: { galaxy: { slug: g.slug }, about: 'host', reason: REASON } }, 'payload.about', 'there is none to clear'],
      [{ action: 'measurement.restore', payload: { measurementId: g.measurements[0], reason: REASON } }, 'payload.measurementId', 'nothing to restore'],
      [{ action: 'measurement.restore', payload: { measurementId: 999_999, reason: REASON } }, 'payload.measurementId', 'holds no measurement'],
    ]
    for (const [change, path, words] of table) {
      const refused = await curator.post(`/api/submissions/${made.id}/changes`, change)
      expect([path, words, refused.status, refused.problem().errors]).toEqual([path, words, 400, expect.arrayContaining([{ path, message: expect.stringContaining(words) as string }])])
    }
    expect(await footprint(knex)).toBe(before)
    ;(await curator.post(`/api/submissions/${made.id}/changes`, set('distance_modulus', { measurements: [g.measurements[0]] }))).ok(201)
    const twice = await curator.post(`/api/submissions/${made.id}/changes`, set('distance_modulus', { measurements: [g.measurements[0]] }))
    expect([twice.status, twice.problem().errors?.[0]?.message]).toEqual([400, expect.stringContaining('already decides about the distance modulus of Ivenor')])
  })

  it('conflicts with another one made meanwhile, and with an exclusion of what it chose', async () => {
    const { curator, otherCurator } = desk()
    const g = await galaxy('Morwen', 150, 5, { value: 27 }, { value: 27.3 })
    const choose = (i: number) => ({ action: 'override.set', payload: { galaxy: { slug: g.slug }, about: 'distance_modulus', choice: { measurements: [g.measurements[i]] }, reason: REASON } })
    const one = await submit(curator, await draft(curator, 'First', choose(0)))
    const two = await submit(otherCurator, await draft(otherCurator, 'Second', choose(1)))
    const out = await submit(otherCurator, await draft(otherCurator, 'Out with it', { action: 'measurement.exclude', payload: { measurementId: g.measurements[0], reason: 'blended' } }))
    expect((await curator.get(`/api/submissions/${one.id}`)).ok<SubmissionAnswer>(200).overlaps.map((o) => o.submission).sort()).toEqual([two.id, out.id].sort())
    ;(await approve(one)).ok(200)
    const late = await approve(two)
    expect([late.status, late.problem().conflicts]).toEqual([409, [expect.objectContaining({ field: 'Override', base: 'no override', theirs: expect.stringContaining('27.000') as string, yours: expect.stringContaining('27.300') as string, by: curator.name })]])
    const excluding = await approve(out)
    expect([excluding.status, excluding.problem().conflicts]).toEqual([409, [expect.objectContaining({ field: 'Override', theirs: `an override adopts it: ${REASON}` })]])
  })
})

describe('an exclusion', () => {
  it('is taken back, and conflicts with nobody who took it back too', async () => {
    const { curator, otherCurator } = desk()
    const g = await galaxy('Nairn', 170, 5, { value: 27 }, { value: 27.4 })
    const both = await adopted(g.slug)
    await approved(curator, 'Out', { action: 'measurement.exclude', payload: { measurementId: g.measurements[1], reason: 'blended' } })
    expect(await adopted(g.slug)).toBeCloseTo(27, 9)
    const restore = { action: 'measurement.restore', payload: { measurementId: g.measurements[1], reason: 'it was another galaxy' } }
    const second = await submit(otherCurator, await draft(otherCurator, 'In again, too', restore))
    const { submission, effect } = await approved(curator, 'In again', restore)
    expect(effect.counts.measurements).toBe(1)
    expect(await adopted(g.slug)).toBeCloseTo(both, 12)
    expect(submission.items[0]).toMatchObject({
      subject: 'Nairn, distance modulus',
      diff: [
        { field: 'Measurement of Ansel et al. 2021', before: '27.400\u00a0±\u00a00.100\u00a0mag, excluded', after: '27.400\u00a0±\u00a00.100\u00a0mag' },
        { field: 'Excluded so far', before: 'blended', after: null },
        { field: 'Reason', before: null, after: 'it was another galaxy' },
      ],
    })
    expect((await approve(second)).ok<SubmissionAnswer>(200).state).toBe('approved')
  })
})

describe('permissions', () => {
  it('let curators propose and only others approve', async () => {
    const { curator, researcher, steward } = desk()
    const change = await anchorSet(LMC, { value: 18.5 })
    const made = await draft(curator, 'Who may', change)
    expect((await researcher.post(`/api/submissions/${made.id}/changes`, change)).status).toBe(403)
    expect((await researcher.get('/api/scale')).status).toBe(200)
    const waiting = await submit(curator, made)
    expect((await curator.post(`/api/submissions/${made.id}/approve`, { contentHash: waiting.contentHash, note: '' })).status).toBe(403)
    const own = await submit(steward, await draft(steward, 'Own', await anchorSet(LMC, { value: 18.49 })))
    expect((await steward.post(`/api/submissions/${own.id}/approve`, { contentHash: own.contentHash, note: '' })).status).toBe(403)
  })

  it('let an edited proposal be approved only as it stands', async () => {
    const { curator, approver } = desk()
    const waiting = await submit(curator, await draft(curator, 'Edited', await anchorSet(LMC, { value: 18.5 })))
    ;(await approver.post(`/api/submissions/${waiting.id}/return`, { contentHash: waiting.contentHash, note: 'which error?' })).ok(200)
    ;(await curator.patch(`/api/submissions/${waiting.id}/changes/${waiting.items[0]?.id}`, await anchorSet(LMC, { value: 18.5, err: 0.03 }))).ok(200)
    const again = await submit(curator, waiting)
    expect(again.contentHash).not.toBe(waiting.contentHash)
    expect((await approve(waiting)).status).toBe(409)
    expect((await approve(again)).status).toBe(200)
  })
})
