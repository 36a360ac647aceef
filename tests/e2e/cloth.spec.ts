/** A machine's run by file, what it asks when the file does not say, and another lot beside this one. */
import { expect, test } from '@playwright/test'
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
  await page.getByRole('button', { name: 'Save test' }).click()
  await expect(page.getByText(/Method: EN ISO 20932-1/)).toBeVisible()
  await expect(page.getByText(/one.csv \(2005 rows, 5 cycles\)/)).toBeVisible()

  await page.getByLabel('Compare with').selectOption({ label: 'PN-12 Power net, light' })
  const table = page.getByRole('region', { name: 'Tension at the same stretch' })
  await expect(table.getByRole('row')).toHaveCount(6)
  await expect(page.getByRole('figure')).toContainText('PN-12 Power net, light')
})
