import { spawnSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { pieceOutline } from '../../shared/domain/draft/piece'
import { withPanelCount } from '../../shared/domain/draft/panels'
import { baseStyle } from '../../shared/domain/draft/style'
import type { BodiceStyle, Draft, HalfPanels } from '../../shared/domain/draft/types'
import { outlineOffset } from '../../shared/domain/geometry/offset'
import type { Polygon } from '../../shared/domain/geometry/polygon'
import { mm } from '../../shared/domain/units/brand'
import { seeded } from '../fixtures/bodies'
import { bodyOf, draftOf, widthsOf } from '../fixtures/draft-inputs'

const SCRIPT = `
import json, sys
from shapely.geometry import Polygon, box
work = json.load(sys.stdin)
found = []
for case in work:
    there = Polygon(case['outline']).buffer(case['by'], join_style=2, mitre_limit=case['limit'])
    own = Polygon(case['own'])
    if case.get('clip'):
        beside = box(0, -2000, case['clip'], 2000)
        there, own = there.intersection(beside), own.intersection(beside)
    found.append({'apart': there.hausdorff_distance(own), 'areas': [there.area, own.area], 'kind': there.geom_type, 'valid': own.is_valid})
print(json.dumps(found))
`

/** A Python that has shapely (Debian package python3-shapely), or null. */
const python = ['python3', '/usr/bin/python3'].find((command) => spawnSync(command, ['-c', 'import shapely']).status === 0) ?? null

interface Case {
  /** Only this much beside the fold at x = 0 is compared, mm. */
  readonly clip?: number
  readonly outline: readonly (readonly [number, number])[]
  readonly own: readonly (readonly [number, number])[]
  readonly by: number
  readonly limit: number
}

const one: HalfPanels = { princess: false, further: [] }
const three = withPanelCount(baseStyle().panels.front, 3)
const pointed = { form: 'pointed' as const, front: mm(70), back: mm(40), side: mm(0), curve: 0.6 }
const base: BodiceStyle = { ...baseStyle(), necklineFrontDepth: mm(70), necklineBackDepth: mm(40), necklineWidth: mm(20) }
const STYLES: readonly BodiceStyle[] = [
  { ...base, neckline: { front: 'v', back: 'v' }, hem: { level: 'waist', below: mm(10) }, hemShape: pointed },
  { ...base, neckline: { front: 'square', back: 'square' }, panels: { front: one, back: one } },
  { ...base, panels: { front: three, back: three }, hemShape: { ...pointed, form: 'rounded' } },
  { ...base, top: { form: 'pointed', front: mm(40), back: mm(18), side: mm(18), curve: 0.4 }, panels: { front: three, back: one } },
  {
    ...base,
    neckline: { front: 'v', back: 'round' },
    princessEnd: { front: { edge: 'armhole', at: 0.4 }, back: { edge: 'neckline', at: 0.6 } },
  },
]
const EVEN: BodiceStyle['allowances'] = {
  seam: mm(10),
  centre: mm(10),
  opening: mm(10),
  shoulder: mm(10),
  neckline: mm(10),
  armhole: mm(10),
  hem: mm(10),
}

function draftIn(style: BodiceStyle): Draft {
  const body = bodyOf()
  const widths = widthsOf(body, { front: 0.1, back: 0.14 })
  const bust = widths.find(({ level }) => level === 'bust')!
  const above = { y: mm(183), front: mm(bust.front - 20), back: mm(bust.back - 4) }
  return draftOf({ body, style, widths, ...(style.top === null ? {} : { above }) })
}

/** Mitres far beyond any corner here, so that no join is cut off: the two libraries cut differently beyond the limit. */
const LIMIT = 20

function caseOf(outline: Polygon, by: number): Case {
  const own = outlineOffset(
    outline.map((from, index) => ({ points: [from, outline[(index + 1) % outline.length]!], allowance: by })),
    LIMIT,
  )!
  const pairs = (points: Polygon) => points.map(({ x, y }) => [x, y] as const)
  return { outline: pairs(outline), own: pairs(own), by, limit: LIMIT }
}

function compare(cases: readonly Case[]): readonly { apart: number; areas: [number, number]; kind: string; valid: boolean }[] {
  const run = spawnSync(python!, ['-c', SCRIPT], { input: JSON.stringify(cases), encoding: 'utf8', maxBuffer: 1 << 26 })
  if (run.status !== 0) throw new Error(run.stderr)
  return JSON.parse(run.stdout)
}

if (python === null) console.warn('SKIPPED: python3-shapely is not installed, so offsets were not compared with GEOS.')

// Source: buffer with mitre joins by GEOS through Debian's python3-shapely, a general-purpose library; asked for to .05 mm.
describe.skipIf(python === null)('offsets against a mitre buffer of GEOS', () => {
  it('agree to .05 mm on star-shaped outlines with blunt corners', () => {
    const random = seeded(41)
    const cases = Array.from({ length: 60 }, () => {
      const corners = 12 + Math.floor(random() * 20)
      const outline = Array.from({ length: corners }, (_, index) => {
        const radius = 110 + 60 * random()
        const angle = (2 * Math.PI * index) / corners
        return { x: radius * Math.cos(angle), y: radius * Math.sin(angle) }
      })
      return caseOf(outline, 2 + 18 * random())
    })
    for (const { apart, areas, kind, valid } of compare(cases)) {
      expect({ kind, valid }).toEqual({ kind: 'Polygon', valid: true })
      expect(apart).toBeLessThan(0.05)
      expect(Math.abs(areas[0] - areas[1])).toBeLessThan(5)
    }
  })

  it('agree to .05 mm on the pieces of a draft', () => {
    const body = bodyOf()
    const draft = draftOf({
      body,
      style: { ...baseStyle(), centreFront: 'seam', centreBack: 'seam' },
      widths: widthsOf(body, { front: 0.1, back: 0.14 }),
    })
    const cases = draft.pieces.flatMap((piece) => [5, 10, 20].map((by) => caseOf(pieceOutline(piece.edges), by)))
    for (const { apart, kind, valid } of compare(cases)) {
      expect({ kind, valid }).toEqual({ kind: 'Polygon', valid: true })
      expect(apart).toBeLessThan(0.05)
    }
  })

  it('agree to .05 mm on pieces with points, darts, square necklines and top edges', () => {
    for (const style of STYLES) {
      const cases = draftIn(style).pieces.flatMap((piece) => [6, 12].map((by) => caseOf(pieceOutline(piece.edges), by)))
      for (const { apart, kind, valid } of compare(cases)) {
        expect({ kind, valid }).toEqual({ kind: 'Polygon', valid: true })
        expect(apart).toBeLessThan(0.05)
      }
    }
  })

  // Independent way: the whole piece, opened at its fold, buffered as one outline, then cut through along the fold.
  it('end on a fold where the opened piece has its middle, at points too', () => {
    const folded = STYLES.map((style) => ({ ...style, centreFront: 'fold' as const, allowances: EVEN }))
    const cases = folded.flatMap((style) =>
      draftIn(style)
        .pieces.filter(({ onFold }) => onFold)
        .map((piece) => {
          const half = pieceOutline(piece.edges)
          const off = half.filter(({ x }) => x > 1e-6)
          const upper = half.filter(({ x }) => Math.abs(x) <= 1e-6).sort((a, b) => b.y - a.y)
          const [top, bottom] = [upper[0]!, upper.at(-1)!]
          const turn = off.findIndex((_, index) => half.indexOf(off[index]!) > half.indexOf(bottom))
          const right = [...off.slice(turn), ...off.slice(0, turn)]
          const whole = [bottom, ...right, top, ...[...right].reverse().map(({ x, y }) => ({ x: -x, y }))]
          return { ...caseOf(whole, 10), own: piece.cuttingLine.map(({ x, y }) => [x, y] as const), clip: 30 }
        }),
    )
    expect(cases.length).toBeGreaterThan(4)
    for (const { apart, kind, valid } of compare(cases)) {
      expect({ kind, valid }).toEqual({ kind: 'Polygon', valid: true })
      // The cutting line is mitred square to the true tangent, the opened outline to its chord: at a point that makes a tenth.
      expect(apart).toBeLessThan(0.2)
    }
  })
})
