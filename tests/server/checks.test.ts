/** What the desk tells of proposed changes: the checks that need the catalogue around them. */
import { beforeAll, describe, expect, it } from 'vitest'
import type { SubmissionAnswer } from '../../core/schema/submissions.ts'
import { galaxyAdd, measurementAdd, modulus } from './desk/catalogue.ts'
import { useDesk } from './desk/desk.ts'

const desk = useDesk()
const velocity = (sourceId: number, value: number, more = {}) => ({ quantity: 'velocity' as const, value, errPlus: 3, errMinus: 3, unit: 'km/s', sourceId, ...more })
const light = (sourceId: number, value: number) => ({ quantity: 'v_mag' as const, value, errPlus: 0.05, errMinus: 0.05, unit: 'mag', sourceId })

async function draft(...changes: readonly unknown[]): Promise<SubmissionAnswer> {
  const { curator } = desk()
  let submission = (await curator.post('/api/submissions', { title: 'Checked' })).ok<SubmissionAnswer>(201)
  for (const change of changes) submission = (await curator.post(`/api/submissions/${submission.id}/changes`, change)).ok<SubmissionAnswer>(201)
  return submission
}

async function approved(submission: SubmissionAnswer): Promise<void> {
  const { curator, approver } = desk()
  const waiting = (await curator.post(`/api/submissions/${submission.id}/submit`, { lockVersion: submission.lockVersion })).ok<SubmissionAnswer>(200)
  ;(await approver.post(`/api/submissions/${submission.id}/approve`, { contentHash: waiting.contentHash })).ok<SubmissionAnswer>(200)
}

/** "level: sentence" of one check of one change (by its place), or undefined. */
function said(submission: SubmissionAnswer, change: number, check: string): string | undefined {
  const found = submission.items[change]?.checks.find((c) => c.check === check)
  return found && `${found.level}: ${found.sentence}`
}

/** A bright galaxy at 3.6 Mpc with a dwarf beside it on the sky, and one like the dwarf far behind. */
beforeAll(async () => {
  const { curator, ground } = desk()
  let made = await draft(galaxyAdd('Hollin', 150, 20), galaxyAdd('Hollin II', 151, 20.4), galaxyAdd('Farside', 152, 21))
  const [hollin, dwarf, far] = made.items.map((i) => i.id)
  for (const [galaxy, measurement] of [
    [hollin, modulus(ground.source, 27.78, { errPlus: 0.03, errMinus: 0.03 })], [hollin, light(ground.source, 7.2)], [hollin, velocity(ground.source, 331)],
    [hollin, { quantity: 'r_half', value: 8, errPlus: 0.2, errMinus: 0.2, unit: 'arcmin', sourceId: ground.source }],
    [dwarf, modulus(ground.source, 27.79, { errPlus: 0.03, errMinus: 0.03 })], [dwarf, light(ground.source, 16.1)],
    [far, modulus(ground.source, 29.6)], [far, light(ground.source, 15.2)],
  ] as const) made = (await curator.post(`/api/submissions/${made.id}/changes`, measurementAdd({ change: galaxy ?? 0 }, measurement))).ok<SubmissionAnswer>(201)
  await approved(made)
})

