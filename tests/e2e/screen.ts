import AxeBuilder from '@axe-core/playwright'
import { expect, type APIRequestContext, type Page } from '@playwright/test'
import { DEMO_ACCOUNTS } from '../../shared/demo'
import type { RouteAnswer } from '../../shared/schemas/routes'

export const drafter = DEMO_ACCOUNTS.find((one) => one.role === 'drafter')!

/** Axe finds nothing on the screen as it stands. */
export async function accessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(', ')}`)).toEqual([])
}

/** Signs the page in as the demo's drafter without going through the form. */
export async function signedIn(page: Page, baseURL: string): Promise<APIRequestContext> {
  const answer = await page.request.post('/api/session', {
    data: { email: drafter.email, password: drafter.password },
    headers: { origin: baseURL },
  })
  expect(answer.ok()).toBe(true)
  return page.request
}

export async function garmentOf(request: APIRequestContext, code: string): Promise<RouteAnswer<'garments.list'>['items'][number]> {
  const { items } = (await (await request.get('/api/garments')).json()) as RouteAnswer<'garments.list'>
  return items.find((one) => one.code === code)!
}

export async function clothOf(request: APIRequestContext, code: string): Promise<RouteAnswer<'cloths.list'>['items'][number]> {
  const { items } = (await (await request.get('/api/cloths')).json()) as RouteAnswer<'cloths.list'>
  return items.find((one) => one.code === code)!
}
