import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { SubmissionAnswer, SubmissionState } from '../../core/schema/submissions.ts'
import { SUBMISSION_EVENTS, transition } from '../../core/submission/state-machine.ts'
import type { SubmissionEvent } from '../../core/submission/state-machine.ts'
import { footprint, galaxyAdd, measurementAdd, modulus } from './desk/catalogue.ts'
import { useDesk } from './desk/desk.ts'
import type { Answer, Person } from './desk/desk.ts'

const desk = useDesk()
const list = (answer: Answer): number[] => answer.ok<{ submissions: { id: number }[] }>(200).submissions.map((s) => s.id)

async function draft(author: Person, title = 'A draft', ...changes: readonly unknown[]): Promise<SubmissionAnswer> {
  let submission = (await author.post('/api/submissions', { title })).ok<SubmissionAnswer>(201)
  for (const change of changes) submission = (await author.post(`/api/submissions/${submission.id}/changes`, change)).ok<SubmissionAnswer>(201)
  return submission
}

async function approved(title: string, ...changes: readonly unknown[]): Promise<SubmissionAnswer> {
  const { curator, approver } = desk()
  const made = await draft(curator, title, ...changes)
  const waiting = (await curator.post(`/api/submissions/${made.id}/submit`, { lockVersion: made.lockVersion })).ok<SubmissionAnswer>(200)
  return (await approver.post(`/api/submissions/${made.id}/approve`, { contentHash: waiting.contentHash })).ok<SubmissionAnswer>(200)
}

describe('a draft', () => {
  it('is made, renamed, filled, emptied and removed', async () => {
    const { curator, ground } = desk()
    const made = await draft(curator, 'Two dwarfs', galaxyAdd('Fenwick A', 11, 12))
    expect(made).toMatchObject({ state: 'draft', changes: 1, version: 0, contentHash: null, may: { edit: true, submit: true, withdraw: false, review: false, remove: true } })
    expect(made.items[0]).toMatchObject({
      subject: 'Fenwick A, a new galaxy', galaxy: null, standing: null,
      diff: expect.arrayContaining([{ field: 'Right ascension', before: null, after: '11.00000°' }, { field: 'Class', before: null, after: 'dwarf irregular' }]) as unknown,
    })
    const added = made.items[0]?.id ?? 0
    const renamed = (await curator.patch(`/api/submissions/${made.id}`, { title: 'Two faint dwarfs', lockVersion: made.lockVersion })).ok<SubmissionAnswer>(200)
    const filled = (await curator.post(`/api/submissions/${made.id}/changes`, measurementAdd({ change: added }, modulus(ground.source, 3.2, { unit: 'Mpc', errPlus: 0.2, errMinus: 0.2, anchor: 'trgb-absolute-i', anchorValueAssumed: -4.05 })))).ok<SubmissionAnswer>(201)
    expect(filled).toMatchObject({ title: 'Two faint dwarfs', lockVersion: renamed.lockVersion + 1 })
    expect(filled.items[1]).toMatchObject({
      subject: 'Fenwick A, distance modulus',
      standing: {
        quantity: 'Distance modulus', unit: 'mag', published: '3.2\u00a0±\u00a00.2\u00a0Mpc', scaled: '27.525\u00a0+0.132\u00a0−0.140\u00a0mag', adopted: null,
        source: 'Ansel et al. 2021', method: 'TRGB', anchor: 'TRGB absolute I magnitude, −4.05\u00a0mag assumed',
      },
    })
    const kept = await curator.delete(`/api/submissions/${made.id}/changes/${added}`)
    expect([kept.status, kept.problem().detail]).toEqual([409, expect.stringContaining('Remove those first')])
    const emptied = (await curator.delete(`/api/submissions/${made.id}/changes/${filled.items[1]?.id}`)).ok<SubmissionAnswer>(200)
    expect(emptied.items.map((i) => i.id)).toEqual([added])
    ;(await curator.delete(`/api/submissions/${made.id}`)).ok(204)
    expect((await curator.get(`/api/submissions/${made.id}`)).status).toBe(404)
  })

  it('is its author’s alone until it is submitted', async () => {
    const { curator, otherCurator, steward, researcher } = desk()
    const made = await draft(curator, 'Private', galaxyAdd('Privately Seen', 99, 1))
    for (const other of [otherCurator, steward]) {
      expect((await other.get(`/api/submissions/${made.id}`)).status).toBe(404)
      expect((await other.patch(`/api/submissions/${made.id}`, { title: 'Mine now', lockVersion: made.lockVersion })).status).toBe(404)
      expect((await other.delete(`/api/submissions/${made.id}`)).status).toBe(404)
      expect((await other.post(`/api/submissions/${made.id}/changes`, galaxyAdd('Theirs'))).status).toBe(404)
      expect((await other.post(`/api/submissions/${made.id}/remarks`, { body: 'Hm' })).status).toBe(404)
      expect((await other.get(`/api/submissions/${made.id}/effect`)).status).toBe(404)
      expect(list(await other.get('/api/submissions'))).not.toContain(made.id)
    }
    expect((await researcher.get('/api/submissions')).status).toBe(403)
    ;(await curator.post(`/api/submissions/${made.id}/submit`, { lockVersion: made.lockVersion })).ok(200)
    expect((await otherCurator.get(`/api/submissions/${made.id}`)).status).toBe(200)
    expect((await otherCurator.patch(`/api/submissions/${made.id}`, { title: 'Mine now', lockVersion: 3 })).status).toBe(409)
    expect((await otherCurator.post(`/api/submissions/${made.id}/withdraw`, { lockVersion: 3 })).status).toBe(403)
    expect((await otherCurator.post(`/api/submissions/${made.id}/approve`, { contentHash: 'abcdefgh' })).status).toBe(403)
  })

  it('that was changed elsewhere is not overwritten, and the refusal says what the newer one holds', async () => {
    const { curator, knex } = desk()
    const made = await draft(curator, 'First title')
    ;(await curator.patch(`/api/submissions/${made.id}`, { title: 'From the other window', lockVersion: made.lockVersion })).ok(200)
    const before = await footprint(knex)
    const late = await curator.patch(`/api/submissions/${made.id}`, { title: 'From this window', lockVersion: made.lockVersion })
    expect([late.status, late.problem().conflicts]).toEqual([
      409, [{ change: 0, subject: 'From the other window', field: 'Title', base: null, theirs: 'From the other window', yours: 'From this window', by: null, revision: null }],
    ])
    expect((await curator.post(`/api/submissions/${made.id}/submit`, { lockVersion: made.lockVersion })).status).toBe(409)
    expect(await footprint(knex)).toBe(before)
  })

  it('without a change is not submitted', async () => {
    const { curator } = desk()
    const made = await draft(curator, 'Nothing in it')
    const refused = await curator.post(`/api/submissions/${made.id}/submit`, { lockVersion: made.lockVersion })
    expect([refused.status, refused.problem().detail]).toEqual([409, expect.stringContaining('proposes nothing yet')])
  })
})

