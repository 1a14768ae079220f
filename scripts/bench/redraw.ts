/** From a value typed on the loop screen to the curves that follow from it, in Chromium at the size of a phone. */
import type { Page } from 'playwright-core'

import { type BenchLine, median } from '@/scripts/bench/line'
import { benchDesign } from '@/scripts/bench/subject'
import { launchChromium, openDesign, openScreen, PHONE } from '@/scripts/browser/chromium'
import type { Product } from '@/scripts/browser/product'

const CHANGES = 30
/** Nothing but a curve has a path as long as this. */
const CURVE_LENGTH = 1_000

declare global {
  interface Window {
    /** Durations in ms of the changes so far. */
    redraws: number[]
  }
}

/** Notes, for each input event, when the first frame after a change of a curve is due. */
function watchRedraws(curveLength: number): void {
  window.redraws = []
  let typedAt: number | null = null
  document.addEventListener(
    'input',
    () => {
      typedAt = performance.now()
    },
    true,
  )
  const observer = new MutationObserver((mutations) => {
    const hasCurve = mutations.some(
      ({ target }) => target instanceof SVGPathElement && (target.getAttribute('d') ?? '').length > curveLength,
    )
    if (!hasCurve || typedAt === null) return
    const start = typedAt
    typedAt = null
    requestAnimationFrame(() => window.redraws.push(performance.now() - start))
  })
  observer.observe(document.body, { subtree: true, attributes: true, attributeFilter: ['d'] })
}

async function timeChanges(page: Page): Promise<number[]> {
  const field = page.getByLabel('R2, in series with C1')
  await field.waitFor()
  await page.evaluate(watchRedraws, CURVE_LENGTH)
  for (let change = 0; change < CHANGES; change += 1) {
    await field.fill(change % 2 === 0 ? '13k' : '12k1')
    await page.waitForFunction((count) => window.redraws.length > count, change)
    // What follows more slowly, such as the spread over the corners, is not to fall into the next change.
    await page.waitForLoadState('networkidle')
  }
  return page.evaluate(() => window.redraws)
}

export async function measureRedraw({ origin }: Product): Promise<BenchLine[]> {
  const browser = await launchChromium()
  try {
    const page = await browser.newPage(PHONE)
    await openDesign(page, origin, benchDesign)
    await openScreen(page, 'Loop')
    const redraws = await timeChanges(page)
    const what = 'Changed value to redrawn curves, phone size, median'
    return [{ what, measured: median(redraws), unit: 'ms', goal: 200 }]
  } finally {
    await browser.close()
  }
}
