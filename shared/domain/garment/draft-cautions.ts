import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import { allPieces } from '../draft/roles'
import type { AlterationEffect } from '../draft/alterations'
import { bentFolds, CORNER_WITHIN, edgeCorners, TRUE_WITHIN } from '../draft/truing'
import type { Alteration, Draft, DraftFinding } from '../draft/types'

const BY_CODE = new Map(
  [
    cautions.bustAngleNegative,
    cautions.bustAngleLarge,
    cautions.bustAngleHeld,
    cautions.bustAngleEased,
    cautions.bustAngleDart,
    cautions.bustLevelMoved,
    cautions.acrossFrontHeld,
    cautions.acrossBackHeld,
    cautions.armholeAimOff,
    cautions.sideSeamMoved,
    cautions.pieceNarrow,
  ].map((make) => [make.code, make]),
)

function ofFinding(finding: DraftFinding): readonly Caution[] {
  const make = BY_CODE.get(finding.code)
  if (!make) return []
  const place = finding.piece
    ? { kind: 'piece' as const, piece: finding.piece, ...(finding.edge ? { edge: finding.edge } : {}) }
    : { kind: 'garment' as const }
  return [make(place, { message: finding.message, value: finding.value, unit: finding.unit })]
}

/** Cautions of the draft: what it had to decide, seams that are not true, alterations that could not be applied, a loop that did not settle. */
export function draftCautions(facts: {
  readonly draft: Draft
  readonly alterations: readonly Alteration[]
  readonly effects: readonly AlterationEffect[]
  readonly settled: boolean
  readonly rounds: number
}): readonly Caution[] {
  const { draft, alterations, effects, settled, rounds } = facts
  const found = draft.findings.flatMap(ofFinding)
  for (const seam of draft.seams) {
    if (Math.abs(seam.difference) <= TRUE_WITHIN) continue
    const { piece, edge } = seam.a
    const by = Math.abs(seam.difference).toFixed(1)
    found.push(
      cautions.seamsDiffer(
        { kind: 'piece', piece, edge },
        { message: `${seam.name}: its two edges differ by ${by} mm.`, value: seam.difference, unit: 'mm', limit: TRUE_WITHIN },
      ),
    )
  }
  for (const corner of edgeCorners(allPieces(draft), draft.seams)) {
    if (Math.abs(corner.angle) <= CORNER_WITHIN) continue
    found.push(
      cautions.edgeCorner(
        { kind: 'piece', piece: corner.a.piece, edge: corner.a.edge },
        {
          message: `${corner.seam.name}: the ${corner.a.edge} has a corner of ${Math.abs(corner.angle).toFixed(1)}° where it crosses.`,
          value: corner.angle,
          unit: 'degree',
          limit: CORNER_WITHIN,
        },
      ),
    )
  }
  for (const { role, off } of bentFolds(allPieces(draft))) {
    found.push(
      cautions.foldBent(
        { kind: 'piece', piece: role.piece, edge: role.edge, node: role.node },
        {
          message: `A point of the fold stands ${Math.abs(off).toFixed(1)} mm off it: it can no longer be cut on the fold.`,
          value: off,
          unit: 'mm',
        },
      ),
    )
  }
  for (const effect of effects) {
    if (effect.state !== 'parked' && effect.state !== 'refused') continue
    const name = alterations.find((one) => one.id === effect.id)?.name ?? 'An alteration'
    const why = effect.problem?.message ?? 'its point is not in this draft.'
    found.push(
      cautions.alterationParked(
        { kind: 'alteration', alteration: effect.id },
        { message: `${name}: not applied, ${why.charAt(0).toLowerCase()}${why.slice(1)}`, value: 1, unit: 'count' },
      ),
    )
  }
  if (!settled) found.push(cautions.notSettled({ kind: 'garment' }, { rounds }))
  return found
}
