import { pathLength } from '../geometry/path'
import { mm } from '../units/brand'
import type { Problem } from '../units/result'
import { inRightHalf, lowerFirst } from './roles'
import type { Draft, DraftFinding, DraftPiece, SeamComparison } from './types'

/** Halves that differ are two pieces at the centre. */
export const foldProblem = (half: 'front' | 'back'): Problem => ({
  code: 'right-half-on-fold',
  message: `The right half differs from the left, so the centre ${half} cannot lie on a fold.`,
  todo: `Take a seam or an opening at the centre ${half}.`,
  at: half === 'front' ? 'style.centreFront' : 'style.centreBack',
})

/** A problem of the right half, at its own place in the style. */
export const rightProblem = (problem: Problem): Problem => ({
  ...problem,
  message: `Right half: ${lowerFirst(problem.message)}`,
  ...(problem.at?.startsWith('style.') ? { at: problem.at.replace('style.', 'style.right.') } : {}),
})

const named = (piece: DraftPiece, side: 'Left' | 'Right'): DraftPiece => ({
  ...piece,
  name: `${side} ${lowerFirst(piece.name)}`,
  quantity: 1,
})

const toRight = (piece: DraftPiece): DraftPiece => ({
  ...named(piece, 'Right'),
  id: inRightHalf(piece.id),
  edges: piece.edges.map((edge) => (edge.mate === null ? edge : { ...edge, mate: { ...edge.mate, piece: inRightHalf(edge.mate.piece) } })),
})

/** What of the right half's findings the left one has not said already. */
function rightFindings(left: Draft, right: Draft): readonly DraftFinding[] {
  const said = new Set(left.findings.map(({ message }) => message))
  return right.findings
    .filter(({ message }) => !said.has(message))
    .map((finding) => ({
      ...finding,
      piece: finding.piece === null ? null : inRightHalf(finding.piece),
      message: `Right half: ${lowerFirst(finding.message)}`,
    }))
}

/** The seams of a right half under names of their own. */
export const rightSeams = (seams: readonly SeamComparison[]): readonly SeamComparison[] =>
  seams.map((seam) => ({ ...seam, name: `${seam.name}, right` }))

/** Both halves compared where they meet at the centres, mm: what is moved on one of them alone shows there. */
export function centreSeams(left: readonly DraftPiece[], right: readonly DraftPiece[]): readonly SeamComparison[] {
  return (['front', 'back'] as const).flatMap((zone) => {
    const sides = [left, right].map((pieces) =>
      pieces.flatMap((piece) =>
        piece.zone === zone
          ? piece.edges
              .filter(({ id }) => id === 'centre')
              .map(({ id, path }) => ({ piece: piece.id, edge: id, length: mm(pathLength(path)) }))
          : [],
      ),
    )
    const [a, b] = [sides[0]?.[0], sides[1]?.[0]]
    if (a === undefined || b === undefined) return []
    return [{ name: zone === 'front' ? 'Centre front' : 'Centre back', a, b, difference: mm(a.length - b.length) }]
  })
}

/** Two drafts of the same body, widths and centres as the left and the right half of one bodice; every piece is cut once. */
export function withRightHalf(left: Draft, right: Draft): Draft {
  const own = right.pieces.map(toRight)
  return {
    ...left,
    pieces: left.pieces.map((piece) => named(piece, 'Left')),
    right: own,
    seams: [
      ...left.seams,
      ...rightSeams(
        right.seams.map((seam) => ({
          ...seam,
          a: { ...seam.a, piece: inRightHalf(seam.a.piece) },
          b: { ...seam.b, piece: inRightHalf(seam.b.piece) },
        })),
      ),
      ...centreSeams(left.pieces, own),
    ],
    findings: [...left.findings, ...rightFindings(left, right)],
  }
}
