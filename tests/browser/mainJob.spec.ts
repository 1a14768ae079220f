import { expect, figureOf, goTo, openSample, test } from './fixtures'

test('from the first page to a type III network in preferred values for a 12 V to 3.3 V buck', async ({ page }) => {
  await page.goto('/')
  await page.getByRole('link', { name: 'Start a design' }).click()
  await expect(page.getByLabel('Nominal line')).toHaveValue('12 V')
  await page.getByLabel('Output voltage').fill('3V3')
  await page.getByLabel('Full load').fill('8')
  await page.getByLabel('Switching frequency').fill('500k')
  await page.getByRole('button', { name: 'Propose a power stage' }).click()
  const proposal = page.getByRole('region', { name: 'Proposed power stage' })
  await expect(proposal.getByText('Inductance', { exact: true })).toBeVisible()
  await proposal.getByRole('button', { name: 'Begin with this stage' }).click()

  await expect(figureOf(page, 'Duty cycle')).toContainText(/0\.2[789]\d\d/) // 3.3 V of 12 V, losses on top
  await goTo(page, 'Plant')
  await expect(page.getByRole('list', { name: 'Poles and zeros of the plant' })).toContainText(
    'Output filter pole pair',
  )

  await goTo(page, 'Loop')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts: Type III/ })
    .first()
    .click()
  await expect(page.getByRole('region', { name: /^Type III network, op-amp/ })).toBeVisible()
  // The aim of 55° holds at the nominal point, in parts of the E96 and E12 series.
  await expect(figureOf(page, 'Phase margin')).toContainText(/holds|tight/)
  await expect(page.getByRole('group', { name: 'Loop gain' })).toBeVisible()
  await expect(page.getByRole('group', { name: /^Load step of/ })).toBeVisible()
})

test('the right-half-plane zero of a peak-current-mode boost limits the crossover', async ({ page }) => {
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await goTo(page, 'Plant')
  await expect(page.getByText(/^Right-half-plane zero at .* kHz$/)).toBeVisible()
  await goTo(page, 'Loop')
  const bounds = page.getByRole('list', { name: 'Bounds of the crossover' })
  const deciding = bounds.getByRole('listitem').filter({ hasText: 'right-half-plane zero' })
  await expect(deciding).toContainText('This one decides')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts/ })
    .first()
    .click()
  await expect(figureOf(page, 'Phase margin')).toContainText('holds')
})

test('one figure has one value: crossover and phase margin agree on rule, figures and plot', async ({ page }) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Loop')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts/ })
    .first()
    .click()
  const crossover = await figureOf(page, 'Crossover').getByText('Hz').innerText()
  const margin = await figureOf(page, 'Phase margin')
    .getByText(/^[\d.]+°$/)
    .innerText()
  await expect(page.getByRole('slider', { name: 'Crossover' })).toHaveAttribute(
    'aria-valuetext',
    new RegExp(`^${crossover}`),
  )
  await expect(page.getByRole('group', { name: 'Loop gain' })).toContainText(`phase margin ${margin}`)
  await expect(page.getByText(`${margin} margin`).first()).toBeVisible()
})

test('arrow keys on the rule ask for another crossover, and the network follows', async ({ page }) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Loop')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts/ })
    .first()
    .click()
  const crossover = figureOf(page, 'Crossover').getByText('Hz')
  const before = Number.parseFloat(await crossover.innerText())
  const handle = page.getByRole('slider', { name: 'Crossover' })
  await handle.focus()
  for (let step = 0; step < 12; step += 1) await page.keyboard.press('ArrowLeft')
  // Twelve steps of 1/48 decade are a quarter of a decade.
  const aim = before / 10 ** 0.25
  await expect.poll(async () => Number.parseFloat(await crossover.innerText())).toBeLessThan(1.1 * aim)
  expect(Number.parseFloat(await crossover.innerText())).toBeGreaterThan(0.9 * aim)
  await page.getByRole('button', { name: 'Undo' }).first().click()
})

test('a part set by hand moves the margins at once, and undo brings a proposal back', async ({ page }) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await goTo(page, 'Loop')
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page
    .getByRole('button', { name: /^Use these parts/ })
    .first()
    .click()
  const margin = figureOf(page, 'Phase margin')
  await expect(margin).toContainText('°')
  const before = await margin.innerText()
  await page.getByLabel('R2, in series with C1').fill('100k')
  await expect(margin).not.toHaveText(before)
  await expect(page.getByText('✓ These parts are fitted')).toBeHidden()
})
