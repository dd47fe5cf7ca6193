import { readFile } from 'node:fs/promises'
import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { columnOf, type CatalogueRow, type CatalogueValue } from '../../core/columns.ts'
import type { GalaxyList, MeasurementAnswer } from '../../core/schema/catalogue.ts'
import type { ScaleAnswer } from '../../core/schema/scale.ts'
import type { Effect } from '../../core/schema/submissions.ts'
import { startApp, type RunningApp } from './harness/app.ts'
import { openBrowser, type TestBrowser } from './harness/browser.ts'
import { goTo, overflowOf, signInAs, violationsOf } from './harness/pages.ts'

let app: RunningApp
let chromium: TestBrowser

beforeAll(async () => {
  app = await startApp({ catalogue: 'demonstration' })
  chromium = await openBrowser()
})
afterAll(async () => {
  await chromium?.close()
  await app?.stop()
})

async function as(who: string, path: string, options: Parameters<TestBrowser['newPage']>[0] = {}): Promise<Page> {
  const page = await chromium.newPage({ baseURL: app.url, viewport: { width: 1440, height: 900 }, ...options })
  await signInAs(app, page, who)
  await goTo(page, path)
  return page
}

async function read<T>(page: Page, path: string): Promise<T> {
  const answer = await page.request.get(path)
  expect([path, answer.status()]).toEqual([path, 200])
  return (await answer.json()) as T
}

/** What an effect tells of a row, but for what follows from these. */
const COMPARED = [
  'dm', 'dm_err', 'dm_err_sys', 'distance', 'distance_method', 'n_distance', 'sgx', 'sgy', 'sgz', 'v_hel', 'v_gsr', 'v_lg', 'abs_b', 'abs_v', 'abs_k', 'r_half_pc', 'r_circ_pc', 'log_mhi',
  'log_mstar', 'host', 'host_relation', 'host_probability', 'tidal_index', 'main_disturber', 'host_sep', 'host_angle', 'host_dv',
]

/** Every row of the catalogue as it stands, by slug. */
async function wholeCatalogue(page: Page): Promise<Map<string, CatalogueRow>> {
  const rows = new Map<string, CatalogueRow>()
  for (let cursor: string | null = ''; cursor !== null; ) {
    const answer: GalaxyList = await read(page, `/api/galaxies?limit=500&columns=slug,name,${COMPARED.join(',')}${cursor === '' ? '' : `&cursor=${encodeURIComponent(cursor)}`}`)
    for (const row of answer.rows) rows.set(String(row['slug']), row)
    cursor = answer.next
  }
  return rows
}

function printed(column: string, value: CatalogueValue): string {
  return typeof value === 'number' ? value.toFixed(columnOf(column)?.decimals ?? 3).replace(/^-(0\.?0*)$/, '$1') : String(value)
}

/** What moved, and what was foretold, as lines of "galaxy column before -> after" at the precision that is printed. */
function movesOf(before: Map<string, CatalogueRow>, after: Map<string, CatalogueRow>): string[] {
  return [...after].flatMap(([slug, row]) =>
    COMPARED.flatMap((column) => {
      const [was, is] = [printed(column, before.get(slug)?.[column] ?? null), printed(column, row[column] ?? null)]
      return was === is ? [] : [`${slug} ${column} ${was} -> ${is}`]
    }),
  ).sort()
}

function foretold(effect: Effect): string[] {
  return effect.galaxies
    .flatMap((g) => g.changes.filter((c) => COMPARED.includes(c.column)).map((c) => `${g.slug} ${c.column} ${printed(c.column, c.before as CatalogueValue)} -> ${printed(c.column, c.after as CatalogueValue)}`))
    .sort()
}

const idOf = (page: Page): string => new URL(page.url()).pathname.split('/').pop() ?? ''

async function submitAndApprove(page: Page, sentence: string): Promise<void> {
  const id = idOf(page)
  await page.getByRole('button', { name: 'Submit for review' }).click()
  await page.getByText('submitted', { exact: true }).first().waitFor()
  const reviewer = await as('approver', `/review/${id}`)
  // The second person sees the same before deciding.
  await reviewer.getByText(sentence).waitFor()
  await reviewer.getByRole('button', { name: /^Approve/ }).click()
  const form = reviewer.getByRole('form', { name: 'Approve' })
  await form.getByRole('button', { name: 'Approve' }).click()
  await reviewer.getByText(/Approved as revision \d+\./).first().waitFor()
  await reviewer.context().close()
}

