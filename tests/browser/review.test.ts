import type { Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
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

const heading = (page: Page, name: string) => page.getByRole('heading', { level: 1, name })

describe('the queue', () => {
  it('lists what waits, the oldest first, with its cautions', async () => {
    const page = await as('approver', '/review')
    await heading(page, 'TRGB distances of four satellites').waitFor()
    const waiting = page.getByRole('navigation', { name: 'Submissions that wait' }).getByRole('link')
    expect((await waiting.allInnerTexts()).map((text) => text.split('\n')[0])).toEqual([
      'TRGB distances of four satellites', 'Three more satellites, from table 5', 'Two new candidates', 'Distances of four galaxies on a scale of their own', 'A newer zero point of the tip',
    ])
    expect(await waiting.nth(1).innerText()).toMatch(/\d cautions/)
  })

  it('does not hold one’s own work, which says why nobody decides on it himself', async () => {
    const page = await as('steward', '/submissions/new')
    await page.getByLabel('Title').fill('A name from the steward')
    await page.getByRole('button', { name: 'Begin the draft' }).click()
    await page.getByRole('button', { name: 'Name', exact: true }).click()
    const galaxy = page.getByRole('combobox', { name: 'Galaxy' })
    await galaxy.fill('ostrel')
    await page.getByRole('option', { name: /^Ostrel( |$)/ }).first().click()
    await page.getByLabel('Name', { exact: true }).fill('The steward’s own')
    await page.getByRole('button', { name: 'Add to the draft' }).click()
    await page.getByRole('article').filter({ hasText: 'The steward’s own' }).waitFor()
    await page.getByRole('button', { name: 'Submit for review' }).click()
    await page.getByText('submitted', { exact: true }).first().waitFor()
    const id = new URL(page.url()).pathname.split('/').pop() ?? ''
    await goTo(page, `/review/${id}`)
    await page.getByText('You may not review your own submission.', { exact: false }).waitFor()
    expect(await page.getByRole('button', { name: /^Approve/ }).count()).toBe(0)
    expect(await page.getByRole('navigation', { name: 'Submissions that wait' }).getByText('A name from the steward').count()).toBe(0)
  })

  it('is for approvers alone', async () => {
    const page = await as('curator', '/review')
    await page.getByText('Reviewing is for approvers and stewards').waitFor()
  })
})

describe('the bench', () => {
  it('finds the planted slips, moves by keys, and shows the effect before approval', async () => {
    const page = await as('approver', '/review')
    await page.keyboard.press(']')
    await heading(page, 'Three more satellites, from table 5').waitFor()
    const checks = page.getByRole('list', { name: 'Automatic checks' })
    await checks.getByText('Check the unit', { exact: false }).waitFor()
    await page.keyboard.press('j')
    await page.getByRole('article').filter({ hasText: 'Change 2 of 4' }).waitFor()
    expect(await checks.getByText(/^(Caution: )?\d+\.\d σ from .*look at the source again/).count()).toBe(1)
    await page.keyboard.press('j')
    await checks.getByText('hangs on an anchor', { exact: false }).waitFor()
    await page.keyboard.press('k')
    await page.getByRole('article').filter({ hasText: 'Change 2 of 4' }).waitFor()
    await page.getByRole('heading', { name: 'Effect before approval' }).waitFor()
    await page.getByRole('row').filter({ hasText: 'Distance modulus' }).first().waitFor()
  })

  it('returns with a note, which is obligatory and survives a reload, and goes on to the next', async () => {
    const page = await as('approver', '/review')
    await page.keyboard.press(']')
    await heading(page, 'Three more satellites, from table 5').waitFor()
    await page.keyboard.press('r')
    const note = page.getByLabel('What must be mended')
    await page.getByRole('form', { name: 'Return to its author' }).getByRole('button', { name: 'Return' }).click()
    await page.getByText('Say why, so that the author can mend it.').waitFor()
    await note.fill('Row 1 is in megaparsecs, not kiloparsecs.')
    await page.waitForTimeout(600)
    await page.reload()
    await heading(page, 'Three more satellites, from table 5').waitFor()
    await page.getByRole('button', { name: /^Return/ }).click()
    expect(await note.inputValue()).toBe('Row 1 is in megaparsecs, not kiloparsecs.')
    await note.press('Control+Enter')
    await page.getByText(/^Returned to its author\. \d left\.$/).first().waitFor()
    await heading(page, 'Two new candidates').waitFor()
    expect(await page.evaluate(() => document.activeElement?.tagName)).toBe('H1')
    await page.context().close()
    const author = await as('curator', '/submissions')
    await author.getByRole('link', { name: 'Three more satellites, from table 5' }).click()
    await author.getByText('Row 1 is in megaparsecs, not kiloparsecs.').first().waitFor()
  })

  it('does not decide on a version that was not read; the note is kept', async () => {
    const page = await as('approver', '/review')
    await heading(page, 'TRGB distances of four satellites').waitFor()
    await page.keyboard.press('x')
    const note = page.getByLabel('Why it is rejected')
    await note.fill('Typed while it was withdrawn')
    // Meanwhile its author takes it back.
    const id = new URL(page.url()).pathname.split('/').pop()
    const before = chromium.complaints.length
    const author = await as('curator', '/submissions')
    await author.getByRole('link', { name: 'TRGB distances of four satellites' }).click()
    await author.getByRole('button', { name: 'Withdraw' }).click()
    await author.getByText('withdrawn', { exact: true }).first().waitFor()
    await page.bringToFront()
    await note.press('Control+Enter')
    await page.getByRole('alert').getByText('Your note is kept.').or(page.getByText('This submission was withdrawn', { exact: false })).first().waitFor()
    // The browser itself reports the refused request on its console.
    chromium.complaints.splice(before)
    if ((await note.count()) > 0) expect(await note.inputValue()).toBe('Typed while it was withdrawn')
    await goTo(page, `/review/${id}`)
    await page.getByText('This submission was withdrawn', { exact: false }).waitFor()
  })

  it('approves by keys and says which revision that made', async () => {
    const page = await as('approver', '/review')
    await heading(page, 'Two new candidates').waitFor()
    await page.getByText('3 galaxies added', { exact: false }).first().waitFor()
    await page.keyboard.press('a')
    await page.getByText('This makes revision 7', { exact: false }).waitFor()
    await page.keyboard.press('Enter')
    await page.getByText('Approved as revision 7.', { exact: false }).first().waitFor()
    await goTo(page, '/galaxies/candidate-26a')
    await heading(page, 'Candidate 26A').waitFor()
  })
})

it.each([['light', 1440], ['dark', 390]] as const)('is accessible and fits its window, %s, %i px', async (colorScheme, width) => {
  const page = await as('approver', '/review', { colorScheme, viewport: { width, height: 900 } })
  for (const path of ['/review', '/review/2']) {
    await goTo(page, path)
    expect(await violationsOf(page), path).toEqual([])
    expect(await overflowOf(page), path).toBeLessThanOrEqual(0)
  }
})

it('no page complained', () => {
  expect(chromium.complaints).toEqual([])
})
