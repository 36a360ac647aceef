/** The ring solve in Debian's Chromium: 8 rings of 6 segments and 5 layers, and 200 of a size run. A guard is a ratio to Node in the same run. */
import { chromium } from '@playwright/test'
import { build } from 'esbuild'
import { medianOfFresh } from './wide-rings'

const { outputFiles } = await build({
  entryPoints: ['tests/bench/wide-rings.ts'],
  bundle: true,
  write: false,
  format: 'iife',
  globalName: 'rings',
  target: 'es2022',
})
const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-dev-shm-usage', '--disable-gpu', '--disable-background-networking'],
})
const page = await browser.newPage()
await page.addScriptTag({ content: outputFiles[0]!.text })
let failed = false
for (const [what, count, sewn] of [
  ['rings: 8 levels, 6 segments, 5 layers, cut from hold (under 1 ms)', 8, 0],
  ['the same with channels sewn to one layer', 8, 12],
  ['rings: 200 of a size run (under 20 ms)', 200, 0],
] as const) {
  const here = medianOfFresh(count, sewn)
  const there = await page.evaluate(
    ([rings, width]) => (window as unknown as { rings: { medianOfFresh: typeof medianOfFresh } }).rings.medianOfFresh(rings!, width),
    [count, sewn],
  )
  const over = there / here > 3
  failed ||= over
  console.log(`${there.toFixed(2)} ms in the browser, ${here.toFixed(2)} ms in Node (guard ×3)  ${what}${over ? '  OVER' : ''}`)
}
await browser.close()
process.exit(failed ? 1 : 0)
