import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fitLoadCurve } from '../../../shared/domain/textile/curve'
import { tensionAt } from '../../../shared/domain/textile/load-curve'
import { readTensile, tensileCycles } from '../../../shared/domain/textile/tensile'
import { machineExtension, machineLoad, machineNumber, recogniseColumns } from '../../../shared/domain/textile/tensile-table'
import { mm } from '../../../shared/domain/units/brand'

const strip = { width: mm(50), gauge: mm(100) }
/** Invented run: five cycles to 60 % of 100 mm, T = 300 e N/m on the way out, a tenth less on the way back, with a machine's noise. */
function run(cycles = 5, rowsEach = 400, noise = 0.02) {
  const loads: number[] = []
  const extensions: number[] = []
  for (let cycle = 0; cycle < cycles; cycle++) {
    for (let i = 0; i <= rowsEach; i++) {
      const share = 1 - Math.abs((2 * i) / rowsEach - 1)
      const extension = 60 * share + noise * Math.sin(i * 12.9898)
      const back = i > rowsEach / 2 ? 0.9 : 1
      loads.push(((300 * extension) / 100) * back * 0.05)
      extensions.push(extension)
    }
  }
  return { loads, extensions }
}

describe('a tensile run', () => {
  it('finds its cycles whatever the noise, and takes the last loading with its return', () => {
    expect(tensileCycles(run())).toHaveLength(5)
    const read = readTensile(run(), strip)
    if (!read.ok) throw new Error(read.problem.message)
    expect(read.value).toMatchObject({ rows: 2005, cycles: 5, hasReturn: true })
    expect(read.value.earlier).toHaveLength(4)
    const { readings } = read.value.specimen
    expect(readings.length).toBeLessThan(45)
    expect(Math.max(...readings.map((one) => one.length))).toBeCloseTo(160, 1)
    const curve = fitLoadCurve({ kind: 'strip', direction: 'crosswise', state: 'dry', specimens: [read.value.specimen] })
    if (!curve.ok) throw new Error(curve.problem.message)
    // The garment holds on the return: the curve is the return's, a tenth under the loading.
    expect(tensionAt(curve.value, 0.3) / (0.9 * 300 * 0.3)).toBeCloseTo(1, 1)
  })

  it('is read whatever noise lies in its slack beginning', () => {
    const { loads, extensions } = run(3, 400, 0)
    const noisy = loads.map((load, i) => (extensions[i]! < 25 ? 0.02 : load) + 0.05 * Math.sin(i * 78.233) * Math.cos(i * 3.7))
    const read = readTensile({ loads: noisy, extensions }, strip)
    if (!read.ok) throw new Error(read.problem.message)
    const curve = fitLoadCurve({ kind: 'strip', direction: 'crosswise', state: 'dry', specimens: [read.value.specimen] })
    expect(curve).toMatchObject({ ok: true, value: { specimens: 1 } })
    const loading = read.value.specimen.readings.filter((one) => one.on === 'loading').map((one) => one.load)
    expect(loading).toEqual(loading.toSorted((a, b) => a - b))
  })

  it('that tore or slipped is told from one that held', () => {
    const extensions = Array.from({ length: 200 }, (_, i) => i)
    const tore = extensions.map((e) => (e < 150 ? e / 10 : 1))
    expect(readTensile({ loads: tore, extensions }, strip)).toMatchObject({ ok: false, problem: { code: 'load-falls' } })
  })

  it('takes a run that only rises as one cycle without return', () => {
    const rising = { loads: [0, 1, 2, 3, 4], extensions: [0, 10, 20, 30, 40] }
    const read = readTensile(rising, strip)
    expect(read).toMatchObject({ ok: true, value: { cycles: 1, hasReturn: false, earlier: [] } })
  })

  it('keeps the shape of the loading when it thins the rows', () => {
    fc.assert(
      fc.property(fc.integer({ min: 60, max: 4000 }), fc.double({ min: 50, max: 900, noNaN: true }), (rows, stiffness) => {
        const extensions = Array.from({ length: rows }, (_, i) => (80 * i) / (rows - 1))
        const loads = extensions.map((extension) => ((stiffness * extension) / 100) * 0.05)
        const read = readTensile({ loads, extensions }, strip)
        if (!read.ok) throw new Error(read.problem.message)
        for (const { load, length } of read.value.specimen.readings) {
          expect(load / (((stiffness * (length - 100)) / 100) * 0.05)).toBeCloseTo(1, 6)
        }
      }),
      { numRuns: 40 },
    )
  })

  it('says what is missing: too few rows, no load, no extension, no width', () => {
    expect(readTensile({ loads: [1, 2], extensions: [1, 2] }, strip)).toMatchObject({ ok: false, problem: { code: 'run-too-short' } })
    expect(readTensile({ loads: [0, 0, 0], extensions: [0, 5, 10] }, strip)).toMatchObject({ problem: { code: 'run-without-load' } })
    expect(readTensile({ loads: [1, 1, 1], extensions: [5, 5, 5] }, strip)).toMatchObject({ problem: { code: 'run-without-extension' } })
    expect(readTensile(run(), { ...strip, width: mm(0) })).toMatchObject({ problem: { code: 'width-impossible' } })
    expect(readTensile(run(), { ...strip, gauge: mm(0) })).toMatchObject({ problem: { code: 'gauge-impossible' } })
  })
})

describe('the table of a machine', () => {
  it('recognises columns and units in one heading row or two, and leaves the rest to be asked', () => {
    expect(recogniseColumns(['Time (s)', 'Extension (mm)', 'Load (N)'])).toEqual({ load: 2, loadUnit: 'N', extension: 1, lengthUnit: 'mm' })
    expect(recogniseColumns(['Force', 'Elongation'], ['[lbf]', '[%]'])).toEqual({ load: 0, loadUnit: 'lbf', extension: 1, lengthUnit: '%' })
    expect(recogniseColumns(['Force kgf', 'Displacement / inch'])).toEqual({ load: 0, loadUnit: 'kgf', extension: 1, lengthUnit: 'in' })
    expect(recogniseColumns(['Load (N)', 'Extension (mm)'], ['[kgf]', '[mm]'])).toMatchObject({ loadUnit: null, lengthUnit: 'mm' })
    expect(recogniseColumns(['a', 'b'])).toEqual({ load: null, loadUnit: null, extension: null, lengthUnit: null })
    expect(recogniseColumns(['Load', 'Strain'])).toEqual({ load: 0, loadUnit: null, extension: 1, lengthUnit: null })
  })

  it('reads decimal points and commas, and converts by the exact factors', () => {
    expect(machineNumber(' 1,25 ')).toBe(1.25)
    expect(machineNumber('1.25e1')).toBe(12.5)
    expect([machineNumber('1.234,5'), machineNumber('1,234.5'), machineNumber('-0,5')]).toEqual([1234.5, 1234.5, -0.5])
    expect(machineNumber('time')).toBeNaN()
    expect(machineNumber('')).toBeNaN()
    // Factors by definition: standard gravity 9.80665 m/s², pound .45359237 kg, inch 25.4 mm.
    expect(machineLoad(1, 'lbf')).toBeCloseTo(0.45359237 * 9.80665, 12)
    expect(machineLoad(1000, 'gf')).toBeCloseTo(9.80665, 12)
    expect(machineExtension(2, 'in', 100)).toBe(50.8)
    expect(machineExtension(50, '%', 80)).toBe(40)
  })
})
