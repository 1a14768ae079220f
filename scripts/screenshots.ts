/** Takes the pictures of README.md: npm run screenshots. Phone and wide, light and dark, written to docs/screenshots. */
import { mkdir } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'

import type { Browser, Page } from 'playwright-core'

import { SAMPLES } from '@/db/seed/samples'
import { launchChromium, openDesign, openScreen, PHONE, WIDE } from '@/scripts/browser/chromium'
import { type Product, startProduct } from '@/scripts/browser/product'

const folder = fileURLToPath(new URL('../docs/screenshots/', import.meta.url))
const SIZES = { phone: PHONE, wide: WIDE } as const
const SCHEMES = ['light', 'dark'] as const

/** Loads the screen afresh, so that it stands at its top; once nothing is loading, the picture no longer changes. */
async function shoot(page: Page, name: string): Promise<void> {
  await page.reload({ waitUntil: 'networkidle' })
  await page.waitForFunction(() => document.querySelector('[aria-busy="true"]') === null)
  await page.evaluate(() => document.fonts.ready)
  await page.screenshot({ path: `${folder}${name}.png`, animations: 'disabled' })
}

/** Has the wizard propose parts for the open design and takes the first network over. */
async function closeLoop(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Propose parts' }).click()
  await page.getByRole('button', { name: 'Use these parts' }).first().click()
  await page.getByText('Phase margin').first().waitFor()
}

async function shootAll(browser: Browser, { origin }: Product): Promise<void> {
  const [sample] = SAMPLES
  if (!sample) throw new Error('There is no sample to show.')
  for (const [size, options] of Object.entries(SIZES)) {
    for (const colorScheme of SCHEMES) {
      const context = await browser.newContext({ ...options, colorScheme, reducedMotion: 'reduce' })
      const page = await context.newPage()
      const name = (screen: string) => `${screen}-${size}-${colorScheme}`
      await page.goto(origin)
      await shoot(page, name('landing'))
      await openDesign(page, origin, sample.design)
      await shoot(page, name('stage'))
      await openScreen(page, 'Plant')
      await shoot(page, name('plant'))
      await openScreen(page, 'Loop')
      await closeLoop(page)
      await shoot(page, name('loop'))
      await openScreen(page, 'Spread')
      await shoot(page, name('spread'))
      await context.close()
    }
  }
}

await mkdir(folder, { recursive: true })
const product = await startProduct()
const browser = await launchChromium()
try {
  await shootAll(browser, product)
} finally {
  await browser.close()
  await product.stop()
}
