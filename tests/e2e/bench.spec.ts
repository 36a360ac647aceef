/** From a mock-up that fitted to the final layers, and what-if: on the demo's own garments, in a real browser. */
import { expect, test, type Page } from '@playwright/test'
import type { MoveAlteration } from '../../shared/domain/draft/types'
import type { RouteAnswer } from '../../shared/schemas/routes'
import { accessible, garmentOf, signedIn } from './screen'

async function openBench(page: Page, baseURL: string, code: string, step: string): Promise<string> {
  const { id } = await garmentOf(await signedIn(page, baseURL), code)
  await page.goto(`/garments/${id}?step=${step}`, { waitUntil: 'networkidle' })
  return id
}
const copyOf = async (page: Page, id: string) =>
  (await (await page.request.get(`/api/garments/${id}/working-copy`)).json()) as RouteAnswer<'garments.workingCopy'>

test('the two-layer mock-up that fits is strong at the waist when copied into four layers, and is recut to hold as it did', async ({
  page,
  baseURL,
}) => {
  const id = await openBench(page, baseURL!, 'LS-032', 'fit')
  const before = await copyOf(page, id)
  const select = page.getByLabel('Version that fitted')
  const option = select.locator('option').filter({ hasText: 'Mock-up that fits' })
  await expect(option).toHaveCount(1)
  await select.selectOption(await option.getAttribute('value'))
  const waist = page.getByRole('region', { name: 'Recut by level' }).getByRole('row', { name: /^Waist/ })
  await expect(waist.getByRole('cell').nth(0)).toContainText('easy')
  await expect(waist.getByRole('cell').nth(1)).toContainText('strong')
  await expect(waist.getByRole('cell').nth(2)).toContainText('let out')
  await expect(waist.getByRole('cell').nth(2)).toContainText('easy')
  await expect(page.getByRole('region', { name: 'Hold as it fitted' })).toContainText('side front, side seam at waist')
  await accessible(page)
  await page.getByRole('button', { name: 'Take over: hold as it fitted' }).click()
  await expect(page.getByText(/Taken over into the working copy/)).toBeVisible()
  await expect.poll(async () => (await copyOf(page, id)).revision).toBeGreaterThan(before.revision)
  const after = await copyOf(page, id)
  const mockUp = await copyOf(page, (await garmentOf(page.request, 'LS-031')).id)
  for (const ring of after.solution!.rings) {
    const fitted = mockUp.solution!.rings.find((one) => one.level === ring.level)!
    expect(Math.abs(ring.pressure / fitted.pressure - 1)).toBeLessThan(0.02)
  }
  expect((after.document.alterations[0] as MoveAlteration).dx).toBeGreaterThan(-3)
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.alterations).toEqual(before.document.alterations)
})

test('a change is tried beside the present rings, and saved only when it is taken', async ({ page, baseURL }) => {
  const id = await openBench(page, baseURL!, 'LS-040', 'layers')
  const before = await copyOf(page, id)
  await page.getByRole('button', { name: 'What if' }).click()
  const trial = page.getByRole('region', { name: 'Trying a change' })
  await page
    .getByRole('listitem', { name: /^Layer 2,/ })
    .getByLabel('Count')
    .selectOption('3')
  await expect(trial.getByRole('row', { name: /^Waist/ })).toContainText('+')
  await trial.getByRole('textbox', { name: 'Waist girth (natural waist)' }).fill('80')
  await expect(trial).toContainText('A girth that was tried is not taken')
  await accessible(page)
  await expect(page.getByRole('button', { name: 'Save version' })).toBeDisabled()
  await trial.getByRole('button', { name: 'Drop it' }).click()
  await expect(trial).toBeHidden()
  await page.waitForTimeout(1200)
  expect((await copyOf(page, id)).revision).toBe(before.revision)

  await page.getByRole('button', { name: 'What if' }).click()
  await page
    .getByRole('listitem', { name: /^Layer 2,/ })
    .getByLabel('Count')
    .selectOption('2')
  await trial.getByRole('button', { name: 'Take it' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.plans.front[1]!.count).toBe(2)
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.plans.front[1]!.count).toBe(1)
})

