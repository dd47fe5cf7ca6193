import { describe, expect, it } from 'vitest'
import type { Effect, SubmissionAnswer } from '../../core/schema/submissions.ts'
import { footprint, galaxyAdd, measurementAdd, modulus } from './desk/catalogue.ts'
import { useDesk } from './desk/desk.ts'
import type { Person } from './desk/desk.ts'

const desk = useDesk()

/** A draft with these changes, by this person. */
async function draft(author: Person, title: string, changes: readonly unknown[]): Promise<SubmissionAnswer> {
  let submission = (await author.post('/api/submissions', { title })).ok<SubmissionAnswer>(201)
  for (const change of changes) submission = (await author.post(`/api/submissions/${submission.id}/changes`, change)).ok<SubmissionAnswer>(201)
  return submission
}

async function submit(author: Person, submission: SubmissionAnswer): Promise<SubmissionAnswer> {
  return (await author.post(`/api/submissions/${submission.id}/submit`, { lockVersion: submission.lockVersion })).ok<SubmissionAnswer>(200)
}

const verdict = (reviewer: Person, submission: SubmissionAnswer, event = 'approve', note = '') =>
  reviewer.post(`/api/submissions/${submission.id}/${event}`, { contentHash: submission.contentHash, note })

/** A galaxy of the catalogue with these distance moduli. */
async function galaxy(designation: string, moduli: readonly number[] = [], ra = 10, dec = 20): Promise<{ slug: string; measurements: number[] }> {
  const { curator, approver, ground, knex } = desk()
  let submission = await draft(curator, designation, [galaxyAdd(designation, ra, dec)])
  for (const value of moduli) {
    const change = measurementAdd({ change: submission.items[0]?.id ?? 0 }, modulus(ground.source, value))
    submission = (await curator.post(`/api/submissions/${submission.id}/changes`, change)).ok<SubmissionAnswer>(201)
  }
  const approved = (await verdict(approver, await submit(curator, submission))).ok<SubmissionAnswer>(200)
  const slug = approved.items[0]?.galaxy?.slug ?? ''
  const held = (await knex('measurements as m').join('galaxyVersions as g', 'g.galaxy', 'm.galaxy').where('g.slug', slug).whereNull('m.revTo').whereNull('g.revTo').orderBy('m.lineage').select('m.lineage')) as { lineage: number }[]
  return { slug, measurements: held.map((m) => m.lineage) }
}

/** Every value that the effect foretold, against the row that stands. */
async function expectForetold(effect: Effect): Promise<void> {
  const { knex } = desk()
  expect(effect.galaxies.length).toBeGreaterThan(0)
  for (const foretold of effect.galaxies) {
    const { rows } = (await knex.raw('SELECT * FROM catalogue_rows WHERE rev_to IS NULL AND slug = ?', [foretold.slug])) as { rows: Record<string, unknown>[] }
    for (const change of foretold.changes) expect([foretold.slug, change.column, rows[0]?.[change.column] ?? null]).toEqual([foretold.slug, change.column, change.after])
  }
}

