import { expect, expectAccessible, expectNoSidewaysScrolling, figureOf, goTo, openSample, test } from './fixtures'
import type { Page } from '@playwright/test'

/** Begins with a topology from Start; those that the quick start knows are proposed first. */
async function begin(page: Page, name: string, scheme: 'Voltage mode' | 'Peak current mode'): Promise<void> {
  await page.goto('/start')
  await page.getByRole('radio', { name: new RegExp(`^${name}\\.`) }).click()
  await page.getByRole('radio', { name: scheme }).click()
  const propose = page.getByRole('button', { name: 'Propose a power stage' })
  if (await propose.isVisible()) await propose.click()
  await page.getByRole('button', { name: 'Begin with this stage' }).click()
  await expect(page.getByRole('heading', { name: 'Power stage' })).toBeVisible()
}

const PARTS: Readonly<Record<string, readonly RegExp[]>> = {
  Buck: [/^Switch,/, /^Rectifier,/, /^Inductor,/],
  Boost: [/^Switch,/, /^Rectifier,/, /^Inductor,/],
  'Buck-boost': [/^Switch,/, /^Rectifier,/, /^Inductor,/],
  Flyback: [/^Switch,/, /^Rectifier,/, /^Magnetising inductance,/, /^Transformer, 1 : 0.5/],
  Forward: [/^Switch,/, /^Forward rectifier/, /^Freewheeling rectifier,/, /^Inductor,/, /^Transformer,/],
  SEPIC: [/^Switch,/, /^Rectifier,/, /^First inductor,/, /^Coupling capacitor,/, /^Second inductor,/],
  Ćuk: [/^Switch,/, /^Rectifier,/, /^First inductor,/, /^Coupling capacitor,/, /^Second inductor,/],
}

for (const [name, parts] of Object.entries(PARTS)) {
  test(`${name} from Start: drawn with every part, computed, accessible`, async ({ page }) => {
    test.slow() // the check of access itself takes seconds on a busy machine
    await begin(page, name, 'Voltage mode')
    await expect(figureOf(page, 'Duty cycle')).toContainText(/0\.\d/)
    const schematic = page.getByRole('group', { name: 'Schematic of the power stage' })
    for (const part of parts) await expect(schematic.getByRole('button', { name: part })).toBeVisible()
    await expectAccessible(page)
    await expectNoSidewaysScrolling(page)
    await schematic.getByRole('button', { name: parts.at(-1)! }).click()
    await expect(page.getByRole('dialog').getByRole('textbox').first()).toBeVisible()
    await page.keyboard.press('Escape')
    await goTo(page, 'Plant')
    await expect(page.getByRole('heading', { name: 'Closed forms' })).toBeVisible()
    await expect(page.getByRole('list', { name: 'Poles and zeros of the plant' })).toContainText('Hz')
    await expectNoSidewaysScrolling(page)
  })
}

test('a flyback with optocoupler gets its network from the wizard, and no type I is offered', async ({ page }) => {
  test.slow()
  await begin(page, 'Flyback', 'Peak current mode')
  await expect(page.getByRole('button', { name: /^Error amplifier, Optocoupler/ })).toBeVisible()
  await goTo(page, 'Loop')
  await expect(page.getByRole('radio', { name: 'II', exact: true })).toBeVisible()
  await expect(page.getByRole('radio', { name: 'I', exact: true })).toBeHidden()
  await page.getByRole('button', { name: 'Propose parts' }).click()
  const table = page.getByRole('table', { name: 'Networks compared' })
  await expect(table.getByRole('row').nth(1)).toContainText('recommended')
  await page
    .getByRole('button', { name: /^Use these parts: Type II/ })
    .first()
    .click()
  await expect(page.getByRole('region', { name: /^Type II network, optocoupler/ })).toBeVisible()
  await expect(page.getByRole('img', { name: /^Type II network: .*C1/ })).toBeVisible()
  await expect(figureOf(page, 'Phase margin')).toContainText(/holds|tight/)
  await expectAccessible(page)
  await expectNoSidewaysScrolling(page)
})

test('an undamped input filter is found, and the suggested damping holds', async ({ page }) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await page.getByRole('button', { name: 'Add an input filter' }).click()
  const check = page.getByRole('group', { name: 'Check of the input filter' })
  await expect(check).toContainText(/short|tight/)
  await check.getByRole('button', { name: 'Apply the suggested damping' }).click()
  await expect(check).toContainText('holds')
  await expect(page.getByRole('button', { name: /^Damping branch,/ })).toBeVisible()
  await page.getByRole('button', { name: 'Remove the input filter' }).click()
  await expect(check).toBeHidden()
})

test('another topology keeps line and load, and fills in what it needs', async ({ page }) => {
  await openSample(page, 'Telemetry radio rail, 24 V to 5 V')
  await page.getByLabel('Topology', { exact: true }).click()
  await page.getByRole('option', { name: 'SEPIC' }).click()
  await expect(page.getByLabel('Nominal line')).toHaveValue('24 V')
  await expect(page.getByRole('button', { name: /^Second inductor, 10 µH/ })).toBeVisible()
  await expect(page.getByRole('button', { name: /^Coupling capacitor, 22 µF/ })).toBeVisible()
  await expect(figureOf(page, 'Duty cycle')).toContainText(/0\.1[78]/) // 5 V/(24 V + 5 V), losses on top
})
