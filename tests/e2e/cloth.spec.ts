/** Tests of a cloth: a machine's run by file, another lot beside it, unfinished tests, photographs, ruler pulls. */
import { expect, test } from '@playwright/test'
import sharp from 'sharp'
import { accessible, clothOf, signedIn } from './screen'

/** Five cycles to 60 mm of extension, load 15 N/100 mm out and a tenth less back. Invented. */
function csv(heading: string, row: (extension: number, load: number) => string, cycles = 5): string {
  const lines = [heading]
  for (let cycle = 0; cycle < cycles; cycle++) {
    for (let i = 0; i <= 400; i++) {
      const extension = 60 * (1 - Math.abs(i / 200 - 1))
      lines.push(row(extension, 0.15 * extension * (i > 200 ? 0.9 : 1)))
    }
  }
  return lines.join('\n')
}

test('a tensile run is read from its file, asked about where it must be, and refused with a reason', async ({ page, baseURL }) => {
  const cloth = await clothOf(await signedIn(page, baseURL!), 'VL-21')
  await page.goto(`/cloths/${cloth.id}`, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Enter a test' }).first().click()
  await page.getByRole('radio', { name: 'A machine pulled it (CSV)' }).check()
  await page.getByLabel('Method').selectOption('EN ISO 20932-1')
  const file = (name: string, text: string) => ({ name, mimeType: 'text/csv', buffer: Buffer.from(text) })
  const input = page.getByLabel('Files of the machine')

  await input.setInputFiles(file('letter.csv', 'Dear workroom,\nthe cloth is on its way,\nregards\n'))
  await expect(page.getByRole('alert')).toContainText('it is no run of a tensile machine')

  await input.setInputFiles(
    file(
      'one.csv',
      csv('Time (s);Extension (mm);Load (N)', (e, l) => `0;${e.toFixed(3)};${l.toFixed(4)}`.replaceAll('.', ',')),
    ),
  )
  await expect(page.getByText('2005 rows, 5 cycles, the last return counts')).toBeVisible()

  await input.setInputFiles(
    file(
      'two.csv',
      csv('a,b', (e, l) => `${l.toFixed(4)},${e.toFixed(3)}`),
    ),
  )
  const question = page.getByRole('group', { name: 'two.csv does not say everything' })
  await question.getByLabel('Column of the load').selectOption({ label: 'a' })
  await question.getByLabel('Load in').selectOption('N')
  await question.getByLabel('Column of the extension').selectOption({ label: 'b' })
  await question.getByLabel('Extension in').selectOption('mm')
  await question.getByRole('button', { name: 'Read it so' }).click()
  await expect(page.getByText('Specimen 2', { exact: true })).toBeVisible()
  await expect(page.getByText(/8 loadings before the last/)).toBeVisible()
  await accessible(page)
  await page.getByRole('button', { name: 'Keep as unfinished' }).click()
  await page.getByRole('button', { name: 'Go on' }).click()
  await expect(page.getByText('Specimen 2', { exact: true })).toBeVisible()
  await page.getByLabel('Length after rest, specimen 1').fill('103 mm')
  await page.getByRole('button', { name: 'Save test' }).click()
  await expect(page.getByText(/method: EN ISO 20932-1/)).toBeVisible()
  await expect(page.getByText(/one.csv \(2005 rows, 5 cycles\)/)).toBeVisible()

  await page.getByLabel('Compare with').selectOption({ label: 'PN-12 Power net, light, crosswise, dry' })
  const table = page.getByRole('region', { name: 'Tension at the same stretch' })
  await expect(table.getByRole('row')).toHaveCount(6)
  await expect(page.getByRole('figure').first()).toContainText('PN-12 Power net, light')
})

test('an unfinished test is kept, gone on with after a reload, and finished; its photograph is shown', async ({ page, baseURL }) => {
  const cloth = await clothOf(await signedIn(page, baseURL!), 'LN-05')
  const address = `/cloths/${cloth.id}`
  await page.goto(address, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Enter a test' }).first().click()
  await page.getByLabel('Direction').selectOption('angle')
  await page.getByLabel('Degrees from the lengthwise').fill('60')
  await page.getByLabel('Load going on, weight 1, length of specimen 1').fill('12 cm')
  await page.getByLabel('Load going on, weight 2, length of specimen 1').fill('1,234')
  await page.getByRole('button', { name: 'Keep as unfinished' }).click()
  await expect(page.getByRole('heading', { name: 'To be finished' })).toBeVisible()

  await page.reload({ waitUntil: 'networkidle' })
  await expect(page.getByText('60 from the lengthwise, dry: weights on a strip, 1 length read')).toBeVisible()
  await accessible(page)
  await page.getByRole('button', { name: 'Go on' }).click()
  await expect(page.getByLabel('Degrees from the lengthwise')).toHaveValue('60')
  await expect(page.getByLabel('Load going on, weight 1, length of specimen 1')).toHaveValue('12 cm')
  await expect(page.getByLabel('Load going on, weight 2, length of specimen 1')).toHaveValue('1,234')
  await page.getByLabel('Load going on, weight 2, length of specimen 1').fill('110 mm')
  await expect(page.getByText('length cannot fall while the load grows').first()).toBeVisible()
  await expect(page.getByRole('button', { name: 'Save test' })).toBeDisabled()
  await page.getByLabel('Load going on, weight 2, length of specimen 1').fill('135 mm')
  await accessible(page)
  await page.getByRole('button', { name: 'Save test' }).click()
  await expect(page.getByRole('heading', { name: 'To be finished' })).toBeHidden()

  await page.getByRole('button', { name: /^60° from the lengthwise/ }).click()
  const photo = page.getByLabel('Photograph of the strip')
  await photo.setInputFiles({ name: 'letter.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('Dear workroom') })
  await expect(page.getByRole('alert')).toContainText('no picture that can be read')
  const picture = await sharp({ create: { width: 900, height: 300, channels: 3, background: '#c8be9f' } })
    .jpeg()
    .toBuffer()
  await photo.setInputFiles({ name: 'strip.jpg', mimeType: 'image/jpeg', buffer: picture })
  const shown = page.getByRole('img', { name: /^Strip of/ })
  await expect(shown).toBeVisible()
  expect(await shown.evaluate((one: HTMLImageElement) => one.naturalWidth)).toBe(900)
  await accessible(page)
})

test('a ruler pull and one load say what they do not know', async ({ page, baseURL }) => {
  const cloth = await clothOf(await signedIn(page, baseURL!), 'SH-09')
  await page.goto(`/cloths/${cloth.id}`, { waitUntil: 'networkidle' })
  await page.getByRole('button', { name: 'Enter a test' }).first().click()
  await page.getByRole('radio', { name: 'Ruler pull, by hand' }).check()
  await page.getByLabel('Marks at rest').fill('4 in')
  await page.getByLabel('Drawn by hand to').fill('3 in')
  await expect(page.getByText('The marks are no further apart than at rest.').first()).toBeVisible()
  await page.getByLabel('Drawn by hand to').fill('7 in')
  await expect(page.getByText('75.0').first()).toBeVisible()
  await expect(page.getByText('Hold unknown, pull a strip.')).toBeVisible()
  await accessible(page)

  await page.getByRole('radio', { name: 'Stretch at one load' }).check()
  await page.getByLabel('Load going on, weight 1, length of specimen 1').fill('15 mm')
  await expect(page.getByText('it looks like cm').first()).toBeVisible()
  await page.getByLabel('Load going on, weight 1, length of specimen 1').fill('15 cm')
  await expect(page.getByText('the curve is a straight line through it')).toBeVisible()
  await accessible(page)
})
