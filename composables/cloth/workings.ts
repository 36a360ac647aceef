import { largestReading, specimenFigures } from '#shared/domain/textile/test'
import type { StretchFigures, StretchTest } from '#shared/domain/textile/types'
import type { Working, WorkingInput } from '#shared/domain/units/working'

const METHOD = 'Formulas of the ASTM D3107 and EN 14704-1 kind; the strip and its weights are this workroom’s own.'
const FREE_STRIP = 'A free strip narrows as it is pulled and boned cloth cannot: in the garment the tension is 1.1 to 1.3 times higher.'

export type TestFigure = 'stretch' | 'growth' | 'recovery' | 'tension'

/** The working of each figure of a test: its formula with what every specimen gave, and the mean. Null where it was not read. */
export function figureWorkings(test: StretchTest, figures: StretchFigures): Readonly<Record<TestFigure, Working | null>> {
  if (test.kind === 'label') {
    return {
      stretch: {
        title: 'Stretch, as the label says',
        formula: 'no test: the stretch is taken as given',
        inputs: [
          { symbol: 'e', label: 'stretch from the label or a hand pull', value: test.stretch * 100, unit: 'percent', from: 'assumed' },
        ],
        result: { value: test.stretch * 100, unit: 'percent' },
        source: 'The label or a hand pull; the load is unknown.',
        notes: [
          'Between 1 and 5 N/cm is assumed at that stretch; the cut is solved at 5, so it presses no more than asked.',
          'Pull a strip to know the hold.',
        ],
      },
      growth: null,
      recovery: null,
      tension: null,
    }
  }
  const all = test.specimens.map((specimen, index) => ({
    specimen,
    index,
    top: largestReading(specimen),
    figures: specimenFigures(specimen),
  }))
  const inputs = (
    symbol: string,
    label: string,
    pick: (one: (typeof all)[number]) => number | null | undefined,
    unit: WorkingInput['unit'],
  ): WorkingInput[] =>
    all.flatMap((one) => {
      const value = pick(one)
      return value === null || value === undefined
        ? []
        : [{ symbol: `${symbol}${one.index + 1}`, label: `${label}, specimen ${one.index + 1}`, value, unit, from: 'measured' as const }]
    })
  const gauge = inputs('L0 ', 'between the marks at rest', (one) => one.specimen.gauge, 'mm')
  const long = inputs('L ', 'at the largest load', (one) => one.top?.length, 'mm')
  const rest = inputs('Lr ', 'after the rest', (one) => one.specimen.restLength, 'mm')
  const load = inputs('F ', 'largest load, hook and clamp counted', (one) => one.top?.load, 'N')
  const width = inputs('w ', 'width of the strip', (one) => one.specimen.width, 'mm')
  const mean = 'The figure is the mean of the specimens that were read.'
  const one = (
    title: string,
    formula: string,
    given: WorkingInput[],
    value: number | null,
    unit: 'percent' | 'N/m',
    notes: string[],
  ): Working | null =>
    value === null
      ? null
      : {
          title,
          formula,
          inputs: given,
          result: { value: unit === 'percent' ? value * 100 : value, unit },
          source: METHOD,
          notes: [mean, ...notes],
        }
  return {
    stretch: one('Stretch at the largest load', 'stretch = 100 · (L − L0) / L0', [...gauge, ...long], figures.stretch, 'percent', []),
    growth: one('Growth after the rest', 'growth = 100 · (Lr − L0) / L0', [...gauge, ...rest], figures.growth, 'percent', []),
    recovery: one(
      'Recovery after the rest',
      'recovery = 100 · (L − Lr) / (L − L0)',
      [...gauge, ...long, ...rest],
      figures.recovery,
      'percent',
      [],
    ),
    tension: one('Tension at the largest load', 'T = F / w', [...load, ...width], figures.testTension, 'N/m', [
      FREE_STRIP,
      'In hours a worn garment gives up about a quarter of its tension.',
    ]),
  }
}
