import type { Page } from '@playwright/test'
import { expect, expectAccessible, expectNoSidewaysScrolling, figureOf, goTo, openSample, test } from './fixtures'

async function openClosedLoop(page: Page, sample: string): Promise<void> {
  await openSample(page, sample)
  await goTo(page, 'Loop')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts/ })
    .first()
    .click()
  await expect(figureOf(page, 'Phase margin')).toContainText('°')
}

const region = (page: Page, name: string) => page.getByRole('region', { name, exact: true })
const progress = (page: Page) => page.getByRole('progressbar', { name: 'Progress of the run' })
const percent = async (page: Page) => Number(await progress(page).getAttribute('aria-valuenow'))

test('10,000 samples: progress moves, the run is cancelled, run again to its end, and there after a reload', async ({
  page,
}) => {
  test.slow() // 10,000 loops twice, on a machine that runs other tests beside
  await openClosedLoop(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Spread')
  await page.getByRole('radio', { name: 'Samples' }).click()
  await page.getByLabel('Samples', { exact: true }).fill('10000')
  await page.getByRole('button', { name: 'Start the run' }).click()
  await expect.poll(() => percent(page)).toBeGreaterThan(0)
  await page.getByRole('button', { name: 'Cancel the run' }).click()
  await expect(page.getByText('The run was cancelled')).toBeVisible()
  await expect(page.getByText(/^After [\d,]+ of 10,000 samples/)).toBeVisible()

  await page.getByRole('button', { name: 'Run again' }).click()
  await expect.poll(() => percent(page)).toBeGreaterThan(0)
  const before = await percent(page)
  await expect
    .poll(async () => (await progress(page).isVisible()) && (await percent(page)) === before, { timeout: 60_000 })
    .toBe(false)
  // Leaving the page does not end the run.
  await goTo(page, 'Plant')
  await goTo(page, 'Spread')
  await page.getByRole('radio', { name: 'Samples' }).click()
  await expect(region(page, 'Worst sample')).toBeVisible({ timeout: 90_000 })
  const all = figureOf(page, 'All aims hold')
  await expect(all).toContainText('of 10,000')
  const value = await all.innerText()
  await page.reload()
  await expect(figureOf(page, 'All aims hold')).toHaveText(value, { useInnerText: true })
  await expect(page.getByRole('group', { name: 'Loop gain over the samples' })).toBeVisible()
  await expect(page.getByRole('group', { name: 'Closed-loop poles of the samples' })).toBeVisible()
})

test('a changed design marks the result as of an earlier one and offers another run', async ({ page }) => {
  await openClosedLoop(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Spread')
  await page.getByRole('radio', { name: 'Samples' }).click()
  await page.getByLabel('Samples', { exact: true }).fill('100')
  await page.getByRole('button', { name: 'Start the run' }).click()
  await expect(region(page, 'Worst sample')).toBeVisible({ timeout: 60_000 })
  await goTo(page, 'Loop')
  await page.getByLabel('R2, in series with C1').fill('2.2k')
  await goTo(page, 'Spread')
  await page.getByRole('radio', { name: 'Samples' }).click()
  await expect(page.getByText('Of an earlier state of the design')).toBeVisible()
  await page.getByRole('button', { name: 'Run again with the design as it is' }).click()
  await expect(page.getByText('Of an earlier state of the design')).toBeHidden()
  await expect(region(page, 'Worst sample')).toBeVisible({ timeout: 60_000 })
})

test('a number of samples that cannot be run is named beside its entry, and stays as typed', async ({ page }) => {
  await openClosedLoop(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Spread')
  await page.getByRole('radio', { name: 'Samples' }).click()
  const samples = page.getByLabel('Samples', { exact: true })
  await samples.fill('12')
  await expect(page.getByText('Must be at least 100.')).toBeVisible()
  await expect(page.getByRole('button', { name: 'Start the run' })).toBeDisabled()
  await expect(samples).toHaveValue('12')
})

test('without a network the screen says what to do', async ({ page }) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Spread')
  await expect(page).toHaveTitle('Spread · Steadrail')
  await page.getByRole('link', { name: 'Go to Loop' }).click()
  await expect(page.getByText('The loop is open')).toBeVisible()
})

test('the load step is judged against limits that the user sets', async ({ page }) => {
  await openClosedLoop(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Spread')
  await page.getByRole('radio', { name: 'Waveforms' }).click()
  const peak = figureOf(page, 'Peak deviation')
  await page.getByLabel('Allowed deviation').fill('1 V')
  await expect(peak).toContainText('holds')
  await page.getByLabel('Allowed deviation').fill('1 mV')
  await expect(peak).toContainText('short')
  await expect(figureOf(page, 'Largest multiplier')).toContainText('holds')
  await page.getByRole('radio', { name: 'Soft start' }).click()
  await expect(figureOf(page, 'Overshoot')).toBeVisible()
})

test('the root locus is drawn on the closed-loop poles, and says how far the gain may go', async ({ page }) => {
  await openClosedLoop(page, 'Logger logic rail, 12 V to 3.3 V')
  await page.getByRole('button', { name: 'Show the root locus' }).click()
  await expect(page.getByText(/may rise by at least [\d.]+ dB/)).toBeVisible()
})

test('every view of Spread: accessible, nothing scrolls sideways', async ({ page }) => {
  test.slow() // the check of access itself takes seconds on a busy machine
  await openClosedLoop(page, 'Sensor boost, 5 V to 24 V')
  await goTo(page, 'Spread')
  await expect(region(page, 'What makes the worst corner')).toBeVisible({ timeout: 60_000 })
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
  await page.getByRole('radio', { name: 'Samples' }).click()
  await page.getByRole('button', { name: 'Start the run' }).click()
  await expect(progress(page)).toBeVisible()
  await expect(region(page, 'Worst sample')).toBeVisible({ timeout: 90_000 })
  await expect(page.getByRole('group', { name: 'Gain margin', exact: true }).first()).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
  await page.getByRole('radio', { name: 'Waveforms' }).click()
  await expect(page.getByRole('group', { name: 'Inductor peak' })).toBeVisible({ timeout: 60_000 })
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
})
