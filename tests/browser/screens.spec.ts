import { expect, expectAccessible, expectNoSidewaysScrolling, figureOf, goTo, openSample, test } from './fixtures'

test('first page and start: accessible, nothing scrolls sideways', async ({ page }) => {
  test.slow() // the check of access itself takes seconds on a busy machine
  await page.goto('/')
  await expect(page.getByRole('button', { name: /^Open the sample/ }).first()).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
  await page.goto('/start')
  await page.getByRole('button', { name: 'Propose a power stage' }).click()
  await expect(page.getByRole('region', { name: 'Proposed power stage' })).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
  await page.goto('/open')
  await expectAccessible(page)
})

test('Stage with a part open: accessible, nothing scrolls sideways', async ({ page }) => {
  test.slow() // the check of access itself takes seconds on a busy machine
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await expect(figureOf(page, 'Duty cycle')).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
  await page.getByRole('button', { name: /^Inductor, .* Change$/ }).click()
  await expect(page.getByRole('dialog')).toBeVisible()
  await expectAccessible(page)
})

test('Plant, drawn and as a table: accessible, nothing scrolls sideways', async ({ page }) => {
  test.slow() // the check of access itself takes seconds on a busy machine
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await goTo(page, 'Plant')
  await expect(page.getByRole('heading', { name: 'Closed forms' })).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
  await page.getByRole('button', { name: 'Control to output as table' }).click()
  await expect(page.getByRole('table', { name: 'Control to output' })).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
})

test('Loop with a network: accessible, nothing scrolls sideways', async ({ page }) => {
  test.slow() // the check of access itself takes seconds on a busy machine
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await goTo(page, 'Loop')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts/ })
    .first()
    .click()
  await expect(page.getByRole('heading', { name: 'After a step' })).toBeVisible()
  await expect(page.getByRole('group', { name: /^Line step of/ })).toBeVisible()
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
})

test('nothing scrolls sideways at 360 px', async ({ page }) => {
  await page.setViewportSize({ width: 360, height: 740 })
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  for (const screen of ['Stage', 'Plant', 'Loop'] as const) {
    await goTo(page, screen)
    await expectNoSidewaysScrolling(page)
  }
})

test('a plot is read by keyboard, as a table and as a file', async ({ page }) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Plant')
  const cursor = page.getByRole('slider', { name: 'Control to output: cursor' })
  await cursor.focus()
  const before = await cursor.getAttribute('aria-valuetext')
  await page.keyboard.press('ArrowRight')
  await expect(cursor).not.toHaveAttribute('aria-valuetext', before ?? '')
  await page.keyboard.press('Home')
  await expect(cursor).toHaveAttribute('aria-valuetext', /^10\.0 Hz: switched/)
  const download = page.waitForEvent('download')
  await page.getByRole('button', { name: 'Download Control to output as CSV' }).click()
  expect((await download).suggestedFilename()).toBe('steadrail-control-to-output.csv')
})