describe('the lists', () => {
  it('filter by state, author and what waits for one’s review', async () => {
    const { curator, otherCurator, approver } = desk()
    const mine = await draft(curator, 'In the list', galaxyAdd('Listed', 77, 7))
    ;(await curator.post(`/api/submissions/${mine.id}/submit`, { lockVersion: mine.lockVersion })).ok(200)
    const own = await draft(approver, 'An approver’s own', galaxyAdd('Listed Too', 78, 7))
    ;(await approver.post(`/api/submissions/${own.id}/submit`, { lockVersion: own.lockVersion })).ok(200)
    const waiting = list(await approver.get('/api/submissions?review=true'))
    expect(waiting).toContain(mine.id)
    expect(waiting).not.toContain(own.id)
    expect(list(await otherCurator.get('/api/submissions?mine=true'))).not.toContain(mine.id)
    expect(list(await curator.get('/api/submissions?mine=true&state=submitted'))).toContain(mine.id)
    expect((await curator.get('/api/submissions?state=lost')).status).toBe(400)
  })
})

describe('remarks', () => {
  it('stand with who, when and on what', async () => {
    const { curator, approver } = desk()
    const made = await draft(curator, 'To be talked about', galaxyAdd('Talked About', 55, 5))
    const waiting = (await curator.post(`/api/submissions/${made.id}/submit`, { lockVersion: made.lockVersion })).ok<SubmissionAnswer>(200)
    const change = made.items[0]?.id ?? 0
    const said = (await approver.post(`/api/submissions/${made.id}/remarks`, { change, body: 'Is this a cirrus cloud?' })).ok<SubmissionAnswer>(201)
    expect(said.remarks).toMatchObject([{ change, author: approver.name, body: 'Is this a cirrus cloud?' }])
    // A remark is no edit: the verdict may follow.
    ;(await approver.post(`/api/submissions/${made.id}/reject`, { contentHash: waiting.contentHash, note: 'It is' })).ok(200)
    expect((await approver.post(`/api/submissions/${made.id}/remarks`, { change: 999_999, body: 'Where?' })).status).toBe(404)
  })
})