describe('approval', () => {
  it('does exactly what its effect foretold, value by value, in one revision', async () => {
    const { curator, approver, ground, knex } = desk()
    const host = await galaxy('Ostrel', [27.4], 40, 5)
    const before = (await knex('revisions').max('number as n').first()) as { n: number }
    let submission = await draft(curator, 'Everything at once', [
      galaxyAdd('Ostrel IX', 40.3, 5.1),
      { action: 'galaxy.amend', payload: { galaxy: { slug: host.slug }, set: { class: 'spiral', note: 'A grand design' }, reason: 'seen anew' } },
      { action: 'name.add', payload: { galaxy: { slug: host.slug }, name: 'Marl 7' } },
      measurementAdd({ slug: host.slug }, modulus(ground.otherSource, 27.6)),
      measurementAdd({ slug: host.slug }, { quantity: 'log_mstar', value: 4e10, errPlus: 1e10, errMinus: 1e10, unit: 'Msun', sourceId: ground.source }),
      { action: 'measurement.replace', payload: { measurementId: host.measurements[0], reason: 'a slip of the key', measurement: modulus(ground.source, 27.45) } },
    ])
    const added = submission.items[0]?.id ?? 0
    submission = (await curator.post(`/api/submissions/${submission.id}/changes`, measurementAdd({ change: added }, modulus(ground.source, 3.11, { unit: 'Mpc', errPlus: 0.1, errMinus: 0.1 })))).ok(201)
    const waiting = await submit(curator, submission)
    const effect = (await approver.get(`/api/submissions/${waiting.id}/effect`)).ok<Effect>(200)
    expect(effect).toMatchObject({ revision: before.n, contentHash: waiting.contentHash, counts: { galaxiesAdded: 1, measurements: 4 } })

    const approved = (await verdict(approver, waiting, 'approve', 'Well done')).ok<SubmissionAnswer>(200)
    expect(approved).toMatchObject({ state: 'approved', revision: before.n + 1, decisionNote: 'Well done', decidedBy: approver.name })
    const audited = (await knex('auditLog').where({ subject: `submission:${waiting.id}` }).orderBy('id').select('actor', 'action')) as unknown[]
    expect(audited).toEqual([{ actor: curator.id, action: 'submission.submit' }, { actor: approver.id, action: 'submission.approve' }])
    await expectForetold(effect)
    const changed = (await knex.raw('SELECT slug FROM catalogue_rows WHERE rev_from = ? ORDER BY slug', [before.n + 1])) as { rows: { slug: string }[] }
    expect(effect.galaxies.map((g) => g.slug).sort()).toEqual(changed.rows.map((r) => r.slug))
    const names = (await knex('galaxyNames').where({ revFrom: before.n + 1 }).orderBy('name').select('name', 'nameKey', 'preferred')) as unknown[]
    expect(names).toEqual([{ name: 'Marl 7', nameKey: 'marl7', preferred: false }, { name: 'Ostrel IX', nameKey: 'ostrelix', preferred: true }])
    const [mpc] = (await knex('measurements').where({ revFrom: before.n + 1 }).whereRaw(`published ->> 'unit' = 'Mpc'`)) as { value: number; published: unknown; errPlus: number; errMinus: number }[]
    expect(mpc?.value).toBeCloseTo(5 * Math.log10(3.11) + 25, 12)
    expect(mpc?.errMinus).toBeGreaterThan(mpc?.errPlus ?? 1)
    expect(mpc?.published).toEqual({ value: 3.11, errPlus: 0.1, errMinus: 0.1, errSys: null, unit: 'Mpc' })
  })

  it('leaves no trace of the effect shown', async () => {
    const { curator, ground, knex } = desk()
    const { slug } = await galaxy('Untouched')
    const submission = await draft(curator, 'Only looking', [measurementAdd({ slug }, modulus(ground.source))])
    const before = await footprint(knex)
    ;(await curator.get(`/api/submissions/${submission.id}/effect`)).ok(200)
    expect(await footprint(knex)).toBe(before)
  })

  it('succeeds once, however often it is asked for at the same time', async () => {
    const { curator, approver, steward, ground, knex } = desk()
    const { slug } = await galaxy('Once')
    const waiting = await submit(curator, await draft(curator, 'Once only', [measurementAdd({ slug }, modulus(ground.source))]))
    const answers = await Promise.all(Array.from({ length: 20 }, (_, i) => verdict(i % 2 === 0 ? approver : steward, waiting)))
    expect(answers.map((a) => a.status).sort()).toEqual([200, ...Array.from({ length: 19 }, () => 409)])
    expect(await knex('revisions').where({ submission: waiting.id })).toHaveLength(1)
    expect(await knex('reviews').where({ submission: waiting.id })).toHaveLength(1)
  })

  it('puts approvals of one galaxy one after the other and loses none', async () => {
    const { curator, approver, steward, ground, knex } = desk()
    const { slug } = await galaxy('Popular')
    const waiting: SubmissionAnswer[] = []
    for (let i = 0; i < 8; i += 1) waiting.push(await submit(curator, await draft(curator, `Number ${i}`, [measurementAdd({ slug }, modulus(ground.source, 27 + i / 100))])))
    const answers = await Promise.all(waiting.map((s, i) => verdict(i % 2 === 0 ? approver : steward, s)))
    const revisions = answers.map((a) => a.ok<SubmissionAnswer>(200).revision ?? 0).sort((a, b) => a - b)
    expect(revisions).toEqual(revisions.map((_, i) => (revisions[0] ?? 0) + i))
    const row = (await knex('catalogueRows').where({ slug }).whereNull('revTo').first()) as { nMeasurements: number; nDistance: number; revision: number }
    expect(row).toMatchObject({ nMeasurements: 8, nDistance: 8, revision: revisions.at(-1) })
    // Each version of the row holds exactly where the next one begins.
    const versions = (await knex('catalogueRows').where({ slug }).orderBy('revFrom').select('revFrom', 'revTo')) as { revFrom: number; revTo: number | null }[]
    versions.forEach((v, i) => expect(v.revTo).toBe(versions[i + 1]?.revFrom ?? null))
  })

  it('leaves nothing behind when the database connection is cut in the middle', async () => {
    const { curator, approver, ground, knex } = desk()
    const { slug } = await galaxy('Cut off')
    const waiting = await submit(curator, await draft(curator, 'Cut off', [measurementAdd({ slug }, modulus(ground.source))]))
    const before = await footprint(knex)
    const blocker = await knex.transaction()
    await blocker.raw('LOCK TABLE reviews IN ACCESS EXCLUSIVE MODE')
    const asked = verdict(approver, waiting)
    let cut = 0
    for (let i = 0; i < 400 && cut === 0; i += 1) {
      await new Promise((done) => setTimeout(done, 30))
      const { rows } = (await knex.raw(
        `SELECT pid FROM pg_stat_activity WHERE datname = current_database() AND pid <> pg_backend_pid() AND wait_event_type = 'Lock' AND query LIKE '%insert into "reviews"%'`,
      )) as { rows: { pid: number }[] }
      for (const { pid } of rows) {
        await knex.raw('SELECT pg_terminate_backend(?)', [pid])
        cut += 1
      }
    }
    await blocker.rollback()
    expect(cut).toBe(1)
    expect((await asked).status).toBeGreaterThanOrEqual(500)
    expect(await footprint(knex)).toBe(before)
    ;(await verdict(approver, waiting)).ok(200)
  })

  it('takes six hundred changes in one go', async () => {
    const { curator, approver, ground, knex } = desk()
    const { id } = await draft(curator, 'A large one', [])
    const adds = Array.from({ length: 200 }, (_, i) => ({ designation: `Large ${i}`, ra: (i * 1.7) % 360, dec: (i % 120) - 60, class: 'unknown', status: 'confirmed', note: null, names: [] }))
    const first = (await knex('changes')
      .insert(adds.map((payload, i) => ({ submission: id, position: i + 1, action: 'galaxy.add', payload })))
      .returning('id')) as { id: number }[]
    const values = first.flatMap(({ id: change }, i) =>
      [0, 1].map((k) => ({ submission: id, position: 201 + 2 * i + k, action: 'measurement.add', payload: { galaxy: { change }, measurement: { ...fullModulus(ground.source, 26 + (i % 40) / 10 + k / 10) } } })),
    )
    await knex('changes').insert(values)
    const waiting = await submit(curator, (await curator.get(`/api/submissions/${id}`)).ok(200))
    const begun = performance.now()
    ;(await verdict(approver, waiting)).ok(200)
    expect(performance.now() - begun).toBeLessThan(8000)
    expect(await knex('catalogueRows').whereLike('slug', 'large-%').whereNull('revTo')).toHaveLength(200)
  })
})

