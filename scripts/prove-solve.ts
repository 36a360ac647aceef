/**
 * The solve route under an open loop: so many requests a second whether or not the last have answered, for so long; latency from when each
 * was due. Takes the address of a server with the demo; rate and seconds may follow. Only ever against this machine.
 */
import { demoPages } from './lib/demo-pages'
import { chromium } from '@playwright/test'

const [base = 'http://127.0.0.1:3000', rate = '100', seconds = '20'] = process.argv.slice(2)
if (!/^http:\/\/(127\.0\.0\.1|localhost|\[::1\])(:|$)/.test(base)) throw new Error('Only against this machine.')

const browser = await chromium.launch({ executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium', args: ['--no-sandbox'] })
const page = await browser.newPage()
await demoPages(base).signIn(page)
const { items } = (await (await page.request.get(`${base}/api/garments`)).json()) as { items: { id: string; code: string }[] }
const garment = items.find((one) => one.code === 'LS-032')!
const copy = (await (await page.request.get(`${base}/api/garments/${garment.id}/working-copy`)).json()) as {
  input: { measured: unknown; settings: unknown; document: unknown }
  solution: { ringInputs: { level: string }[]; rings: { level: string }[] }
}
const cookie = (await page.context().cookies()).map((one) => `${one.name}=${one.value}`).join('; ')
await browser.close()

const body = JSON.stringify({
  rings: copy.solution.ringInputs.map((geometry) => ({ geometry, mode: { solve: 'cut', hold: 900 } })),
  settings: copy.input.settings,
})
const ask = async (): Promise<boolean> => {
  const answer = await fetch(`${base}/api/solve/rings`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: base, cookie },
    body,
  })
  await answer.arrayBuffer()
  return answer.ok
}
for (let warm = 0; warm < 50; warm++) await ask()

const every = 1000 / Number(rate)
const count = Math.min(20_000, Number(rate) * Number(seconds))
const latencies: number[] = []
let failed = 0
const began = performance.now()
await Promise.all(
  Array.from({ length: count }, async (_, i) => {
    const due = began + i * every
    await new Promise((wait) => setTimeout(wait, Math.max(0, due - performance.now())))
    const ok = await ask().catch(() => false)
    if (!ok) failed++
    latencies.push(performance.now() - due)
  }),
)
latencies.sort((a, b) => a - b)
const at = (share: number) => latencies[Math.min(latencies.length - 1, Math.floor(share * latencies.length))]!.toFixed(1)
console.log(
  `${count} requests at ${rate} a second: median ${at(0.5)} ms, 95th percentile ${at(0.95)} ms, largest ${at(1)} ms, ${failed} failed`,
)
process.exit(failed > 0 ? 1 : 0)