/** The table of what moves, as it is saved: by galaxy, its moduli before and after. */
async function savedShifts(page: Page): Promise<string[]> {
  const download = page.waitForEvent('download')
  await page.getByRole('button', { name: 'Save as TSV' }).first().click()
  const text = await readFile(await (await download).path(), 'utf8')
  const [head = '', ...lines] = text.trimEnd().split('\n')
  const at = (name: string): number => head.split('\t').findIndex((h) => h.startsWith(name))
  const [name, before, after] = [at('Galaxy'), at('μ before'), at('μ after')]
  return lines.map((line) => line.split('\t')).map((cells) => `${cells[name]} ${Number(cells[before]).toFixed(3)} ${Number(cells[after]).toFixed(3)}`).sort()
}

describe('the scale', () => {
  it('shows what hangs on each anchor, and how it came to be', async () => {
    const page = await as('curator', '/scale')
    const scale = await read<ScaleAnswer>(page, '/api/scale')
    const anchors = page.getByRole('list', { name: 'Anchors' }).getByRole('listitem')
    const [first] = scale.anchors
    expect(await anchors.count()).toBe(scale.anchors.length)
    await anchors.filter({ hasText: first?.label ?? '' }).getByText(String(first?.galaxies), { exact: true }).waitFor()
    expect(await page.getByRole('img', { name: /methods in \d tiers/ }).count()).toBe(1)
    await page.getByText('The scale that the catalogue starts with').waitFor()
    await page.getByRole('link', { name: `Propose another value of ${first?.label ?? ''}` }).click()
    await page.getByRole('heading', { level: 1, name: 'Propose a change of the scale' }).waitFor()
    await page.context().close()
  })

  it('a steward raises one anchor by 0.05 mag and sees, before approval, exactly which galaxies move by how much; after a second person’s approval the catalogue shows exactly those values', async () => {
    const page = await as('steward', '/scale/propose')
    const before = await wholeCatalogue(page)
    const scale = await read<ScaleAnswer>(page, '/api/scale')
    const trgb = scale.anchors.find((a) => a.key === 'trgb-absolute-i')
    if (!trgb) throw new Error('the demonstration has an anchor of the TRGB')
    const sheet = page.getByRole('region').or(page.locator('section')).filter({ has: page.getByRole('heading', { name: trgb.label }) }).last()
    await sheet.getByLabel('Value', { exact: true }).fill(String(Number((trgb.value + 0.05).toFixed(6))))
    await sheet.getByText(/^\+0\.05\smag: distances by TRGB shrink by 2\.3\s%$/).waitFor()
    // Nothing typed is lost by a reload, and nothing is saved without a reason.
    await page.waitForTimeout(600)
    await page.reload()
    await sheet.getByText(/^\+0\.05\smag/).waitFor()
    const save = page.getByRole('button', { name: 'Save as a draft and see the effect' })
    await save.click()
    await page.getByText('Give the reason, in a few words at least.').waitFor()
    await page.getByLabel('Reason').fill('A newer calibration of the tip')
    await save.click()
    await page.getByRole('heading', { name: 'How far each galaxy moves' }).waitFor()

    const effect = await read<Effect>(page, `/api/submissions/${idOf(page)}/effect`)
    expect(effect.counts.distancesMoved).toBe(effect.shifts.length)
    expect(effect.shifts.length).toBeGreaterThan(50)
    const sentence = await page.getByText(/^\d+ of \d+ galaxies move, by −0\.05\d to/).innerText()
    expect(sentence).toContain(`${effect.shifts.length} of ${scale.galaxies} galaxies move`)
    expect(await savedShifts(page)).toEqual(effect.shifts.map((s) => `${s.name} ${s.before.toFixed(3)} ${s.after.toFixed(3)}`).sort())
    // From galaxy to galaxy by keys.
    await page.getByRole('slider', { name: 'Galaxies that move, by distance' }).focus()
    await page.keyboard.press('ArrowRight')
    const nearest = [...effect.shifts].sort((a, b) => a.distance - b.distance)[0]
    expect(await page.getByRole('slider', { name: 'Galaxies that move, by distance' }).getAttribute('aria-valuetext')).toContain(nearest?.name)
    await page.reload()
    await page.getByRole('heading', { name: 'How far each galaxy moves' }).waitFor()
    expect(await violationsOf(page)).toEqual([])

    expect(await wholeCatalogue(page)).toEqual(before)
    await submitAndApprove(page, sentence)
    const after = await wholeCatalogue(page)
    expect(movesOf(before, after)).toEqual(foretold(effect))
    for (const s of effect.shifts) expect([s.slug, Number(after.get(s.slug)?.['dm']).toFixed(3)]).toEqual([s.slug, s.after.toFixed(3)])
    await goTo(page, '/scale')
    await page.getByText(`Scale: ${trgb.label}`).first().waitFor()
    expect((await read<ScaleAnswer>(page, '/api/scale')).anchors.find((a) => a.key === trgb.key)?.value).toBeCloseTo(trgb.value + 0.05, 9)
    await page.context().close()
  })

  it('a curator corrects one measurement of a host and the effect lists every satellite whose separation or membership moves, equal to what then happens', async () => {
    const page = await as('curator', '/galaxies/ostrel')
    const before = await wholeCatalogue(page)
    const { measurements } = await read<{ measurements: MeasurementAnswer[] }>(page, '/api/galaxies/ostrel/measurements')
    const wrong = measurements.find((m) => m.quantity === 'distance_modulus' && m.method === before.get('ostrel')?.['distance_method'] && m.published?.unit === 'mag')
    if (!wrong) throw new Error('the demonstration has a distance of this host')
    await page.getByRole('link', { name: `Mend the distance modulus of ${wrong.source.label}` }).first().click()
    await page.getByRole('button', { name: 'Begin the draft' }).click()
    await page.getByLabel('Value, as published').fill(((wrong.published?.value ?? 0) + 0.1).toFixed(3))
    await page.getByLabel('Reason').fill('A slip of the key, see table 2')
    await page.getByRole('button', { name: 'Add to the draft' }).click()
    await page.getByText('Everything that would differ').or(page.getByText(/galax(y|ies) changed/)).first().waitFor()

    const effect = await read<Effect>(page, `/api/submissions/${idOf(page)}/effect`)
    const satellites = effect.galaxies.filter((g) => before.get(g.slug)?.['host'] === 'ostrel' && g.changes.some((c) => c.column === 'host_sep' || c.column === 'host_probability' || c.column === 'host'))
    expect(satellites.length).toBeGreaterThan(1)
    const more = page.getByRole('button', { name: /^Show .* more galax/ })
    while ((await more.count()) > 0) await more.click()
    for (const s of satellites) expect(await page.getByRole('link', { name: s.name, exact: true }).count(), s.name).toBeGreaterThan(0)

    await submitAndApprove(page, await page.getByText(/galax(y|ies) changed/).first().innerText())
    expect(movesOf(before, await wholeCatalogue(page))).toEqual(foretold(effect))
    await page.context().close()
  })

  it('a curator overrides a value of a galaxy from its page, and the draft says what is chosen instead', async () => {
    const page = await as('curator', '/galaxies/ostrel')
    const { measurements } = await read<{ measurements: MeasurementAnswer[] }>(page, '/api/galaxies/ostrel/measurements')
    const chosen = measurements.find((m) => m.quantity === 'velocity' && m.excludedReason === null && m.limitFlag === null)
    if (!chosen) throw new Error('the demonstration has a velocity of this host')
    await page.getByRole('group').filter({ hasText: 'Heliocentric velocity' }).locator('summary').first().click()
    await page.getByRole('link', { name: 'Override the heliocentric velocity' }).click()
    await page.getByRole('button', { name: 'Begin the draft' }).click()
    await page.getByRole('button', { name: 'Add to the draft' }).click()
    await page.getByText('Choose at least one measurement.').waitFor()
    await page.getByRole('checkbox', { name: new RegExp(chosen.source.label.replace(/[.*+?^${}()|[\]\\]/g, '\\$&')) }).first().check({ force: true })
    await page.getByLabel('Reason').fill('The other spectrum is of a foreground star')
    await page.getByRole('button', { name: 'Add to the draft' }).click()
    await page.getByRole('article').filter({ hasText: 'override of the heliocentric velocity' }).getByText(', by an override').waitFor()
    await page.reload()
    await page.getByRole('heading', { name: 'Effect if approved' }).waitFor()
    expect(await violationsOf(page)).toEqual([])
    await page.context().close()
  })
})

it.each([['light', 1440], ['dark', 390]] as const)('its pages are accessible and fit their window, %s, %i px', async (colorScheme, width) => {
  const page = await as('steward', '/scale', { colorScheme, viewport: { width, height: 900 } })
  for (const path of ['/scale', '/scale/propose', '/scale/propose?anchor=lmc-modulus']) {
    await goTo(page, path)
    expect(await violationsOf(page), path).toEqual([])
    expect(await overflowOf(page), path).toBeLessThanOrEqual(0)
  }
  await page.context().close()
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
