import type { AlterationEffect } from '../draft/alterations'
import type { Caution } from '../cautions/types'
import { draftCautions } from './draft-cautions'
import type { GarmentInput, GarmentSolution } from './types'

export function garmentCautions(
  input: GarmentInput,
  solution: Omit<GarmentSolution, 'cautions'>,
  effects: readonly AlterationEffect[],
): readonly Caution[] {
  return draftCautions({
    draft: solution.draft,
    alterations: input.document.alterations,
    effects,
    settled: solution.settled,
    rounds: solution.rounds,
  })
}