describe('bad input', () => {
  it('is refused with the field and the reason, and changes nothing', async () => {
    const { curator, ground, knex } = desk()
    const held = await approved('Ground for bad input', galaxyAdd('Kestrel', 140, 30))
    const slug = held.items[0]?.galaxy?.slug ?? ''
    await approved('A value of it', measurementAdd({ slug }, modulus(ground.source, 27)))
    await approved('Another galaxy', galaxyAdd('Kestrel B', 150, 30))
    const [first] = (await knex('measurements as m').join('galaxyVersions as g', 'g.galaxy', 'm.galaxy').where('g.slug', slug).select('m.lineage')) as { lineage: number }[]
    const id = first?.lineage ?? 0
    const made = await draft(curator, 'Bad input', galaxyAdd('Good one', 1, 1), { action: 'measurement.exclude', payload: { measurementId: id, reason: 'blended' } })
    const good = made.items[0]?.id ?? 0
    await curator.post(`/api/submissions/${made.id}/changes`, measurementAdd({ slug }, modulus(ground.source, 27.77)))
    const m = (more: object) => measurementAdd({ slug }, { ...modulus(ground.source), ...more })
    const amend = (set: object, reason = 'because it is') => ({ action: 'galaxy.amend', payload: { galaxy: { slug }, set, reason } })
    const table: [string, unknown, string, string][] = [
      ['an action that is none', { action: 'galaxy.destroy', payload: {} }, 'action', ''],
      ['a field too many', { action: 'name.add', payload: { galaxy: { slug }, name: 'X 1', state: 'approved' } }, 'payload', ''],
      ['a galaxy that is none', measurementAdd({ slug: 'no-such' }, modulus(ground.source)), 'payload.galaxy.slug', 'no galaxy "no-such"'],
      ['a change that adds none', measurementAdd({ change: 999_999 }, modulus(ground.source)), 'payload.galaxy.change', 'No change of this submission'],
      ['a source that is none', m({ sourceId: 999_999 }), 'payload.measurement.sourceId', 'no such source'],
      ['no source', m({ sourceId: undefined }), 'payload.measurement.sourceId', ''],
      ['a unit that is none', m({ unit: 'parsec-ish' }), 'payload.measurement.unit', 'is given in mag or Mpc or kpc'],
      ['a slip of the unit', m({ value: 3.6 }), 'payload.measurement.value', 'outside 14 to 33'],
      ['a value that is no number', m({ value: 'about 27' }), 'payload.measurement.value', 'must be a number'],
      ['a negative error', m({ errPlus: -0.1 }), 'payload.measurement.errPlus', 'cannot be negative'],
      ['a distance without its method', m({ method: null }), 'payload.measurement.method', 'Choose the distance method'],
      ['an anchor that is none', m({ anchor: 'sirius' }), 'payload.measurement.anchor', 'no anchor "sirius"'],
      ['a value of no anchor', m({ anchorValueAssumed: 18.5 }), 'payload.measurement.anchor', 'Name the anchor'],
      ['a text for a number', m({ textValue: 'Sb' }), 'payload.measurement.textValue', 'is a number'],
      ['superseding what is none', m({ supersedes: 999_999 }), 'payload.measurement.supersedes', 'no such measurement'],
      ['a measurement that it adds already', m({ value: 27.77, note: 'again' }), 'payload.measurement.value', 'already adds'],
      ['a designation of another galaxy', amend({ designation: 'KESTREL B' }), 'payload.set.designation', 'already names Kestrel B'],
      ['right ascension out of range', galaxyAdd('Far', 400, 1), 'payload.ra', '0 to 360'],
      ['declination out of range', galaxyAdd('Far', 40, -91), 'payload.dec', '−90 to +90'],
      ['a designation of signs only', galaxyAdd('***', 40, 1), 'payload.designation', 'letter or digit'],
      ['a name twice', { action: 'galaxy.add', payload: { ...(galaxyAdd('Twin', 4, 4).payload as object), names: ['T 1', 'T 1'] } }, 'payload.names.1', 'twice'],
      ['an amendment of nothing', amend({}), 'payload.set', 'at least one field'],
      ['an amendment to what holds', amend({ class: 'dwarf-irregular' }), 'payload.set', 'already'],
      ['an amendment without a reason', amend({ class: 'spiral' }, ''), 'payload.reason', 'Give the reason'],
      ['a measurement that is none', { action: 'measurement.exclude', payload: { measurementId: 999_999, reason: 'wrong' } }, 'payload.measurementId', 'no measurement 999999'],
      ['a measurement that another change has', { action: 'measurement.replace', payload: { measurementId: id, reason: 'slip', measurement: modulus(ground.source, 27.1) } }, 'payload.measurementId', 'already changes'],
      ['a name that it has', { action: 'name.add', payload: { galaxy: { slug }, name: 'Kestrel' } }, 'payload.name', 'has that name already'],
      ['a name of another galaxy', { action: 'name.add', payload: { galaxy: { slug }, name: 'kestrel-B' } }, 'payload.name', 'already names Kestrel B'],
      ['a name of the galaxy that is added', { action: 'name.add', payload: { galaxy: { change: good }, name: 'Good one' } }, 'payload.name', 'already'],
    ]
    const before = await footprint(knex)
    for (const [what, body, path, words] of table) {
      const refused = await curator.post(`/api/submissions/${made.id}/changes`, body)
      const found = refused.problem().errors?.find((e) => e.path === path)
      expect([what, refused.status, found ? path : refused.problem().errors]).toEqual([what, 400, path])
      expect([what, found?.message]).toEqual([what, expect.stringContaining(words)])
    }
    const turned = await curator.patch(`/api/submissions/${made.id}/changes/${good}`, amend({ class: 'spiral' }))
    expect([turned.status, turned.problem().errors?.[0]?.path]).toEqual([400, 'action'])
    for (const text of ['A\u0000', 'A\ud800', '\udc00']) {
      expect([text, (await curator.post(`/api/submissions/${made.id}/changes`, galaxyAdd(text))).status]).toEqual([text, 400])
      expect([text, (await curator.post('/api/submissions', { title: text })).status]).toEqual([text, 400])
    }
    for (const body of [{}, { title: '' }, { title: 'x'.repeat(161) }, { title: 'Fine', state: 'approved' }, { title: 'Fine', author: 1 }]) {
      expect([body, (await curator.post('/api/submissions', body)).status]).toEqual([body, 400])
    }
    for (const path of ['/api/submissions/0', '/api/submissions/x', '/api/submissions/99999999999']) expect([path, (await curator.get(path)).status]).toEqual([path, 404])
    expect(await footprint(knex)).toBe(before)
  })
})

