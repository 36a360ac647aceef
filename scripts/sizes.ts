/** JavaScript that each screen loads with an empty cache, compressed as gzip would, kB. Takes the address of a server. */
import { gzipSync } from 'node:zlib'
import { chromium } from '@playwright/test'
import { demoPages } from './lib/demo-pages'

const [base = 'http://127.0.0.1:3000'] = process.argv.slice(2)
const { goto, record, wearer, bench, signIn } = demoPages(base)
const screens = {
  'sign-in': goto('/sign-in'),
  home: goto('/'),
  clients: goto('/clients'),
  client: record('clients'),
  wearer: wearer(),
  measure: wearer('/measure'),
  cloths: goto('/cloths'),
  cloth: record('cloths'),
  garments: goto('/garments'),
  'bench, layers': bench('layers'),
  'bench, draft': bench('draft'),
  'bench, cut': bench('cut'),
}
const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-dev-shm-usage', '--disable-gpu', '--disable-background-networking'],
})
for (const [name, open] of Object.entries(screens)) {
  const context = await browser.newContext()
  const page = await context.newPage()
  if (name !== 'sign-in') await signIn(page)
  await open(page)
  const loaded = await page.evaluate(() =>
    [...document.querySelectorAll<HTMLScriptElement>('script[src]')]
      .map((one) => one.src)
      .concat(
        performance
          .getEntriesByType('resource')
          .map((one) => one.name)
          .filter((one) => one.endsWith('.js')),
      ),
  )
  let bytes = 0
  for (const address of new Set(loaded)) bytes += gzipSync(await (await page.request.get(address)).body()).length
  console.log(`${(bytes / 1000).toFixed(0).padStart(5)} kB  ${name}`)
  await context.close()
}
await browser.close()
