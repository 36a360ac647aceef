/** A version as a bundle out of Cut and back in as a garment of its own, in a real browser. */
import { readFile } from 'node:fs/promises'
import { expect, test } from '@playwright/test'
import { accessible, garmentOf, signedIn } from './screen'

test('a bundle is taken from a version and brought in for a wearer; a file that is none is said at its field', async ({
  page,
  baseURL,
}) => {
  const garment = await garmentOf(await signedIn(page, baseURL!), 'LS-032')
  await page.goto(`/garments/${garment.id}?step=cut`, { waitUntil: 'networkidle' })
  await page.getByLabel('with the wearer’s measuring, as the wearer agreed').check()
  const waiting = page.waitForEvent('download')
  await page.getByRole('link', { name: 'Bundle (ZIP)' }).click()
  const bundle = await (await waiting).path()
  await accessible(page)

  await page.goto('/garments', { waitUntil: 'networkidle' })
  await page.getByRole('link', { name: 'Bring in a bundle' }).click()
  await expect(page.getByRole('heading', { name: 'Bring in a bundle' })).toBeVisible()
  await page.waitForLoadState('networkidle')
  await page.getByRole('button', { name: 'Bring it in' }).click()
  await expect(page.getByText('Choose a file.')).toBeVisible()
  await expect(page.getByText('Choose a wearer.')).toBeVisible()
  await page.getByLabel('Client', { exact: true }).selectOption({ label: garment.clientName! })
  await page.getByLabel('Wearer', { exact: true }).selectOption({ label: garment.wearerName! })
  await page
    .getByLabel('Bundle', { exact: true })
    .setInputFiles({ name: 'letter.zip', mimeType: 'application/zip', buffer: Buffer.from('Dear workroom') })
  await page.getByRole('button', { name: 'Bring it in' }).click()
  await expect(page.getByRole('alert').filter({ hasText: 'This file is no bundle' })).toBeVisible()
  await accessible(page)

  await page
    .getByLabel('Bundle', { exact: true })
    .setInputFiles({ name: 'bundle.zip', mimeType: 'application/zip', buffer: await readFile(bundle) })
  await page.getByRole('button', { name: 'Bring it in' }).click()
  await expect(page.getByText('Its pieces are the same as in the bundle.')).toBeVisible()
  await accessible(page)
  await page.getByRole('link', { name: 'Open the garment' }).click()
  await expect(page).toHaveURL(/\/garments\/[0-9a-f-]{36}/)
})
