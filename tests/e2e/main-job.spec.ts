/**
 * The main job on real input, from the sign-in to a print that measures right: once by pointer, once by keyboard alone.
 * The print is read by poppler (Debian's poppler-utils), which knows nothing of the drawing code.
 */
import { execFileSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { expect, test, type Page } from '@playwright/test'
import { apart, pageOf, POINTS_TO_MM } from '../fixtures/read-print'
import { keyboard, pointer, type Hands } from './hands'
import { accessible, drafter } from './screen'

/** What is typed, in the units that people use, and what the screen must say that it understood. Invented. */
const MEASURED = [
  ['Bust girth', '36 1/2 in', '92.71 cm'],
  ['Underbust girth', '78,5', '78.5 cm'],
  ['Waist girth (natural waist)', '715 mm', '71.5 cm'],
  ['Hip girth', '98', '98.0 cm'],
  ['Neck base girth', '37.2 cm', '37.2 cm'],
  ['Back waist length', '40.5', '40.5 cm'],
  ['Front waist length', '44', '44.0 cm'],
  ['Neck-shoulder point to bust point', '27', '27.0 cm'],
  ['Side waist length', '21', '21.0 cm'],
  ['Waist to hip', '20', '20.0 cm'],
  ['Shoulder length', '12.3', '12.3 cm'],
  ['Across back width', '34.5', '34.5 cm'],
  ['Across front width', '32', '32.0 cm'],
] as const

/** A strip 50 mm wide with marks 100 mm apart: weight in kg, length in mm. Invented. */
const STRIP = [
  ['0.5', '118'],
  ['1', '133'],
  ['1.5', '146'],
  ['2', '157'],
  ['2.5', '166'],
] as const

const field = (page: Page, name: string) => page.getByRole('textbox', { name, exact: true })

async function signIn(page: Page, hands: Hands): Promise<void> {
  await page.goto('/sign-in')
  await page.waitForLoadState('networkidle')
  await accessible(page)
  await hands.write(page.getByLabel('E-mail address'), drafter.email)
  await hands.write(page.getByLabel('Password'), drafter.password)
  await hands.press(page.getByRole('button', { name: 'Sign in', exact: true }))
  await expect(page.getByRole('heading', { name: 'Garments by due date' })).toBeVisible()
  await accessible(page)
}

async function addWearer(page: Page, hands: Hands, client: string, wearer: string): Promise<void> {
  await hands.press(page.getByRole('link', { name: 'Clients', exact: true }))
  await hands.press(page.getByRole('link', { name: 'Add client' }))
  await hands.write(field(page, 'Name'), client)
  await hands.press(page.getByRole('button', { name: 'Add client' }))
  await expect(page.getByRole('heading', { name: client, level: 1 })).toBeVisible()
  await hands.press(page.getByRole('button', { name: 'Add wearer' }).first())
  await hands.write(page.getByLabel('Name of the wearer'), wearer)
  await hands.press(page.getByRole('button', { name: 'Add wearer' }))
  await expect(page.getByRole('heading', { name: wearer, level: 1 })).toBeVisible()

  await hands.press(page.getByRole('button', { name: 'Ask and note' }))
  await accessible(page)
  await hands.press(page.getByRole('switch', { name: 'Consent given' }))
  await hands.write(page.getByLabel('Consent given by'), wearer)
  await hands.press(page.getByRole('button', { name: 'Save', exact: true }))
  await expect(page.getByText('Nothing that changes a limit.')).toBeVisible()
}

async function measure(page: Page, hands: Hands): Promise<void> {
  await hands.press(page.getByRole('link', { name: 'Measure', exact: true }).first())
  const first = field(page, 'Bust girth')
  await hands.write(first, '1,234')
  await expect(page.getByRole('alert')).toContainText('1,234')
  await hands.write(first, '36 elbows')
  await hands.write(field(page, 'Underbust girth'), '78,5')
  await expect(page.getByRole('alert')).toBeVisible()
  await expect(first).toHaveValue('36 elbows')
  for (const [label, typed, understood] of MEASURED) {
    const at = field(page, label)
    await hands.write(at, typed)
    await expect(at).toHaveValue(typed)
    if (typed !== understood) await expect(page.getByText(understood).first()).toBeVisible()
  }
  await expect(page.getByText('13 of 13 needed are taken')).toBeVisible()
  await accessible(page)
  await hands.press(page.getByRole('button', { name: 'Save measuring' }))
  await expect(page.getByRole('heading', { name: /^Estimated for drafting/ })).toBeVisible()
  await expect(page.getByText('92.7 cm').first()).toBeVisible()
  await expect(page.getByText('Bust point to underbust')).toBeVisible()
  await accessible(page)
}

async function testCloth(page: Page, hands: Hands, code: string): Promise<void> {
  await hands.press(page.getByRole('link', { name: 'Cloths', exact: true }).first())
  await hands.press(page.getByRole('link', { name: 'Add cloth' }))
  await hands.write(field(page, 'Code'), code)
  await hands.write(field(page, 'Name'), 'Ripple knit')
  await hands.write(field(page, 'Composition'), '80 % polyamide, 20 % elastane')
  await hands.write(field(page, 'Thickness, mm'), '0.55')
  await expect(page.getByText('understood: 0.55 mm')).toBeVisible()
  await hands.press(page.getByRole('button', { name: 'Add cloth' }))
  await expect(page.getByRole('heading', { name: 'Ripple knit' })).toBeVisible()
  await hands.press(page.getByRole('button', { name: 'Enter a test' }).first())
  await hands.pick(page.getByLabel('Direction'), 'Crosswise')
  await hands.write(page.getByLabel('Width, specimen 1'), '50 mm')
  await hands.write(page.getByLabel('Between marks, specimen 1'), '100 mm')
  for (const [index, [weight, length]] of STRIP.entries()) {
    const load = page.getByLabel(`Load going on, weight ${index + 1}`, { exact: true })
    if (!(await load.isVisible())) await hands.press(page.getByRole('button', { name: 'Add a weight' }).first())
    await hands.write(load, weight)
    await hands.write(page.getByLabel(`Load going on, weight ${index + 1}, length of specimen 1`), `${length} mm`)
  }
  await hands.write(page.getByLabel('Length after rest, specimen 1'), '103 mm')
  await expect(page.getByText('66.0').first()).toBeVisible()
  await accessible(page)
  await hands.press(page.getByRole('button', { name: 'Save test' }))
  await expect(page.getByRole('heading', { name: 'Tests' })).toBeVisible()
  await expect(page.getByRole('cell', { name: /strip, 1 specimen/ })).toBeVisible()
  await accessible(page)
}

async function beginGarment(page: Page, hands: Hands, client: string, wearer: string, code: string): Promise<void> {
  await hands.press(page.getByRole('link', { name: 'Garments', exact: true }))
  await hands.press(page.getByRole('link', { name: 'New garment' }))
  await hands.pick(page.getByLabel('Client'), client)
  await expect(page.getByLabel('Wearer').locator('option:checked')).toHaveText(wearer)
  await hands.write(field(page, 'Name'), 'Ripple bodice')
  await hands.write(field(page, 'Code'), code)
  await hands.press(page.getByRole('button', { name: 'Begin the garment' }))
  await expect(page.getByRole('heading', { name: 'Ripple bodice' })).toBeVisible()
  await expect(page.getByRole('heading', { name: 'The body as drafted' })).toBeVisible()
  await accessible(page)
}

const step = (page: Page, name: string) =>
  page.getByRole('navigation', { name: 'Steps of the bench' }).getByRole('button', { name: new RegExp(`^${name}`) })

async function planLayers(page: Page, hands: Hands, cloth: string): Promise<void> {
  await hands.press(step(page, 'Layers'))
  for (const count of [1, 2]) {
    await hands.press(page.getByRole('button', { name: 'Add a layer' }))
    const layer = page.getByRole('listitem', { name: new RegExp(`^Layer ${count},`) })
    await hands.pick(layer.getByLabel('Cloth'), count === 1 ? cloth : 'PN-12')
    await hands.pick(layer.getByLabel('Round the body'), 'crosswise')
  }
  await expect(page.getByText('no dresser is named')).not.toHaveCount(0)
  await hands.pick(page.getByLabel('It opens'), 'over its whole length')
  await hands.write(page.getByLabel('Dresser who stays within call'), 'Ines Aster')
  const waist = page.getByRole('heading', { name: 'Waist', exact: true }).locator('xpath=ancestor::div[contains(@class, "rounded")][1]')
  await expect(waist).toContainText('%')
  await hands.press(waist.getByRole('button', { name: /^Negative ease/ }))
  const working = page.getByRole('dialog', { name: 'Working' })
  await expect(working).toContainText('71.50 cm')
  await accessible(page)
  await page.keyboard.press('Escape')
  await expect(working).toBeHidden()
  await accessible(page)
}

/** Where on the board the second point of a level lies (the first is on the fold): the pointer's own shape says so. */
async function pointOnLevel(page: Page, level: string): Promise<{ x: number; y: number }> {
  const board = page.getByRole('group', { name: 'Board', exact: true })
  const box = (await board.boundingBox())!
  const label = (await board.getByText(level, { exact: true }).boundingBox())!
  const y = label.y + label.height / 2
  let found = 0
  let on = false
  for (let x = box.x + 100; x < box.x + box.width; x += 4) {
    await page.mouse.move(x, y)
    const now = (await board.evaluate((element) => getComputedStyle(element).cursor)) === 'move'
    if (now && !on) found++
    on = now
    if (on && found === 2) return { x, y }
  }
  throw new Error(`No point under the pointer along the ${level} level`)
}

async function alter(page: Page, hands: Hands): Promise<void> {
  await hands.press(step(page, 'Draft'))
  const board = page.getByRole('group', { name: 'Board', exact: true })
  await expect(board.locator('canvas').first()).toBeVisible()
  const alterations = page.getByRole('region', { name: 'Alterations' })
  await expect(alterations).toContainText('None')

  if (hands.name === 'pointer') {
    const from = await pointOnLevel(page, 'waist')
    await page.mouse.down()
    await page.mouse.move(from.x + 12, from.y, { steps: 4 })
    await page.mouse.up()
  } else {
    await hands.press(page.getByRole('button', { name: /^Side front/ }))
    await hands.press(page.getByRole('list', { name: 'Edges of side front' }).getByRole('button', { name: /^side seam/i }))
    const point = page
      .getByRole('list', { name: /^Points of the side/i })
      .getByRole('button', { name: /waist/i })
      .first()
    await hands.press(point)
    for (let i = 0; i < 4; i++) await page.keyboard.press('ArrowRight')
    await page.keyboard.press('Shift+ArrowRight')
    await expect(alterations).toContainText('7')
  }
  await expect(alterations.getByRole('listitem')).toHaveCount(1)

  await hands.write(page.getByLabel('Out', { exact: true }), '6 mm')
  await page.keyboard.press('Enter')
  await expect(alterations).toContainText('6.0 mm')
  await expect(page.getByText('all true')).toBeVisible()
  await hands.press(page.getByRole('button', { name: 'Undo' }))
  await expect(alterations).not.toContainText('6.0 mm')
  await hands.press(page.getByRole('button', { name: 'Redo' }))
  await expect(alterations).toContainText('6.0 mm')
  await accessible(page)
  await expect(page.getByText(/working copy, saved/).first()).toBeAttached()
  await page.reload()
  await expect(page.getByRole('region', { name: 'Alterations' })).toContainText('6.0 mm')
}

async function saveAndPrint(page: Page, hands: Hands): Promise<void> {
  await hands.press(page.getByRole('button', { name: 'Save version' }))
  const dialog = page.getByRole('dialog', { name: 'Save a version' })
  await hands.press(dialog.getByRole('button', { name: 'Save version' }))
  await expect(dialog.getByRole('alert')).toContainText('Give the version a name.')
  await accessible(page)
  await hands.write(dialog.getByLabel('Name'), 'first mock-up')
  await hands.press(dialog.getByRole('button', { name: 'Save version' }))
  await expect(dialog).toBeHidden()
  await hands.press(step(page, 'Cut'))
  await expect(page.getByRole('heading', { name: 'Print version 1' })).toBeVisible()
  await hands.press(page.getByRole('button', { name: 'Clear for cutting' }))
  await expect(page.getByText(/Cleared for cutting \d/)).toBeVisible()
  await hands.pick(page.getByLabel('Paper'), 'A4')
  await accessible(page)

  const said = await page.getByText(/pages, (upright|lying), behind an overview/).textContent()
  const asked = page.waitForRequest(/pattern\.pdf/, { timeout: 10_000 })
  await hands.press(page.getByRole('link', { name: 'Print set (PDF)' }))
  const got = await page.request.get((await asked).url())
  expect(got.headers()['content-type']).toBe('application/pdf')
  measurePrint(await got.body(), Number(/\d+/.exec(said!)![0]))
}

/** Page boxes and the 100 mm square to 0.1 mm, Inter embedded, as many tiles as the screen said. */
function measurePrint(pdf: Buffer, tiles: number): void {
  const folder = mkdtempSync(join(tmpdir(), 'print-'))
  try {
    const file = join(folder, 'print.pdf')
    writeFileSync(file, pdf)
    const run = (tool: string, ...args: string[]) => execFileSync(tool, args, { encoding: 'utf8', maxBuffer: 64_000_000 })
    const info = run('pdfinfo', file)
    const pages = Number(/Pages:\s+(\d+)/.exec(info)![1])
    const [, width, height] = /Page size:\s+([\d.]+) x ([\d.]+)/.exec(info)!
    const sides = [Number(width) * POINTS_TO_MM, Number(height) * POINTS_TO_MM].sort((a, b) => a - b)
    expect(Math.abs(sides[0]! - 210)).toBeLessThan(0.1)
    expect(Math.abs(sides[1]! - 297)).toBeLessThan(0.1)
    expect(run('pdffonts', file)).toMatch(/\+Inter-\S+ .* yes yes yes /)
    const read = Array.from({ length: pages }, (_, i) => {
      const only = ['-f', `${i + 1}`, '-l', `${i + 1}`]
      const svg = join(folder, `${i}.svg`)
      run('pdftocairo', '-svg', '-origpagesizes', '-noshrink', '-nocenter', ...only, file, svg)
      return pageOf(readFileSync(svg, 'utf8'), run('pdftotext', '-bbox', ...only, file, '-'))
    })
    const squares = read
      .flatMap((page) => page.lines)
      .filter(({ points, dash }) => !dash && points.length === 5 && apart(points[0]!, points[4]!) < 0.01)
      .filter(({ points: [a, b, c] }) => Math.abs(apart(a!, b!) - 100) < 0.1 && Math.abs(apart(b!, c!) - 100) < 0.1)
    expect(squares).toHaveLength(1)
    const isTile = (words: string) => / tile \d+ of \d+/.test(words)
    expect(read.filter((page) => isTile(page.words.map((word) => word.text).join(' ')))).toHaveLength(tiles)
  } finally {
    rmSync(folder, { recursive: true })
  }
}

for (const way of ['pointer', 'keyboard'] as const) {
  test(`a drafter goes from the sign-in to a measured print by ${way}`, async ({ page }) => {
    test.setTimeout(240_000)
    const hands = way === 'pointer' ? pointer() : keyboard(page)
    const faults: string[] = []
    page.on('pageerror', (error) => faults.push(error.message))
    page.on('console', (message) => message.type() === 'error' && !/status of 4\d\d/.test(message.text()) && faults.push(message.text()))
    const [client, wearer] = way === 'pointer' ? ['Reedmoor Revue', 'Sanna Ibsgard'] : ['Tideline Players', 'Vera Holmqvist']
    const code = way === 'pointer' ? 'RK-71' : 'RK-72'
    await signIn(page, hands)
    await addWearer(page, hands, client!, wearer!)
    await measure(page, hands)
    await testCloth(page, hands, code)
    await beginGarment(page, hands, client!, wearer!, way === 'pointer' ? 'RV-001' : 'RV-002')
    await planLayers(page, hands, code)
    await alter(page, hands)
    await saveAndPrint(page, hands)
    expect(faults).toEqual([])
  })
}
