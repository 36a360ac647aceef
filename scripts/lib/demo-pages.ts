import type { Page } from '@playwright/test'

/** Ways to the demo's screens for scripts that drive a browser; `base` is the address of the server. */
export function demoPages(base: string) {
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
  const record = (kind: 'clients' | 'cloths') => async (page: Page) => {
    await goto(`/${kind}`)(page)
    await goto(await firstOf(page, kind))(page)
  }
  const wearer =
    (suffix = '') =>
    async (page: Page) => {
      await record('clients')(page)
      await goto((await firstOf(page, 'wearers')) + suffix)(page)
    }
  /** A step of the bench, of the garment of this code. */
  const bench =
    (step: string, code = 'LS-032') =>
    async (page: Page) => {
      await goto('/garments')(page)
      const href = await page.locator('main a[href^="/garments/"]').filter({ hasText: code }).first().getAttribute('href')
      await goto(`${href}?step=${step}`)(page)
      await page.waitForTimeout(700)
    }
  async function signIn(page: Page): Promise<void> {
    const me = (await (await page.request.get(`${base}/api/session`)).json()) as {
      demoSignIns: { email: string; password: string; role: string }[]
    }
    const owner = me.demoSignIns.find((one) => one.role === 'owner')
    if (!owner) throw new Error('This needs the demo sign-ins.')
    await page.request.post(`${base}/api/session`, { data: { email: owner.email, password: owner.password }, headers: { origin: base } })
  }
  return { goto, record, wearer, bench, signIn }
}
