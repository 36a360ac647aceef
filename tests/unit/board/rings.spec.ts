import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  gapCords,
  halfStrain,
  holdPlace,
  HOLD_SCALE_END,
  ringBar,
  ringScale,
  ringTicks,
  TICK_REST,
} from '../../../composables/useRingsModel'
import { governsWords, pressureRange, ringBarWords, ringFigure, strainWords } from '../../../composables/useRingsWords'
import { mm } from '../../../shared/domain/units/brand'
import { ring, rings } from './rings-fixture'

const [bust, , waist, highHip] = rings

describe('a ring laid end to end', () => {
  it('ends at half of what it goes round when it is under tension', () => {
    fc.assert(
      fc.property(
        fc.record({
          girth: fc.double({ min: 500, max: 1400, noNaN: true }),
          front: fc.double({ min: 0, max: 0.5, noNaN: true }),
          back: fc.double({ min: 0, max: 0.5, noNaN: true }),
          rigidFront: fc.double({ min: 0, max: 60, noNaN: true }),
          rigidBack: fc.double({ min: 0, max: 60, noNaN: true }),
          gapBack: fc.double({ min: 0, max: 80, noNaN: true }),
        }),
        (sketch) => {
          const solved = ring({ level: 'waist', name: 'Waist', hold: 900, band: 'easy', ...sketch })
          const bar = ringBar(solved)
          expect(bar.length).toBeCloseTo(solved.surface / 2, 6)
          expect(bar.body).toBeCloseTo(solved.surface / 2, 9)
          bar.parts.slice(1).forEach((part, index) => expect(part.from).toBeCloseTo(bar.parts[index]!.to, 9))
          const rigid = bar.parts.filter(({ kind }) => kind === 'rigid').reduce((sum, { from, to }) => sum + to - from, 0)
          expect(rigid).toBeCloseTo((sketch.rigidFront + sketch.rigidBack) / 2, 6)
        },
      ),
    )
  })

  it('has the gap at the centre back, the bone beside it, and the side between the halves', () => {
    const bar = ringBar(bust!)
    expect(bar.parts.at(-1)).toMatchObject({ kind: 'gap', half: 'back' })
    expect(bar.parts.at(-2)).toMatchObject({ kind: 'rigid', half: 'back' })
    expect(bar.side).toBeCloseTo(bust!.surface * 0.26, 6)
    expect(bar.parts.filter(({ half }) => half === 'front').every(({ to }) => to <= bar.side + 1e-9)).toBe(true)
  })

  it('reaches past the body when it lies loose', () => {
    const loose = { ...highHip!, surface: mm(highHip!.surface - 20) }
    expect(ringBar(loose).length - ringBar(loose).body).toBeCloseTo(10, 6)
    expect(ringScale([loose])).toBeCloseTo(ringBar(loose).length, 9)
  })

  it('draws a ring without cloth as what is rigid, and no ring to a scale that is not zero', () => {
    const rigid = { ...bust!, segments: [] }
    expect(ringBar(rigid).parts.map(({ kind }) => kind)).toEqual(['rigid', 'rigid', 'gap'])
    expect(halfStrain(rigid, 'front')).toBeNull()
    expect(strainWords(rigid)).toBe('none')
    expect(ringScale([])).toBeGreaterThan(0)
  })
})

describe('stretch ticks', () => {
  it('stand 5 mm times one and the strain apart, inside their cloth, every tenth long', () => {
    fc.assert(
      fc.property(fc.double({ min: -0.1, max: 0.6, noNaN: true }), fc.double({ min: 20, max: 400, noNaN: true }), (strain, width) => {
        const part = { kind: 'cloth' as const, half: 'front' as const, from: 30, to: 30 + width, strain }
        const ticks = ringTicks(part)
        ticks.slice(1).forEach((tick, index) => expect(tick.at - ticks[index]!.at).toBeCloseTo(TICK_REST * (1 + strain), 9))
        expect(ticks.every(({ at }) => at > part.from && at < part.to)).toBe(true)
        expect(
          ticks
            .filter(({ long }) => long)
            .every(
              ({ at }) => Math.abs((at - part.from) / (50 * (1 + strain)) - Math.round((at - part.from) / (50 * (1 + strain)))) < 1e-9,
            ),
        ).toBe(true)
      }),
    )
  })

  it('are as many as the cloth had at rest, however far it is stretched', () => {
    const count = (strain: number) => ringTicks({ kind: 'cloth', half: 'front', from: 0, to: 101 * (1 + strain), strain }).length
    expect([0, 0.1, 0.25, 0.5].map(count)).toEqual([20, 20, 20, 20])
  })

  it('are not drawn on what does not stretch', () => {
    expect(ringTicks({ kind: 'rigid', half: 'front', from: 0, to: 50, strain: 0 })).toEqual([])
  })

  it('cross cords in pairs', () => {
    expect(gapCords(10, 20, 12, 2)).toBe('M10 0L20 6M20 0L10 6M10 6L20 12M20 6L10 12')
  })
})

describe('words of a ring', () => {
  it('writes each figure in the unit of the person', () => {
    expect(ringFigure(waist!, 'pressure', 'cm')).toMatchObject({ value: '2.40', unit: 'kPa', label: 'Waist, hold' })
    expect(ringFigure(waist!, 'gap', 'cm')).toMatchObject({ value: '7.2', unit: 'cm' })
    expect(ringFigure({ ...waist!, negativeEase: 14.55 }, 'negativeEase', 'cm')).toMatchObject({ value: '\u221214.6', unit: '%' })
    expect(ringFigure({ ...waist!, cut: mm(25.4 * 21.5) }, 'cut', 'in')).toMatchObject({ value: '21 1/2', unit: 'in' })
    expect(pressureRange(720, 1100)).toBe('0.72 to 1.10 kPa')
  })

  it('says what governs, else how the ring was solved', () => {
    expect(governsWords(bust!)).toBe('stretch governs')
    expect(governsWords(highHip!)).toBe('reduction governs')
    expect(governsWords({ ...bust!, governs: null, mode: 'gap' })).toBe('gap follows from cut and lacing')
    expect(governsWords({ ...bust!, governs: null, mode: 'tension' })).toBe('cut as typed')
  })

  it('reads the drawn parts aloud in order', () => {
    const words = ringBarWords(bust!, 'cm')
    expect(words.startsWith('Bust, half the body from centre front to centre back: front cloth')).toBe(true)
    expect(words).toContain('rigid 1.2 cm in the front')
    expect(words.endsWith('open 2.0 cm in the back, half the gap.')).toBe(true)
  })

  it('keeps marks on the hold scale', () => {
    expect(holdPlace(-5)).toBe(0)
    expect(holdPlace(HOLD_SCALE_END / 2)).toBe(0.5)
    expect(holdPlace(9000)).toBe(1)
  })
})
