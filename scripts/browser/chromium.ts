import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core'

import type { DesignDocumentInput } from '@/converters/document'

export const PHONE = {
  viewport: { width: 390, height: 844 },
  hasTouch: true,
  isMobile: true,
  deviceScaleFactor: 2,
} satisfies BrowserContextOptions
export const WIDE = { viewport: { width: 1440, height: 900 } } satisfies BrowserContextOptions

/** Debian's Chromium; the sandbox is left to containers, which often have none. */
export function launchChromium(): Promise<Browser> {
  return chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--no-first-run', '--disable-background-networking'],
  })
}

/** Opens a design the way a person does who has been sent its document. */
export async function openDesign(page: Page, origin: string, design: DesignDocumentInput): Promise<void> {
  await page.goto(`${origin}/open`)
  await page.getByLabel('Design document, JSON').fill(JSON.stringify(design))
  await page.getByRole('button', { name: 'Read it' }).click()
  await page.getByRole('button', { name: 'Open this design' }).click()
  await page.waitForURL('**/design/stage')
}

/** Goes to one of the screens of the open design. */
export async function openScreen(page: Page, name: 'Stage' | 'Plant' | 'Loop' | 'Spread'): Promise<void> {
  await page.getByRole('navigation', { name: 'Screens of the design' }).getByRole('link', { name }).click()
  await page.waitForURL(new RegExp(`/design/${name.toLowerCase()}(\\?|$)`))
}
