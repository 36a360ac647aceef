/** Bones and closures beside the board, on the demo's own garment, in a real browser. */
import { expect, test } from '@playwright/test'
import type { RouteAnswer } from '../../shared/schemas/routes'
import { accessible, garmentOf, signedIn } from './screen'

test('bones are laid out, change the rings at once, are told where they break a rule, and a lacing says its cord', async ({
  page,
  baseURL,
}) => {
  const { id } = await garmentOf(await signedIn(page, baseURL!), 'LS-040')
  await page.goto(`/garments/${id}?step=draft`, { waitUntil: 'networkidle' })
  const copy = async () =>
    (await (await page.request.get(`/api/garments/${id}/working-copy`)).json()) as RouteAnswer<'garments.workingCopy'>
  const waist = async () => (await copy()).solution!.rings.find((ring) => ring.level === 'waist')!
  const before = await waist()
  await page.getByRole('button', { name: 'Structure' }).click()
  await expect(page.locator('#main').getByText(/lacing at the centre back has no bone beside its eyelets/)).toBeVisible()

  await page.getByRole('button', { name: 'On a panel' }).click()
  await page.getByLabel('Piece', { exact: true }).selectOption({ label: 'Side front' })
  await page.getByRole('button', { name: 'Lay them out' }).click()
  const bones = page.getByRole('list', { name: 'Bones' })
  await expect(bones.getByRole('listitem')).toHaveCount(2)
  await expect.poll(async () => (await waist()).rigidFront).toBeGreaterThan(before.rigidFront + 30)
  const boned = await waist()
  expect(boned.cut).toBeGreaterThan(before.cut)
  expect(boned.pressure / before.pressure).toBeCloseTo(1, 1)

  await page.getByLabel('Upright bones').selectOption('6')
  await page.getByLabel('Piece', { exact: true }).selectOption({ label: 'Back centre' })
  await page.getByRole('button', { name: 'Lay them out' }).click()
  await expect(page.getByRole('status').filter({ hasText: /of 6 fit/ })).toBeVisible()

  const first = bones.getByRole('listitem', { name: 'Side front bone 1' })
  await first
    .getByRole('button', { name: /^Side front bone 1/ })
    .first()
    .click()
  await first.getByRole('textbox', { name: 'inside by' }).last().fill('4 mm')
  await expect(page.locator('#main').getByText(/Side front bone 1 ends 4 mm from a finished edge/)).toBeVisible()
  await first.getByRole('button', { name: /cut length/ }).click()
  await expect(page.getByRole('dialog')).toContainText('cut = channel - 2 tip')
  await page.getByRole('dialog').getByRole('button', { name: 'Close' }).click()

  const lacing = page.getByRole('region', { name: 'Centre back, lacing' })
  await lacing.getByRole('button', { name: 'Give it a width and a pitch' }).click()
  await expect(lacing).toContainText(/2 × \d+ eyelets/)
  await expect(lacing.getByRole('button', { name: /^Cord at the centre back/ })).toBeVisible()
  await expect.poll(async () => (await waist()).rigidBack).toBeGreaterThan(49)
  await accessible(page)
  const undo = page.getByRole('button', { name: 'Undo' })
  while (await undo.isEnabled()) await undo.click()
  await expect.poll(async () => (await copy()).document.structure?.bones.length ?? 0).toBe(0)
})
