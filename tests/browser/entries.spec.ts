import { expect, figureOf, forgive, goTo, openSample, test } from './fixtures'

const LOGIC_RAIL = 'Logger logic rail, 12 V to 3.3 V'

test.describe('an entry that cannot be used stays as typed and says why', () => {
  const cases = [
    { typed: 'plenty', says: /not a number/ },
    { typed: '', says: /Enter an inductance/ },
    { typed: '-4.7u', says: /greater than zero|at least/ },
    { typed: '0', says: /greater than zero|at least/ },
    { typed: '4e9 H', says: /at most/ },
    { typed: '22 µF', says: /That is a capacitance; this field needs an inductance/ },
    { typed: '1e400', says: /too large/ },
  ]
  for (const { typed, says } of cases) {
    test(`inductance "${typed}"`, async ({ page }) => {
      await openSample(page, LOGIC_RAIL)
      const field = page.getByLabel('Inductance', { exact: true })
      await field.fill(typed)
      await field.blur()
      await expect(field).toHaveValue(typed)
      await expect(field).toHaveAttribute('aria-invalid', 'true')
      await expect(field).toHaveAccessibleDescription(says)
      await page.reload()
      await expect(page.getByLabel('Inductance', { exact: true })).toHaveValue(typed)
    })
  }
})

test('values are taken as engineers write them, the decimal comma included', async ({ page }) => {
  await openSample(page, LOGIC_RAIL)
  const field = page.getByLabel('Inductance', { exact: true })
  const ripple = figureOf(page, 'Inductor ripple')
  await expect(ripple).toContainText('2.22 A')
  await field.fill('4,4 u')
  await expect(ripple).toContainText('1.11 A') // twice the inductance, half the ripple
  await field.blur()
  await expect(field).toHaveValue('4.4 µH')
})

test('a buck above its line is refused at the field, and the last figures stay', async ({ page, consoleMessages }) => {
  await openSample(page, LOGIC_RAIL)
  const field = page.getByLabel('Output voltage')
  await expect(figureOf(page, 'Duty cycle')).toContainText('0.2864')
  await field.fill('14')
  await expect(field).toHaveAttribute('aria-invalid', 'true')
  await expect(field).toHaveValue('14')
  await expect(page.getByText('This design cannot be computed as it stands')).toBeVisible()
  await expect(figureOf(page, 'Duty cycle')).toContainText('0.2864')
  forgive(consoleMessages, /status of 422/)
})

test('a line above the highest is held back until the highest follows', async ({ page }) => {
  await openSample(page, LOGIC_RAIL)
  const duty = figureOf(page, 'Duty cycle')
  await expect(duty).toContainText('0.2864')
  await page.getByLabel('Nominal line').fill('24')
  await expect(
    page.getByText('One entry is not used yet').or(page.getByText('Some entries are not used yet')),
  ).toBeVisible()
  await page.getByLabel('Highest line').fill('30')
  await expect(duty).toContainText('24.0 V')
  await expect(page.getByText(/not used yet/)).toBeHidden()
})

test('a part is changed from the schematic', async ({ page }) => {
  await openSample(page, LOGIC_RAIL)
  await page.getByRole('button', { name: /^Output capacitors, .* Change$/ }).click()
  const sheet = page.getByRole('dialog')
  await sheet.getByLabel('ESR, each').fill('10m')
  await page.keyboard.press('Escape')
  await expect(sheet).toBeHidden()
  await expect(page.getByRole('button', { name: /^Output capacitors, .*ESR 10 mΩ/ })).toBeVisible()
})

test('banks of output capacitors are added and taken away', async ({ page }) => {
  await openSample(page, LOGIC_RAIL)
  await page.getByRole('button', { name: 'Add a bank' }).click()
  await page.getByRole('group', { name: 'Bank 2' }).getByLabel('Capacitance, each').fill('330u')
  await expect(page.getByRole('button', { name: /bank 2, 4 × 330 µF/ })).toBeVisible()
  await page.getByRole('button', { name: 'Remove bank 1' }).click()
  await expect(page.getByRole('button', { name: /^Output capacitors, 4 × 330 µF/ })).toBeVisible()
})

test('slope compensation that is missing is named when the orbit is not stable', async ({ page }) => {
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await page.getByLabel('Slope compensation').fill('0')
  await expect(page.getByText('Subharmonic oscillation', { exact: true })).toBeVisible()
  await goTo(page, 'Plant')
  await expect(page.getByText('Subharmonic oscillation', { exact: true })).toBeVisible()
})