const fullModulus = (sourceId: number, value: number) => ({
  quantity: 'distance_modulus', value, errPlus: 0.1, errMinus: 0.1, errSys: null, unit: 'mag', textValue: null, limitFlag: null, method: 'trgb', anchor: null,
  anchorValueAssumed: null, convention: null, sourceId, locator: null, note: null, supersedes: null,
})

describe('a review', () => {
  it('is refused to author and editors, by every path and whatever their role', async () => {
    const { approver, steward, otherApprover, ground, knex } = desk()
    const { slug } = await galaxy('Nobody decides alone')
    for (const author of [approver, steward]) {
      const own = await submit(author, await draft(author, 'Mine', [measurementAdd({ slug }, modulus(ground.source, 27 + author.id / 100))]))
      expect(own).toMatchObject({ may: { review: false }, mayNot: expect.stringContaining('your own submission') as string })
      const before = await footprint(knex)
      for (const event of ['approve', 'return', 'reject']) {
        const refused = await verdict(author, own, event, 'let me')
        expect([event, refused.status, refused.problem().detail]).toEqual([event, 403, expect.stringContaining('your own submission')])
      }
      expect(await footprint(knex)).toBe(before)
      // Nor by a hand on the database.
      await expect(knex('submissions').where({ id: own.id }).update({ state: 'rejected', decidedBy: author.id, decidedAt: knex.fn.now() })).rejects.toThrow(/check/)

      const returned = (await verdict(otherApprover, own, 'return', 'Please name the table')).ok<SubmissionAnswer>(200)
      const helper = author === approver ? steward : approver
      const edited = (await helper.patch(`/api/submissions/${own.id}`, { summary: 'Table 3', lockVersion: returned.lockVersion })).ok<SubmissionAnswer>(200)
      const again = await submit(author, edited)
      for (const event of ['approve', 'return', 'reject']) {
        const refused = await verdict(helper, again, event, 'let me')
        expect([event, refused.status, refused.problem().detail]).toEqual([event, 403, expect.stringContaining('You wrote in this submission')])
      }
      ;(await verdict(otherApprover, again)).ok(200)
    }
  })

  it('speaks of one content: after an edit, the verdict on the former version lapses', async () => {
    const { curator, approver, ground } = desk()
    const { slug } = await galaxy('Moving target')
    const first = await submit(curator, await draft(curator, 'Version one', [measurementAdd({ slug }, modulus(ground.source))]))
    const returned = (await verdict(approver, first, 'return', 'The error is missing')).ok<SubmissionAnswer>(200)
    expect(returned).toMatchObject({ state: 'returned', decisionNote: 'The error is missing', decidedBy: approver.name })
    const same = await submit(curator, returned)
    expect(same).toMatchObject({ version: 2, contentHash: first.contentHash })
    const back = (await verdict(approver, same, 'return', 'It still is')).ok<SubmissionAnswer>(200)
    const change = back.items[0]?.id ?? 0
    const edited = (await curator.patch(`/api/submissions/${back.id}/changes/${change}`, measurementAdd({ slug }, modulus(ground.source, 27.5, { errSys: 0.05 })))).ok<SubmissionAnswer>(200)
    const third = await submit(curator, edited)
    expect(third.contentHash).not.toBe(first.contentHash)
    const lapsed = await verdict(approver, { ...third, contentHash: first.contentHash })
    expect([lapsed.status, lapsed.problem().detail]).toEqual([409, expect.stringContaining('changed since you read it')])
    const approved = (await verdict(approver, third)).ok<SubmissionAnswer>(200)
    expect(approved.timeline.map((t) => t.what)).toEqual([
      `Approved as revision ${approved.revision}`, 'Submitted again, version 3', 'Returned', 'Submitted again, version 2', 'Returned', 'Submitted', 'Draft begun',
    ])
  })

  it('needs a reason to return or to reject', async () => {
    const { curator, approver, ground } = desk()
    const { slug } = await galaxy('Reasons')
    const waiting = await submit(curator, await draft(curator, 'Reasons', [measurementAdd({ slug }, modulus(ground.source))]))
    for (const event of ['return', 'reject']) {
      const refused = await verdict(approver, waiting, event, ' ')
      expect([refused.status, refused.problem().errors?.[0]?.path]).toEqual([400, 'note'])
    }
    expect((await verdict(approver, waiting, 'reject', 'A foreground star')).ok<SubmissionAnswer>(200).state).toBe('rejected')
  })
})

