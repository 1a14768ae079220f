import { expect, figureOf, forgive, goTo, openSample, test } from './fixtures'

test('the draft survives a reload', async ({ page }) => {
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await page.getByLabel('Inductance', { exact: true }).fill('22u')
  await page.reload()
  await expect(page.getByLabel('Inductance', { exact: true })).toHaveValue('22 µH')
})

test('a copied link opens the same design in another browser', async ({ page, context, browser }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write'])
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await page.getByLabel('Inductance', { exact: true }).fill('3u3')
  await page.getByRole('button', { name: 'Design as a whole' }).click()
  await page.getByRole('dialog').getByRole('button', { name: 'Copy link' }).click()
  await expect(page.getByRole('dialog').getByRole('button', { name: 'Link copied' })).toBeVisible()
  const link = await page.evaluate(() => navigator.clipboard.readText())

  const elsewhere = await (await browser.newContext()).newPage()
  await elsewhere.goto(link)
  await elsewhere.getByRole('button', { name: 'Open this design' }).click()
  await expect(elsewhere.getByLabel('Inductance', { exact: true })).toHaveValue('3.3 µH')
  await elsewhere.context().close()
})

test('a damaged link says so', async ({ page }) => {
  await page.goto('/open#d=bm90IG91cnM')
  await expect(page.getByRole('alert')).toContainText('damaged or incomplete')
})

test('a document is opened from text, and a bad one names its fields', async ({ page, request }) => {
  const { design } = await (await request.get('/api/v1/samples/sensor-boost')).json()
  await page.goto('/open')
  const text = page.getByLabel('Design document, JSON')
  await text.fill('{ "topology": ')
  await page.getByRole('button', { name: 'Read it' }).click()
  await expect(page.getByRole('alert')).toContainText('This is not JSON')
  await text.fill(JSON.stringify({ ...design, switchingFrequency: -1 }))
  await page.getByRole('button', { name: 'Read it' }).click()
  await expect(page.getByRole('alert')).toContainText('Switching frequency')
  await text.fill(JSON.stringify(design))
  await page.getByRole('button', { name: 'Read it' }).click()
  await page.getByRole('button', { name: 'Open this design' }).click()
  await expect(figureOf(page, 'Duty cycle')).toContainText('0.8')
})

test('without a design the screens say so and lead to the start', async ({ page }) => {
  await page.goto('/design/loop')
  await expect(page.getByRole('heading', { name: 'No design is open in this browser' })).toBeVisible()
  await page.getByRole('link', { name: 'Start a design' }).click()
  await expect(page.getByRole('heading', { name: 'Start a design' })).toBeVisible()
})

test('a draft that cannot be read is kept and offered', async ({ page }) => {
  await page.goto('/')
  await page.evaluate(() => localStorage.setItem('steadrail.draft', '{"version":99'))
  await page.goto('/design/stage')
  await expect(page.getByText('The design kept in this browser cannot be read')).toBeVisible()
  expect(await page.evaluate(() => localStorage.getItem('steadrail.draft'))).toBe('{"version":99')
})

test('offline is said, and the figures come when the connection is back', async ({
  page,
  context,
  consoleMessages,
}) => {
  await openSample(page, 'Logger logic rail, 12 V to 3.3 V')
  await expect(figureOf(page, 'Inductor ripple')).toContainText('2.22 A')
  await context.setOffline(true)
  await page.getByLabel('Inductance', { exact: true }).fill('4.4u')
  await expect(page.getByText(/^Offline\./)).toBeVisible()
  await expect(page.getByText('No answer from the server')).toBeVisible()
  await expect(figureOf(page, 'Inductor ripple')).toContainText('2.22 A')
  await context.setOffline(false)
  await expect(figureOf(page, 'Inductor ripple')).toContainText('1.11 A')
  forgive(consoleMessages, /ERR_INTERNET_DISCONNECTED/)
})

test('each screen has its title', async ({ page }) => {
  await page.goto('/')
  await expect(page).toHaveTitle('Feedback loops of switching power supplies · Steadrail')
  await openSample(page, 'Sensor boost, 5 V to 24 V')
  await expect(page).toHaveTitle('Stage · Steadrail')
  await goTo(page, 'Plant')
  await expect(page).toHaveTitle('Plant · Steadrail')
  await goTo(page, 'Loop')
  await expect(page).toHaveTitle('Loop · Steadrail')
})
