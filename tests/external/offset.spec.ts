import { spawnSync } from 'node:child_process'
import { describe, expect, it } from 'vitest'
import { pieceOutline } from '../../shared/domain/draft/piece'
import { baseStyle } from '../../shared/domain/draft/style'
import { outlineOffset } from '../../shared/domain/geometry/offset'
import type { Polygon } from '../../shared/domain/geometry/polygon'
import { seeded } from '../fixtures/bodies'
import { bodyOf, draftOf, widthsOf } from '../fixtures/draft-inputs'

const SCRIPT = `
import json, sys
from shapely.geometry import Polygon
work = json.load(sys.stdin)
found = []
for case in work:
    there = Polygon(case['outline']).buffer(case['by'], join_style=2, mitre_limit=case['limit'])
    own = Polygon(case['own'])
    found.append({'apart': there.hausdorff_distance(own), 'areas': [there.area, own.area], 'kind': there.geom_type, 'valid': own.is_valid})
print(json.dumps(found))
`

/** A Python that has shapely (Debian package python3-shapely), or null. */
const python = ['python3', '/usr/bin/python3'].find((command) => spawnSync(command, ['-c', 'import shapely']).status === 0) ?? null

interface Case {
  readonly outline: readonly (readonly [number, number])[]
  readonly own: readonly (readonly [number, number])[]
  readonly by: number
  readonly limit: number
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
})
