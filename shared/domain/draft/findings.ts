import { pathLength } from '../geometry/path'
import type { Frame } from './frame'
import { halfOf, wholeEdge } from './roles'
import { degrees, millimetres } from './say'
import type { DraftFinding, DraftPiece, EdgeId, PieceEdge, PieceId } from './types'

/** A difference from the armhole aim above this is said, mm. */
export const ARMHOLE_AIM_OFF = 30
/** A piece narrower than this at a level is said, mm. */
const NARROW_PIECE = 25

/** Length of the armhole, front and back together, mm; 0 without shoulders. */
export const armholeLength = (pieces: readonly DraftPiece[]): number =>
  pieces
    .flatMap(({ edges }) => edges)
    .filter(({ id }) => wholeEdge(id) === 'armhole')
    .reduce((sum, { path }) => sum + pathLength(path), 0)

const EDGE_WORDS: Readonly<Partial<Record<EdgeId, string>>> = { neckline: 'neckline', armhole: 'armhole', top: 'top edge' }

/** The dart that takes the place of a princess seam: said, with its width at the mouth. */
export function dartFinding(pieces: readonly DraftPiece[], { bust }: Frame): readonly DraftFinding[] {
  const piece = pieces.find(({ edges }) => edges.some(({ id }) => id === 'dart'))
  const leg = piece?.edges.findIndex(({ id }) => id === 'dart') ?? -1
  const own = piece?.edges[leg]
  if (piece === undefined || own === undefined) return []
  const into = EDGE_WORDS[wholeEdge((piece.edges[leg + 1] as PieceEdge).id)] ?? 'edge'
  const mouth = 2 * pathLength(own.path) * Math.sin(bust.angle / 2)
  const shown = (bust.angle * 180) / Math.PI
  return [
    {
      code: 'bust-angle-dart',
      piece: piece.id,
      edge: 'dart',
      value: shown,
      unit: 'degree',
      message: `The bust angle of ${degrees(shown)} is a dart from the bust point into the ${into}, ${millimetres(mouth)} wide at its mouth.`,
    },
  ]
}

/** A finding on the piece that has its edge, the one nearest to the side; on that half's side piece where none has. */
export function placedFinding(finding: DraftFinding, pieces: readonly DraftPiece[]): DraftFinding {
  if (finding.piece === null || pieces.some(({ id }) => id === finding.piece)) return finding
  const half = pieces.filter(({ zone }) => zone === halfOf(finding.piece as PieceId))
  const wide = halfOf(finding.piece) === 'front' ? [...half].reverse() : half
  const own = wide.find(({ edges }) => edges.some(({ id }) => id === finding.edge))
  const edge =
    own === undefined && finding.edge === 'princess' && half.some(({ edges }) => edges.some(({ id }) => id === 'dart')) ? 'dart' : null
  return { ...finding, piece: (own ?? wide[0])?.id ?? null, edge: own === undefined ? edge : finding.edge }
}

/** What is said of the armhole and of narrow pieces; read again after alterations. */
export function readFindings(pieces: readonly DraftPiece[], aim: number): readonly DraftFinding[] {
  const off = armholeLength(pieces) - aim
  const findings: DraftFinding[] = []
  if (Math.abs(off) > ARMHOLE_AIM_OFF) {
    findings.push({
      code: 'armhole-aim-off',
      piece: null,
      edge: 'armhole',
      value: off,
      unit: 'mm',
      message: `The armhole is ${millimetres(Math.abs(off))} ${off > 0 ? 'longer' : 'shorter'} than its aim; ${off > 0 ? 'raise' : 'lower'} the underarm or measure the armscye again.`,
    })
  }
  return [...findings, ...narrowFindings(pieces)]
}

/** Pieces that are very narrow at a level. */
export function narrowFindings(pieces: readonly DraftPiece[]): readonly DraftFinding[] {
  const findings: DraftFinding[] = []
  for (const piece of pieces) {
    const narrowest = piece.levels.reduce(
      (least, level) => (level.width < least.width ? level : least),
      piece.levels[0] ?? { width: Infinity, level: '' },
    )
    if (narrowest.width >= NARROW_PIECE) continue
    findings.push({
      code: 'piece-narrow',
      piece: piece.id,
      edge: null,
      value: narrowest.width,
      unit: 'mm',
      message: `${piece.name} is only ${millimetres(narrowest.width)} wide at the ${narrowest.level} level.`,
    })
  }
  return findings
}
