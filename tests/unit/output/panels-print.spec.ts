import { describe, expect, it } from 'vitest'
import { withPanelCount } from '../../../shared/domain/draft/panels'
import { baseStyle } from '../../../shared/domain/draft/style'
import type { BodiceStyle, DraftPiece } from '../../../shared/domain/draft/types'
import { layoutPieces } from '../../../shared/domain/output/layout'
import { placedBounds } from '../../../shared/domain/output/placing'
import { allowanceWords } from '../../../shared/domain/output/print-words'
import { DEFAULT_PRINT, printSet } from '../../../shared/domain/output/print-set'
import { mm } from '../../../shared/domain/units/brand'
import { bodyOf, draftOf, widthsOf } from '../../fixtures/draft-inputs'
import { printFacts } from '../../fixtures/print-facts'

const body = bodyOf()
function piecesWith(front: number, back: number, changes: Partial<BodiceStyle> = {}): readonly DraftPiece[] {
  const base = baseStyle()
  const style: BodiceStyle = {
    ...base,
    panels: { front: withPanelCount(base.panels.front, front), back: withPanelCount(base.panels.back, back) },
    hemShape: { form: 'pointed', front: mm(60), back: mm(30), side: mm(0), curve: 0.4 },
    ...changes,
  }
  return draftOf({ body, style, widths: widthsOf(body, { front: 0.12, back: 0.12 }) }).pieces
}

describe('the print of a bodice of other panels', () => {
  it('lays all of them out in wearing order and prints every one', () => {
    for (const [front, back] of [
      [1, 1],
      [3, 3],
      [4, 2],
      [2, 1],
    ] as const) {
      const pieces = piecesWith(front, back)
      expect(layoutPieces(pieces, 'wearing', 30).map(({ piece }) => piece)).toEqual(pieces.map(({ id }) => id))
      const lefts = layoutPieces([...pieces].reverse(), 'packed', 20).map(
        (placement) =>
          placedBounds(
            pieces.find(({ id }) => id === placement.piece)!,
            placement,
          ).left,
      )
      expect(lefts).toHaveLength(front + back)
      const set = printSet(printFacts, pieces, DEFAULT_PRINT)
      expect(set.ok && set.value.placements.map(({ piece }) => piece).sort()).toEqual(pieces.map(({ id }) => id).sort())
      const said = set.ok
        ? set.value.sheets
            .flatMap((sheet) => [...sheet.under, ...sheet.operations])
            .flatMap((one) => (one.kind === 'text' ? [one.text] : []))
        : []
      for (const { name } of pieces) expect(said.join(' ')).toContain(name)
    }
  })

  it('names edges by their whole and further seams together', () => {
    expect(allowanceWords(piecesWith(1, 2), 'cm')).toBe('1.0 cm armhole, dart, neckline, princess, shoulder, side; 2.0 cm hem')
    expect(allowanceWords(piecesWith(4, 2), 'cm')).toContain('further seams')
  })
})

describe('another number of panels', () => {
  it('keeps the seams that stay, and takes the next free letter', () => {
    const three = withPanelCount(baseStyle().panels.front, 3)
    expect(three.further.map(({ id }) => id)).toEqual(['a'])
    const own = { ...three, further: three.further.map((seam) => ({ ...seam, id: 'b' as const, at: 0.7 })) }
    expect(withPanelCount(own, 4).further.map(({ id, at }) => [id, at])).toEqual([
      ['b', 0.7],
      ['a', null],
    ])
    expect(withPanelCount(own, 2)).toEqual({ princess: true, further: [] })
    expect(withPanelCount(own, 1)).toEqual({ princess: false, further: [] })
  })
})