describe('a conflict', () => {
  it('names field, base, theirs, yours, who and when; nothing is applied until it is answered', async () => {
    const { curator, otherCurator, approver, ground, knex } = desk()
    const { slug, measurements } = await galaxy('Contested', [27.1])
    const replace = (value: number) => ({ action: 'measurement.replace', payload: { measurementId: measurements[0], reason: 'misread', measurement: modulus(ground.source, value) } })
    const mine = await draft(curator, 'Mine', [replace(27.2), { action: 'galaxy.amend', payload: { galaxy: { slug }, set: { class: 'spiral' }, reason: 'looks so' } }])
    const waiting = await submit(curator, mine)
    const theirs = await submit(otherCurator, await draft(otherCurator, 'Theirs', [replace(27.3), { action: 'galaxy.amend', payload: { galaxy: { slug }, set: { note: 'edge-on' }, reason: 'seen' } }]))
    expect(theirs.overlaps).toEqual(expect.arrayContaining([{ submission: waiting.id, title: 'Mine', subject: 'Contested, distance modulus' }]))
    const moved = (await verdict(approver, theirs)).ok<SubmissionAnswer>(200)

    const before = await footprint(knex)
    const refused = await verdict(approver, waiting)
    expect(refused.status).toBe(409)
    // The galaxy was amended by both, in different fields: that is no conflict.
    expect(refused.problem().conflicts).toEqual([
      {
        change: mine.items[0]?.id, subject: 'Contested, distance modulus', field: 'Value', base: '27.100\u00a0mag', theirs: '27.300\u00a0mag', yours: '27.200\u00a0mag',
        by: otherCurator.name, revision: moved.revision,
      },
    ])
    expect((await approver.get(`/api/submissions/${waiting.id}/effect`)).status).toBe(409)
    expect(await footprint(knex)).toBe(before)
    const read = (await curator.get(`/api/submissions/${waiting.id}`)).ok<SubmissionAnswer>(200)
    expect(read.conflicts).toBe(1)

    const returned = (await verdict(approver, read, 'return', 'Somebody was faster')).ok<SubmissionAnswer>(200)
    const stuck = await curator.post(`/api/submissions/${returned.id}/submit`, { lockVersion: returned.lockVersion })
    expect([stuck.status, stuck.problem().conflicts?.length]).toEqual([409, 1])
    const answered = (await curator.patch(`/api/submissions/${returned.id}/changes/${mine.items[0]?.id}`, replace(27.2))).ok<SubmissionAnswer>(200)
    expect(answered.conflicts).toBe(0)
    ;(await verdict(approver, await submit(curator, answered))).ok(200)
    const galaxyNow = (await knex('galaxyVersions').where({ slug }).whereNull('revTo').first()) as { class: string; note: string }
    expect(galaxyNow).toMatchObject({ class: 'spiral', note: 'edge-on' })
  })

  it('arises when somebody adds the same galaxy first', async () => {
    const { curator, otherCurator, approver } = desk()
    const mine = await submit(curator, await draft(curator, 'Found it', [galaxyAdd('Twice Found', 200, 10)]))
    const theirs = await submit(otherCurator, await draft(otherCurator, 'Found it too', [galaxyAdd('twice found', 200, 10)]))
    ;(await verdict(approver, theirs)).ok(200)
    const refused = await verdict(approver, mine)
    expect([refused.status, refused.problem().conflicts?.[0]]).toEqual([409, expect.objectContaining({ field: 'Designation', yours: 'Twice Found', by: otherCurator.name })])
  })
})

