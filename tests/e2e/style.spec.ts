/** The style of a bodice beside the board: panels, hem, neckline, closures and top edge, on the demo's own garment, in a real browser. */
import { expect, test, type Page } from '@playwright/test'
import type { RouteAnswer } from '../../shared/schemas/routes'
import { accessible, garmentOf, signedIn } from './screen'

const copyOf = async (page: Page, id: string) =>
  (await (await page.request.get(`/api/garments/${id}/working-copy`)).json()) as RouteAnswer<'garments.workingCopy'>

test('a bodice is divided, pointed and closed as the drafter chooses, and what cannot be drafted is said at its field', async ({
  page,
  baseURL,
}) => {
  const { id } = await garmentOf(await signedIn(page, baseURL!), 'LS-040')
  const before = await copyOf(page, id)
  await page.goto(`/garments/${id}?step=draft`, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Style' }).click()
  const front = page.getByRole('group', { name: 'Front: panels and seams' })
  await front.getByLabel('Panels, centre to side').selectOption('3')
  await expect(front.getByText('Seam A', { exact: true })).toBeVisible()
  await page.getByLabel('Centre back', { exact: true }).selectOption('hook-tape')
  await page.getByLabel('Neckline, front').selectOption('v')
  await page.getByLabel('The hem runs').selectOption('pointed')
  const point = page.getByLabel('Lower at centre front')
  await point.fill('4')
  await point.blur()
  await accessible(page)
  await expect.poll(async () => (await copyOf(page, id)).document.style.hemShape.front).toBe(40)
  const after = await copyOf(page, id)
  expect(after.problem).toBeNull()
  expect(after.solution!.draft.pieces.map((piece) => piece.id)).toContain('side-front-a')
  expect(after.solution!.draft.pieces.find((piece) => piece.id === 'back-centre')!.edges.at(-1)!.kind).toBe('opening')

  const underarm = page.getByLabel('Underarm lowered')
  await underarm.fill('12')
  await expect(page.getByText(/✕ The underarm cannot be drafted .* The nearest value that works is/)).toBeVisible()
  await expect(underarm).toHaveAttribute('aria-invalid', 'true')
  await accessible(page)
  await underarm.fill('0')
  await expect(page.getByText('The last draft that worked is still shown.')).toBeHidden()

  await front.getByLabel('Panels, centre to side').selectOption('5')
  await page.getByRole('group', { name: 'Back: panels and seams' }).getByLabel('Panels, centre to side').selectOption('3')
  await expect(front.getByText(/✕ .* 6 are the most/)).toBeVisible()
  await page.getByRole('group', { name: 'Back: panels and seams' }).getByLabel('Panels, centre to side').selectOption('2')
  await front.getByLabel('Panels, centre to side').selectOption('1')
  await expect.poll(async () => (await copyOf(page, id)).solution?.draft.pieces[0]?.id).toBe('front')

  const differs = page.getByRole('switch', { name: 'The right half differs' })
  await differs.click()
  await expect(page.getByText(/✕ The right half differs from the left, so the centre front cannot lie on a fold/)).toBeVisible()
  await page.getByLabel('Centre front', { exact: true }).selectOption('seam')
  await page.getByRole('group', { name: 'Right front: panels and seams' }).getByLabel('Panels, centre to side').selectOption('2')
  await expect.poll(async () => (await copyOf(page, id)).solution?.draft.right?.map((piece) => piece.id)).toContain('right-side-front')
  await accessible(page)
  await differs.click()

  await page.getByLabel('Ends above with').selectOption('top')
  await expect(page.getByText('the upper bust girth is not measured')).toBeVisible()
  await accessible(page)
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect(page.getByLabel('Ends above with')).toHaveValue('shoulders')
  await expect.poll(async () => (await copyOf(page, id)).solution).not.toBeNull()
  expect(before.document.style.panels.front.further).toEqual([])
})