describe('the states over the wire', () => {
  it('follow the table whatever is tried by whom: only legal steps persist', async () => {
    const { curator, otherCurator, approver, steward, knex } = desk()
    const people = { curator, otherCurator, approver, steward }
    const step = fc.tuple(fc.constantFrom(...SUBMISSION_EVENTS), fc.constantFrom('curator', 'otherCurator', 'approver', 'steward'))
    let n = 0
    await fc.assert(
      fc.asyncProperty(fc.array(step, { minLength: 3, maxLength: 12 }), async (steps) => {
        n += 1
        const made = await draft(curator, `Walk ${n}`, galaxyAdd(`Walked ${n}`, (n * 3) % 360, 40))
        let state: SubmissionState | null = 'draft'
        const editors = new Set(['curator'])
        for (const [event, who] of steps as [SubmissionEvent, keyof typeof people][]) {
          const row = (await knex('submissions').where({ id: made.id }).first()) as { state: string; lockVersion: number; contentHash: string | null; decidedBy: number | null } | undefined
          expect(row?.state ?? null).toBe(state)
          const answer = await send(people[who], event, made.id, row?.lockVersion ?? 0, row?.contentHash ?? 'none-at-all')
          const legal: ReturnType<typeof transition> = state === null ? undefined : transition(state, event)
          const may = legal && (legal.who === 'author' ? who === 'curator' : legal.who === 'writer' ? true : (who === 'approver' || who === 'steward') && !editors.has(who))
          expect([event, who, answer.status < 300]).toEqual([event, who, Boolean(may)])
          if (!may) continue
          state = legal?.to ?? null
          if (event === 'edit' || event === 'submit') editors.add(who)
        }
      }),
      { numRuns: 25 },
    )
  })
})

function send(person: Person, event: SubmissionEvent, id: number, lockVersion: number, contentHash: string): Promise<Answer> {
  const path = `/api/submissions/${id}`
  if (event === 'edit') return person.patch(path, { summary: `as of ${lockVersion}`, lockVersion })
  if (event === 'remove') return person.delete(path)
  if (event === 'submit' || event === 'withdraw') return person.post(`${path}/${event}`, { lockVersion })
  return person.post(`${path}/${event}`, { contentHash, note: 'so decided' })
}