describe('the desk tells', () => {
  it('that a galaxy would change host, and its satellites with it', async () => {
    const { ground } = desk()
    // The dwarf put 1.4 Mpc behind its host leaves it.
    const moved = await draft(measurementAdd({ slug: 'hollin-ii' }, modulus(ground.otherSource, 28.6, { errPlus: 0.01, errMinus: 0.01, method: 'cepheids' })))
    expect(said(moved, 0, 'host-change')).toMatch(/^warn: Hollin II would leave Hollin and stand in the field\./)
    // The host moved away loses its dwarf.
    const host = await draft(measurementAdd({ slug: 'hollin' }, modulus(ground.otherSource, 29.2, { errPlus: 0.01, errMinus: 0.01, method: 'cepheids' })))
    expect(said(host, 0, 'host-change')).toBe('warn: another galaxy changes host with it: Hollin II.')
    const near = await draft(measurementAdd({ slug: 'hollin-ii' }, modulus(ground.otherSource, 27.8)))
    expect(said(near, 0, 'host-change')).toBe('ok: Nobody changes host.')
    expect(said(await draft(measurementAdd({ slug: 'hollin' }, velocity(ground.otherSource, 330))), 0, 'host-change')).toBeUndefined()
  })

  it('that approving does what the check foresaw', async () => {
    const { curator, ground, knex } = desk()
    const [slip] = (await knex('measurements as m').join('galaxyVersions as g', 'g.galaxy', 'm.galaxy').where({ 'g.slug': 'farside', 'm.quantity': 'distance_modulus' }).select('m.lineage')) as { lineage: number }[]
    const host = async (): Promise<unknown> => (await curator.get('/api/galaxies/farside')).ok<{ row: { host: string | null } }>(200).row.host
    const moving = await draft({ action: 'measurement.replace', payload: { measurementId: slip?.lineage, measurement: modulus(ground.source, 27.79), reason: 'A digit was misread' } })
    expect(said(moving, 0, 'host-change')).toBe('warn: Farside would become a satellite of Hollin.')
    expect(await host()).toBeNull()
    await approved(moving)
    expect(await host()).toBe('hollin')
  })

  it('that another galaxy has the very value, in the catalogue or in the same submission', async () => {
    const { ground } = desk()
    const same = await draft(
      measurementAdd({ slug: 'hollin-ii' }, velocity(ground.source, 331)),
      measurementAdd({ slug: 'hollin-ii' }, velocity(ground.otherSource, 245.3)),
      measurementAdd({ slug: 'farside' }, velocity(ground.otherSource, 245.3)),
      measurementAdd({ slug: 'farside' }, velocity(ground.source, 331, { errPlus: 4 })),
    )
    expect(said(same, 0, 'elsewhere')).toBe('warn: Ansel et al. 2021 has the very same heliocentric velocity, error and all, for Hollin. Is this row that of Hollin II?')
    expect(said(same, 1, 'elsewhere')).toContain('for Farside')
    expect(said(same, 2, 'elsewhere')).toContain('for Hollin II')
    expect(said(same, 3, 'elsewhere')).toBeUndefined()
  })

  it('what a source lacks, of published ones', async () => {
    const { knex } = desk()
    const [bare] = (await knex('sources').insert({ label: 'Nobody 2024', title: 'A table', authors: '[]', year: 2024, kind: 'article' }).returning('id')) as { id: number }[]
    const submission = await draft(measurementAdd({ slug: 'hollin' }, velocity(bare?.id ?? 0, 330)), measurementAdd({ slug: 'hollin' }, velocity(desk().ground.otherSource, 329)))
    expect(said(submission, 0, 'source-complete')).toBe('warn: Nobody 2024 lacks a DOI, bibcode or address, its authors and where it appeared. Complete the source, so that others find it.')
    expect(said(submission, 1, 'source-complete')).toBeUndefined()
  })

  it('that an excluded measurement is the only one', async () => {
    const { knex } = desk()
    const [only] = (await knex('measurements as m').join('galaxyVersions as g', 'g.galaxy', 'm.galaxy').where({ 'g.slug': 'hollin', 'm.quantity': 'velocity' }).select('m.lineage')) as { lineage: number }[]
    const submission = await draft({ action: 'measurement.exclude', payload: { measurementId: only?.lineage, reason: 'A foreground star' } })
    expect(said(submission, 0, 'last-value')).toBe('warn: It is the only heliocentric velocity that counts: without it the galaxy has none.')
  })

  it('that a new galaxy lies within another, has nothing measured, or a name with other digits', async () => {
    const submission = await draft(galaxyAdd('Knot A', 150.08, 20), galaxyAdd('Demo J1000+2231', 150.01, 22.515))
    expect(said(submission, 0, 'near-galaxy')).toBe('warn: It lies within the half-light radius of Hollin, 4.5′ from its centre: is it a galaxy, or a part of that one?')
    expect(said(submission, 0, 'bare-galaxy')).toMatch(/^warn/)
    expect(said(submission, 1, 'near-galaxy')).toMatch(/^ok/)
    expect(said(submission, 1, 'designation-digits')).toMatch(/^warn: The digits of “Demo J1000\+2231” are rounded/)
  })

  it('that a galaxy is moved out of itself', async () => {
    const amend = (ra: number) => ({ action: 'galaxy.amend', payload: { galaxy: { slug: 'hollin' }, set: { ra }, reason: 'Better centre' } })
    expect(said(await draft(amend(150.05)), 0, 'position-moved')).toBe('ok: The position moves by 2.8′.')
    expect(said(await draft(amend(150.5)), 0, 'position-moved')).toMatch(/^warn: The position of Hollin moves by 28\.2′/)
  })

  it('that an anchor moves by more than its error', async () => {
    const anchor = { key: 'trgb-absolute-i', label: 'TRGB absolute I magnitude', kind: 'absolute-magnitude', methods: ['trgb'], value: -4.3, err: 0.038, source: 'Invented 2026', reason: 'To see what happens' }
    expect(said(await draft({ action: 'anchor.set', payload: anchor }), 0, 'anchor-shift')).toMatch(/^warn: TRGB absolute I magnitude moves by −0\.251 mag, 6\.6 times its error/)
  })
})