test('a fitting says which level is tight and, from a pull, how stiff the cloth is; the factor is kept and dropped', async ({
  page,
  baseURL,
}) => {
  const id = await openBench(page, baseURL!, 'LS-031', 'fit')
  await page.getByRole('button', { name: 'Look at it again' }).click()
  const waist = page.getByRole('row', { name: /^Waist/ })
  await expect(page.getByRole('textbox', { name: 'Waist, gap seen' })).toHaveValue(/3\.8 cm/)
  await expect(waist).toContainText(/let out|take in/)
  await expect(page.getByText('a single pull')).toBeVisible()
  await accessible(page)
  await page.getByRole('textbox', { name: 'Waist, pull' }).fill('')
  await expect(page.getByText(/No pull was taken/)).toBeVisible()
  await expect(page.getByRole('button', { name: 'Keep the factor with this garment' })).toBeHidden()
  await page.getByRole('textbox', { name: 'Waist, pull' }).fill('3 N')
  await page.getByRole('button', { name: 'Keep the factor with this garment' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.stiffness?.factor ?? 0).toBeGreaterThan(0)
  const learnt = (await copyOf(page, id)).solution!.cautions.map((one) => one.code)
  expect(learnt).toContain('stiffness-learnt')
  await page.getByRole('button', { name: 'Record the fitting' }).click()
  await expect(page.getByText('The fitting is recorded.')).toBeVisible()
  await expect(page.getByRole('button', { name: 'Look at it again' })).toHaveCount(2)
  await page.getByRole('button', { name: 'Drop it' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.stiffness).toBeNull()
})

test('a caution is acknowledged with a reason, and stays readable with it', async ({ page, baseURL }) => {
  await page.setViewportSize({ width: 1440, height: 900 })
  const id = await openBench(page, baseURL!, 'LS-032', 'layers')
  const list = page.getByRole('region', { name: 'Cautions' })
  await list.getByRole('button', { name: 'Acknowledge with a reason' }).first().click()
  await list.getByRole('button', { name: 'Acknowledge', exact: true }).click()
  await expect(list.getByRole('alert')).toContainText('Say why.')
  await list.getByLabel('Why it may stand').fill('Mirela dresses her in the wings.')
  await list.getByRole('button', { name: 'Acknowledge', exact: true }).click()
  await expect(list).toContainText('Acknowledged by Dario Anselm: Mirela dresses her in the wings.')
  await accessible(page)
  await expect.poll(async () => (await copyOf(page, id)).document.acknowledged.length).toBe(1)
  await list.getByRole('button', { name: 'Take back' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.acknowledged.length).toBe(0)
})

test('a plan is started from, a zone gets layers of its own, and each figure of a layer opens its working', async ({ page, baseURL }) => {
  const id = await openBench(page, baseURL!, 'LS-040', 'layers')
  const before = await copyOf(page, id)
  await page.getByRole('button', { name: 'Start from a plan' }).click()
  const dialog = page.getByRole('dialog', { name: 'Start from a plan' })
  await accessible(page)
  await dialog.getByRole('button', { name: 'Take the plan Shell and lining, waist panel' }).click()
  await expect(dialog).toBeHidden()
  const panel = page.getByRole('region', { name: 'waist panel' })
  await expect(panel.getByRole('listitem', { name: 'Layer 2, power net' })).toContainText('sewn to the lining')
  const picture = panel.getByRole('figure', { name: 'What the layers bring at the waist' })
  await expect(picture.getByText('power net')).toBeVisible()
  await picture.getByRole('button', { name: /^Pull, power net/ }).click()
  const working = page.getByRole('dialog', { name: 'Pull, power net' })
  await expect(working).toContainText('n T(x)')
  await working.getByRole('button', { name: 'Close' }).click()
  await expect.poll(async () => (await copyOf(page, id)).document.plans.waistPanel?.length).toBe(3)

  await page.getByLabel('Other layers in a zone').selectOption('yoke')
  await expect(page.getByRole('region', { name: 'yoke' }).getByRole('figure')).toContainText('On no level of the bodice')
  await page.getByRole('button', { name: 'Remove the yoke' }).click()

  const lining = page.getByRole('region', { name: 'Front and back' }).getByRole('listitem', { name: 'Layer 2, lining' })
  await lining.getByRole('textbox', { name: 'Cut ratio' }).fill('1.2')
  await lining.getByRole('button', { name: /floats/ }).click()
  await lining.getByRole('switch', { name: 'Without stretch' }).click()
  await expect(lining).toContainText('without stretch, floats between the seams')
  await accessible(page)

  const waist = page.getByRole('list', { name: 'Rigid widths on one layer, waist' })
  await page.getByRole('button', { name: 'Add a rigid width sewn to one layer alone' }).nth(2).click()
  await waist.getByRole('textbox', { name: 'Rigid width' }).fill('18 mm')
  await expect.poll(async () => (await copyOf(page, id)).document.levels.find((one) => one.level === 'waist')?.sewn?.[0]?.width).toBe(18)
  const undo = page.getByRole('button', { name: 'Undo' })
  while (await undo.isEnabled()) await undo.click()
  await expect.poll(async () => (await copyOf(page, id)).document.plans).toEqual(before.document.plans)
})

test('typed alterations change the rings at once; what is no longer true is said with one action that mends it', async ({
  page,
  baseURL,
}) => {
  const id = await openBench(page, baseURL!, 'LS-040', 'draft')
  const before = await copyOf(page, id)
  const cutOf = async () => (await copyOf(page, id)).solution!.rings.find((ring) => ring.level === 'waist')!.cut
  const cut = await cutOf()

  await page.getByRole('button', { name: 'Let out or take in' }).click()
  await page.getByLabel('Whole girth').fill('-12 mm')
  await page.getByRole('checkbox', { name: /^Front princess seam/ }).check()
  await accessible(page)
  await page.getByRole('button', { name: 'Add the alteration' }).click()
  const list = page.getByRole('region', { name: 'Alterations' })
  await expect(list.getByRole('listitem')).toContainText('taken in 12.0 mm in all')
  await expect.poll(cutOf).toBeCloseTo(cut - 12, 0)

  await page.getByRole('button', { name: 'Lengthen or shorten' }).click()
  await page.getByRole('textbox', { name: 'By' }).fill('-400 mm')
  await expect(page.getByText('At most 300 mm; below 0 shortens.')).toBeVisible()
  await page.getByRole('textbox', { name: 'By' }).fill('8 mm')
  await page.getByRole('button', { name: 'Add the alteration' }).click()
  await expect(list.getByRole('listitem')).toHaveCount(2)
  await list.getByRole('button', { name: /^Apply length.* earlier/ }).click()
  await expect(list.getByRole('listitem').first()).toContainText('8.0 mm longer')

  const truing = page.getByRole('region', { name: 'To be made true' })
  await expect(truing).toBeHidden()
  const parts = page.getByRole('region', { name: 'Pieces and points' })
  await parts.getByRole('button', { name: /^Side front/ }).click()
  await parts.getByRole('button', { name: /^side seam/ }).click()
  await parts.getByRole('button', { name: 'waist', exact: true }).click()
  await page.getByRole('switch', { name: 'Carry to the mate' }).click()
  await page.getByRole('textbox', { name: 'Out' }).fill('30')
  await page.getByRole('textbox', { name: 'Out' }).press('Enter')
  await expect(truing).toContainText(/Side seam: .* longer on side front|Side seam: .* shorter on side front/)
  await accessible(page)
  await truing.getByRole('button', { name: /^Carry .* to the mate$/ }).click()
  await expect(truing).toBeHidden()
  const undo = page.getByRole('button', { name: 'Undo' })
  while (await undo.isEnabled()) await undo.click()
  await expect.poll(async () => (await copyOf(page, id)).document.alterations).toEqual(before.document.alterations)
})
