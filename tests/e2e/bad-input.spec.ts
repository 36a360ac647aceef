/** What people type wrongly, or what changes under their hands: a clear message where it happens, and nothing typed is lost. */
import { expect, test } from '@playwright/test'
import { clothOf, garmentOf, signedIn } from './screen'

test('a form that somebody else saved meanwhile shows both, and saves mine only when told', async ({ page, baseURL }) => {
  const request = await signedIn(page, baseURL!)
  const { items } = (await (await request.get('/api/clients')).json()) as { items: { id: string; name: string }[] }
  const client = items.find((one) => one.name === 'Corvin Aldermoor')!
  await page.goto(`/clients/${client.id}`, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Change' }).click()
  await page.getByLabel('Note').fill('wants the bodice by the spring tide')
  const now = (await (await request.get(`/api/clients/${client.id}`)).json()) as { revision: number; email: string }
  const theirs = await request.put(`/api/clients/${client.id}`, {
    data: { name: client.name, email: now.email, phone: null, note: 'rang at noon', base: now.revision },
    headers: { origin: baseURL! },
  })
  expect(theirs.ok()).toBe(true)
  await page.getByRole('button', { name: 'Save changes' }).click()
  const both = page.getByRole('alert', { name: 'Saved by somebody else meanwhile' })
  await expect(both).toContainText('rang at noon')
  await expect(both).toContainText('wants the bodice by the spring tide')
  await expect(page.getByLabel('Note')).toHaveValue('wants the bodice by the spring tide')
  await both.getByRole('button', { name: 'Save mine over it' }).click()
  await expect(page.getByText('wants the bodice by the spring tide')).toBeVisible()
  await expect(both).toBeHidden()
})

test('what is typed and not saved is there again after a reload; messages stand by their fields', async ({ page, baseURL }) => {
  await signedIn(page, baseURL!)
  await page.goto('/clients/new', { waitUntil: 'networkidle' })
  await page.getByLabel('E-mail address').fill('not an address')
  await page.getByRole('button', { name: 'Add client' }).click()
  await expect(page.getByLabel('Name')).toHaveAttribute('aria-invalid', 'true')
  await expect(page.getByLabel('E-mail address')).toHaveAttribute('aria-invalid', 'true')
  await expect(page.getByRole('alert')).toHaveCount(2)
  await page.reload({ waitUntil: 'networkidle' })
  await expect(page.getByLabel('E-mail address')).toHaveValue('not an address')
  await expect(page.getByText('What you typed earlier and did not save is here again.')).toBeVisible()
})

test('a plan that cannot be solved says why and where to go; the last good draft stays on the board', async ({ page, baseURL }) => {
  const request = await signedIn(page, baseURL!)
  const garment = await garmentOf(request, 'LS-031')
  await page.goto(`/garments/${garment.id}?step=layers`, { waitUntil: 'networkidle' })
  for (const name of ['Remove Mock-up', 'Remove Light net']) await page.getByRole('button', { name }).click()
  const why = page.locator('[data-problem]')
  await expect(why).toContainText('layer')
  await expect(why).toContainText('The last draft that worked is still shown.')
  await page.getByRole('button', { name: /^Draft/ }).click()
  await expect(
    page
      .getByRole('list', { name: /^Edges/ })
      .or(page.getByRole('button', { name: /^Side front/ }))
      .first(),
  ).toBeVisible()
  await expect(page.getByRole('button', { name: 'Save version' })).toBeDisabled()
  await page.getByRole('button', { name: 'Undo' }).click()
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect(why).toBeHidden()
  await expect(page.getByRole('button', { name: 'Save version' })).toBeEnabled()
})

test('a body that cannot be drafted names the measurement; it is saved all the same', async ({ page, baseURL }) => {
  const request = await signedIn(page, baseURL!)
  const garment = await garmentOf(request, 'LS-031')
  const copy = (await (await request.get(`/api/garments/${garment.id}/working-copy`)).json()) as { document: { measuringId: string } }
  const before = (await (await request.get(`/api/measurings/${copy.document.measuringId}`)).json()) as {
    wearerId: string
    values: Record<string, { value: number }>
  }
  await page.goto(`/wearers/${garment.wearerId ?? before.wearerId}/measure`, { waitUntil: 'networkidle' })
  for (const [label, typed] of [
    ['Bust girth', '92'],
    ['Underbust girth', '77'],
    ['Waist girth (natural waist)', '72'],
    ['Hip girth', '99'],
    ['Neck base girth', '37'],
    ['Back waist length', '40'],
    ['Front waist length', '44'],
    ['Side waist length', '45'],
    ['Waist to hip', '20'],
    ['Shoulder length', '12'],
    ['Across back width', '35'],
    ['Across front width', '33'],
    ['Neck-shoulder point to bust point', '27'],
  ] as const)
    await page.getByRole('textbox', { name: label, exact: true }).fill(typed)
  await expect(page.getByText(/ask(s)? to be measured again/)).toBeVisible()
  await page.getByRole('button', { name: 'Save measuring' }).click()
  await expect(page.getByRole('heading', { name: 'To be measured again' })).toBeVisible()
  await page.goto(`/garments/${garment.id}?step=body`, { waitUntil: 'networkidle' })
  await page.getByRole('radio').first().check()
  const why = page.locator('[data-problem]')
  await expect(why).toContainText(/back waist length|front waist length|side waist length/i)
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect(why).toBeHidden()
})

test('a version prints although its cloth was archived since', async ({ page, baseURL }) => {
  const request = await signedIn(page, baseURL!)
  const garment = await garmentOf(request, 'LS-032')
  const cloth = await clothOf(request, 'PN-30')
  await page.goto(`/cloths/${cloth.id}`, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Archive' }).click()
  await expect(page.getByText(/^ ?archived .* versions that use it keep it/)).toBeVisible()
  await page.goto(`/garments/${garment.id}?step=cut`, { waitUntil: 'networkidle' })
  const href = (await page.getByRole('link', { name: 'Print set (PDF)' }).getAttribute('href'))!
  expect((await (await request.get(href)).body()).subarray(0, 5).toString()).toBe('%PDF-')
  await page.goto(`/cloths/${cloth.id}`, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Bring back' }).click()
  await expect(page.getByRole('button', { name: 'Archive' })).toBeVisible()
})
