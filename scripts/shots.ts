/** Screenshots of every screen in both themes and four widths, to shots/; the bench also to public/bench.png. Takes the address and a part of a name. */
import { mkdirSync } from 'node:fs'
import { chromium, type Page } from '@playwright/test'
import { demoPages } from './lib/demo-pages'

const [base = 'http://127.0.0.1:3000', only = ''] = process.argv.slice(2)
const { goto, record, wearer, bench, signIn } = demoPages(base)
const widths = { wide: [1440, 900], laptop: [1366, 768], tablet: [820, 1180], phone: [390, 844] } as const
const themes = ['light', 'dark'] as const

interface Screen {
  readonly name: string
  readonly open: (page: Page) => Promise<void>
  readonly signedOut?: boolean
}

const screens: readonly Screen[] = [
  { name: 'sign-in', open: goto('/sign-in'), signedOut: true },
  { name: 'home', open: goto('/') },
  { name: 'clients', open: goto('/clients') },
  { name: 'client', open: record('clients') },
  { name: 'wearer', open: wearer() },
  { name: 'measure', open: wearer('/measure') },
  { name: 'cloths', open: goto('/cloths') },
  { name: 'cloth', open: record('cloths') },
  { name: 'garments', open: goto('/garments') },
  { name: 'garment-new', open: goto('/garments/new') },
  { name: 'garment-bring-in', open: goto('/garments/bring-in') },
  { name: 'bench-body', open: bench('body') },
  { name: 'bench-cloth', open: bench('cloth') },
  { name: 'bench-layers', open: bench('layers') },
  { name: 'bench-draft', open: bench('draft') },
  { name: 'bench-cut', open: bench('cut') },
  {
    name: 'bench-fit',
    open: async (page) => {
      await bench('fit')(page)
      const option = page.getByLabel('Version that fitted').locator('option').filter({ hasText: 'Mock-up that fits' })
      await page.getByLabel('Version that fitted').selectOption(await option.getAttribute('value'))
      await page.waitForTimeout(500)
    },
  },
  {
    name: 'bench-trial',
    open: async (page) => {
      await bench('layers')(page)
      await page.getByRole('button', { name: 'What if' }).click()
      await page
        .getByRole('listitem', { name: /^Layer 2,/ })
        .getByLabel('Count')
        .selectOption('3')
    },
  },
  { name: 'api-guide', open: goto('/api-guide') },
]

const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-dev-shm-usage', '--disable-gpu', '--disable-background-networking'],
})
mkdirSync('shots', { recursive: true })
for (const theme of themes) {
  const context = await browser.newContext({ colorScheme: theme, locale: 'en-GB' })
  const page = await context.newPage()
  const faults: string[] = []
  page.on('console', (message) => message.type() === 'error' && faults.push(`${page.url()}: ${message.text()}`))
  page.on('pageerror', (error) => faults.push(`${page.url()}: ${error.message}`))
  let signedIn = false
  for (const screen of screens) {
    if (only && !screen.name.includes(only)) continue
    if (!screen.signedOut && !signedIn) {
      await signIn(page)
      signedIn = true
    }
    for (const [name, [width, height]] of Object.entries(widths)) {
      await page.setViewportSize({ width, height })
      await screen.open(page)
      const isBench = screen.name.startsWith('bench')
      await page.screenshot({ path: `shots/${screen.name}-${name}-${theme}.png`, fullPage: !isBench })
      if (screen.name === 'bench-draft' && name === 'wide' && theme === 'light') await page.screenshot({ path: 'public/bench.png' })
    }
    console.log(`${screen.name}, ${theme}`)
  }
  for (const fault of new Set(faults)) console.log('console:', fault)
  await context.close()
}
await browser.close()