describe('a check that stops', () => {
  it('keeps a submission from being submitted, and from being approved when it came about since', async () => {
    const { curator, otherCurator, approver, ground, knex } = desk()
    const { slug } = await galaxy('Entered twice')
    const change = measurementAdd({ slug }, modulus(ground.source, 27.31))
    const mine = await submit(curator, await draft(curator, 'Mine', [change]))
    ;(await verdict(approver, await submit(otherCurator, await draft(otherCurator, 'Theirs', [change])))).ok(200)
    const before = await footprint(knex)
    const refused = await verdict(approver, mine)
    expect([refused.status, refused.problem().conflicts?.[0]]).toEqual([409, expect.objectContaining({ subject: 'Entered twice, distance modulus', theirs: expect.stringContaining('has this very value') as string })])
    expect(await footprint(knex)).toBe(before)

    const late = await draft(curator, 'Late', [change, galaxyAdd('entered TWICE', 11, 20)])
    expect(late).toMatchObject({ cautions: expect.any(Number) as number })
    expect(late.items.map((i) => i.checks.filter((c) => c.level === 'stop').length)).toEqual([1, 1])
    const stopped = await curator.post(`/api/submissions/${late.id}/submit`, { lockVersion: late.lockVersion })
    expect([stopped.status, stopped.problem().errors?.map((e) => e.path)]).toEqual([400, late.items.map((i) => `changes.${i.id}`)])
    expect((await curator.get(`/api/submissions/${late.id}`)).ok<SubmissionAnswer>(200).state).toBe('draft')
  })
})

describe('slugs', () => {
  it('are the next free one, within a submission and after it', async () => {
    const { curator, approver } = desk()
    const both = (await verdict(approver, await submit(curator, await draft(curator, 'Two', [galaxyAdd('Slugged α', 1, 1), galaxyAdd('Slugged β', 2, 2)])))).ok<SubmissionAnswer>(200)
    expect(both.items.map((i) => i.galaxy?.slug)).toEqual(['slugged', 'slugged-2'])
    const renamed = (await verdict(approver, await submit(curator, await draft(curator, 'New name', [
      { action: 'galaxy.amend', payload: { galaxy: { slug: 'slugged' }, set: { designation: 'Renamed' }, reason: 'a better name' } },
    ])))).ok<SubmissionAnswer>(200)
    expect(renamed.items[0]?.galaxy).toEqual({ slug: 'slugged', name: 'Renamed' })
    const third = (await verdict(approver, await submit(curator, await draft(curator, 'Third', [galaxyAdd('Slugged γ', 3, 3)])))).ok<SubmissionAnswer>(200)
    expect(third.items[0]?.galaxy?.slug).toBe('slugged-3')
    const { knex } = desk()
    const names = (await knex('galaxyNames as n').join('galaxyVersions as g', 'g.galaxy', 'n.galaxy').whereNull('n.revTo').whereNull('g.revTo').where('g.slug', 'slugged').orderBy('n.name').select('n.name', 'n.preferred')) as unknown[]
    expect(names).toEqual([{ name: 'Renamed', preferred: true }, { name: 'Slugged α', preferred: false }])
  })
})
