import { describe, expect, it } from 'vitest'
import { completeBody } from '../../shared/domain/body/complete'
import { estimateNeckBaseGirth } from '../../shared/domain/body/estimates'
import { bustAngle } from '../../shared/domain/draft/bust-angle'
import { baseStyle } from '../../shared/domain/draft/style'
import { pathLength } from '../../shared/domain/geometry/path'
import { pointDistance, pointTurn } from '../../shared/domain/geometry/point'
import { lineSegment, segmentTangentAt } from '../../shared/domain/geometry/segment'
import { mm } from '../../shared/domain/units/brand'
import { bodyOf, draftOf, measuredOf, valueOf, WEARER, widthsOf } from '../fixtures/draft-inputs'
import { edgeIn, pieceIn } from '../fixtures/draft-invariants'
import { sizeChart } from '../fixtures/size-chart'

describe('the draft against figures from outside', () => {
  // Plain geometry: a V waist of half width 17 and drop 8 cm is a line of 18.79 cm at 25.20 degrees.
  it('measures a straight V line', () => {
    const line = lineSegment({ x: 0, y: 0 }, { x: 170, y: 80 })
    const along = segmentTangentAt(line, 0)
    expect(pathLength([line]) / 10).toBeCloseTo(18.79, 2)
    expect((Math.atan2(along.y, along.x) * 180) / Math.PI).toBeCloseTo(25.2, 2)
  })

  // Computed from ANSUR II (2012, public domain): bust 92, hip 100, stature 168 cm give a neck base of 37.1 cm.
  it('estimates the neck base by the published regression', () => {
    expect(estimateNeckBaseGirth(920, 1000, 1680) / 10).toBeCloseTo(37.1, 1)
    const { neckBaseGirth: _, ...rest } = WEARER
    const body = valueOf(completeBody(measuredOf({ ...rest, stature: 1680 })))
    expect(body.estimated).toContain('neckBaseGirth')
  })

  // From an open survey, numbers derived: bust 986, underbust 817, navel waist 1069, hip 1135 mm, a waist larger than the bust. It drafts.
  it('drafts a body whose waist is larger than its bust', () => {
    const body = bodyOf({ bustGirth: 986, underbustGirth: 817, waistGirth: 1069, hipGirth: 1135 })
    const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0.1, back: 0.1 }) })
    const width = (level: string) => draft.pieces.reduce((sum, piece) => sum + piece.levels.find((own) => own.level === level)!.width, 0)
    expect(width('waist')).toBeCloseTo((1069 / 2) * 0.9, 3)
    expect(width('waist')).toBeGreaterThan(width('bust'))
  })

  // English metric handbook, from memory, as background: a woven block of bust 88 has a back neck width of 7.2 and a front neck width of 6.7 cm.
  it('draws a neck within the range of a woven block', () => {
    const size = sizeChart().find(({ values }) => values.bustGirth === 880)!
    const body = valueOf(completeBody(measuredOf(size.values)))
    const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0, back: 0 }) })
    expect(Math.abs(draft.frame['back-neck-shoulder']!.x - 72)).toBeLessThan(5)
    expect(Math.abs(draft.frame['front-neck-shoulder']!.x - 67)).toBeLessThan(5)
  })

  // Derived: on the base style both necklines, front and back, go round the neck base. Tolerance 4 %, of common practice.
  it('measures the neck base girth along its necklines in every size', () => {
    for (const { values } of sizeChart()) {
      const body = valueOf(completeBody(measuredOf(values)))
      const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0.12, back: 0.12 }) })
      const neckline = (id: 'front-centre' | 'back-centre') => pathLength(edgeIn(pieceIn(draft, id), 'neckline').path)
      expect(Math.abs((2 * (neckline('front-centre') + neckline('back-centre'))) / values.neckBaseGirth! - 1)).toBeLessThan(0.04)
    }
  })

  // Derived by a second way: a scan over angles for the one that makes the front armhole as deep as the back's.
  it('finds the bust angle that a scan finds', () => {
    const bustPoint = { x: 86, y: 157 }
    const underarm = { x: 207, y: 183 }
    for (const longer of [5, 20, 35, 50]) {
      const { angle } = bustAngle({ bustPoint, underarm, longer, chosen: null })
      let best = 0
      let least = Infinity
      for (let candidate = 0; candidate < 0.73; candidate += 1e-5) {
        const height = bustPoint.y + 121 * Math.sin(candidate) + 26 * Math.cos(candidate)
        if (Math.abs(height - underarm.y - longer) < least) {
          least = Math.abs(height - underarm.y - longer)
          best = candidate
        }
      }
      expect(angle).toBeCloseTo(best, 4)
    }
  })

  // Derived: body step 4 cm at a fixed reduction of .20 gives a pattern step of 3.2 cm.
  it('steps by the reduced body step between sizes', () => {
    const bust = (girth: number) => {
      const body = bodyOf({ bustGirth: girth })
      const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0.2, back: 0.2 }) })
      return 2 * draft.pieces.reduce((sum, piece) => sum + piece.levels.find(({ level }) => level === 'bust')!.width, 0)
    }
    expect((bust(960) - bust(920)) / 10).toBeCloseTo(3.2, 6)
  })

  // The drafting notes' own bounds for the faired corner at 35°: edge at most .6 mm longer, bulge under 2 mm.
  it('fairs the corner at the bust within its bounds', () => {
    const body = bodyOf()
    const style = { ...baseStyle(), bustAngle: 35, hem: { level: 'hip' as const, below: mm(0) } }
    const draft = draftOf({ body, style, widths: widthsOf(body, { front: 0.1, back: 0.1 }) })
    const edge = edgeIn(pieceIn(draft, 'side-front'), 'princess')
    const bustPoint = draft.frame['bust-point']!
    const index = edge.nodes.findIndex(({ name }) => name === 'bust')
    const faired = pathLength(edge.path.slice(index - 1, index + 1))
    // As long as its mate's again, because the turned part moved down by what the fairing added.
    expect(Math.abs(faired - 80)).toBeLessThan(0.01)
    const shoulder = edgeIn(pieceIn(draft, 'front-centre'), 'princess').nodes.at(-1)!.at
    const excess = pointDistance(edge.nodes[0]!.at, pointTurn(shoulder, bustPoint, (-35 * Math.PI) / 180))
    expect(excess).toBeGreaterThan(0.1)
    expect(excess).toBeLessThan(0.6)
    const farthest = Math.min(...Array.from({ length: 50 }, (_, step) => xAlong(edge.path[index]!, step / 50)))
    expect(bustPoint.x - farthest).toBeLessThan(2)
    expect(draft.seams[0]!.difference).toBeCloseTo(0, 2)
  })
})

function xAlong(segment: Parameters<typeof segmentTangentAt>[0], t: number): number {
  if (segment.kind === 'line') return segment.from.x
  const s = 1 - t
  return s ** 3 * segment.from.x + 3 * s * s * t * segment.c1.x + 3 * s * t * t * segment.c2.x + t ** 3 * segment.to.x
}
