import AxeBuilder from '@axe-core/playwright'
import { expect, test as base, type Page } from '@playwright/test'

/** What axe calls WCAG 2.2, levels A and AA. */
const WCAG = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']

/** Every test ends with a look at the console: an error or a warning there fails it. */
export const test = base.extend<{ consoleMessages: string[] }>({
  consoleMessages: [
    async ({ page }, use) => {
      const messages: string[] = []
      page.on('console', (message) => {
        if (message.type() === 'error' || message.type() === 'warning') messages.push(message.text())
      })
      page.on('pageerror', (error) => messages.push(error.message))
      await use(messages)
      expect(messages).toEqual([])
    },
    { auto: true },
  ],
})
export { expect }

/** No violation of level A or AA, in the light set and in the dark one. */
export async function expectAccessible(page: Page): Promise<void> {
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' })
    const { violations } = await new AxeBuilder({ page }).withTags(WCAG).analyze()
    const found = violations.map(
      ({ id, nodes }) => `${colorScheme} ${id}: ${nodes.map((node) => node.html).join(' | ')}`,
    )
    expect(found).toEqual([])
  }
  await page.emulateMedia({ colorScheme: null, reducedMotion: null })
}

export async function expectNoSidewaysScrolling(page: Page): Promise<void> {
  const over = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
  expect(over).toBe(0)
}

/** Opens a worked sample from the first page. */
export async function openSample(page: Page, title: string): Promise<void> {
  await page.goto('/')
  await page.getByRole('button', { name: `Open the sample ${title}` }).click()
  await expect(page.getByRole('heading', { name: 'Power stage' })).toBeVisible()
}

/** To another screen of the open design. */
export async function goTo(page: Page, screen: 'Stage' | 'Plant' | 'Loop'): Promise<void> {
  await page
    .getByRole('navigation', { name: 'Screens of the design' })
    .getByRole('link', { name: screen, exact: true })
    .click()
}

/** The value of a figure, by its name, as it is printed. */
export function figureOf(page: Page, name: string) {
  return page.getByRole('group', { name, exact: true })
}
