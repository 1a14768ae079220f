import { AxeBuilder } from '@axe-core/playwright'
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

/** The browser itself reports each answer that is a refusal and each request that could not leave: not our message. */
export function forgive(messages: string[], pattern: RegExp): void {
  const others = messages.filter((message) => !pattern.test(message))
  messages.splice(0, messages.length, ...others)
}

/** No violation of level A or AA in the light set; in the dark set only contrast can differ. */
export async function expectAccessible(page: Page): Promise<void> {
  await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' })
  const inLight = await new AxeBuilder({ page }).withTags(WCAG).analyze()
  await page.emulateMedia({ colorScheme: 'dark', reducedMotion: 'reduce' })
  const inDark = await new AxeBuilder({ page }).withRules(['color-contrast']).analyze()
  await page.emulateMedia({ colorScheme: null, reducedMotion: null })
  const found = [...inLight.violations, ...inDark.violations].map(
    ({ id, nodes }) => `${id}: ${nodes.map((node) => node.html).join(' | ')}`,
  )
  expect(found).toEqual([])
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
export async function goTo(page: Page, screen: 'Stage' | 'Plant' | 'Loop' | 'Spread'): Promise<void> {
  await page
    .getByRole('navigation', { name: 'Screens of the design' })
    .getByRole('link', { name: screen, exact: true })
    .click()
}

/** The value of a figure, by its name, as it is printed. */
export function figureOf(page: Page, name: string) {
  return page.getByRole('group', { name, exact: true })
}
