import { mkdirSync } from 'node:fs'
import { chromium, type Page } from '@playwright/test'

const [base = 'http://127.0.0.1:3000', only = ''] = process.argv.slice(2)
const widths = { wide: [1440, 900], laptop: [1366, 768], tablet: [820, 1180], phone: [390, 844] } as const
const themes = ['light', 'dark'] as const

interface Screen {
  readonly name: string
  readonly open: (page: Page) => Promise<void>
  readonly signedOut?: boolean
}

const goto = (path: string) => async (page: Page) => {
  await page.goto(base + path, { waitUntil: 'networkidle' })
}

/** Address of the first record that a list of the screen leads to. */
async function firstOf(page: Page, kind: 'clients' | 'wearers' | 'cloths' | 'garments'): Promise<string> {
  const links = await page.locator(`main a[href^="/${kind}/"]`).evaluateAll((all) => all.map((one) => one.getAttribute('href') ?? ''))
  const found = links.find((link) => /\/[0-9a-f]{8}-[0-9a-f-]{27}$/.test(link))
  if (!found) throw new Error(`${page.url()} leads to none of ${kind}`)
  return found
}
const record =
  (kind: 'clients' | 'cloths', suffix = '') =>
  async (page: Page) => {
    await goto(`/${kind}`)(page)
    await goto((await firstOf(page, kind)) + suffix)(page)
    await page.waitForTimeout(400)
  }
const wearer =
  (suffix = '') =>
  async (page: Page) => {
    await record('clients')(page)
    await goto((await firstOf(page, 'wearers')) + suffix)(page)
  }
const bench = (step: string) => async (page: Page) => {
  await goto('/garments')(page)
  await goto(`${await firstOf(page, 'garments')}?step=${step}`)(page)
  await page.waitForTimeout(700)
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
  { name: 'bench-body', open: bench('body') },
  { name: 'bench-cloth', open: bench('cloth') },
  { name: 'bench-layers', open: bench('layers') },
  { name: 'bench-draft', open: bench('draft') },
  { name: 'bench-cut', open: bench('cut') },
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
  const me = (await (await page.request.get(`${base}/api/session`)).json()) as {
    demoSignIns: { email: string; password: string; role: string }[]
  }
  const drafter = me.demoSignIns.find((one) => one.role === 'owner')
  if (!drafter) throw new Error('The shots need the demo sign-ins.')
  let signedIn = false
  for (const screen of screens) {
    if (only && !screen.name.includes(only)) continue
    if (!screen.signedOut && !signedIn) {
      await page.request.post(`${base}/api/session`, {
        data: { email: drafter.email, password: drafter.password },
        headers: { origin: base },
      })
      signedIn = true
    }
    for (const [name, [width, height]] of Object.entries(widths)) {
      await page.setViewportSize({ width, height })
      await screen.open(page)
      await page.screenshot({ path: `shots/${screen.name}-${name}-${theme}.png`, fullPage: !screen.name.startsWith('bench') })
    }
    console.log(`${screen.name}, ${theme}`)
  }
  for (const fault of new Set(faults)) console.log('console:', fault)
  await context.close()
}
await browser.close()
