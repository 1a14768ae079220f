/** Measures what the product promises about speed and size: npm run bench. Fails when a goal is missed. */
import { measureBundle } from '@/scripts/bench/bundle'
import { measureEngine } from '@/scripts/bench/engine'
import { printTable } from '@/scripts/bench/line'
import { measureLoad } from '@/scripts/bench/load'
import { measureRedraw } from '@/scripts/bench/redraw'
import { measureSpread } from '@/scripts/bench/spread'
import { startProduct } from '@/scripts/browser/product'

const engine = await measureEngine()
const spread = await measureSpread()
const bundle = await measureBundle()
const product = await startProduct()
try {
  // First what one person sees, then the crowd, so that the second does not warm up the first.
  const redraw = await measureRedraw(product)
  const load = await measureLoad(product, engine[0]?.measured ?? NaN)
  if (!printTable([...engine, ...spread, ...load, ...bundle, ...redraw])) process.exitCode = 1
} finally {
  await product.stop()
}
