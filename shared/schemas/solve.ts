import { z } from 'zod'
import { figure, mirrors } from './base'
import type { Problem } from '../domain/units/result'
import { bodiceStyle, draftBody, draftPiece, levelWidths } from './draft'
import { garmentDocument } from './garments'
import { measuredValues } from './measuring'
import { paperId, tileOptions } from './print'
import { layerPlan, loadCurve, ringGeometry, ringMode, ringSolution, stretchFigures, stretchTest } from './textile'
import { textileSettings } from './workroom'

export const problemView = mirrors<Problem>()(
  z.object({ code: z.string(), message: z.string(), todo: z.string().optional(), at: z.string().optional() }),
)

/** Load curve and figures of one test; `thickness` is not needed for them. */
export const solveCurveBody = z.object({ test: stretchTest })
export const solveCurveAnswer = z.object({ curve: loadCurve, figures: stretchFigures })

/**
 * Rings in one of two ways: `rings`, each with its geometry and mode; or `body`, a layer plan for front and back and the
 * levels of a document (hold, cut or gap at each).
 */
export const solveRingsBody = z.union([
  z.object({
    rings: z
      .array(z.object({ geometry: ringGeometry, mode: ringMode }))
      .min(1)
      .max(40),
    settings: textileSettings.optional(),
  }),
  z.object({
    measured: measuredValues,
    plans: z.object({ front: layerPlan, back: layerPlan }),
    document: garmentDocument,
    settings: textileSettings.optional(),
  }),
])
export const ringAnswer = z.object({ level: z.string(), solution: ringSolution.nullable(), problem: problemView.nullable() })
export const solveRingsAnswer = z.object({ rings: z.array(ringAnswer) })

export const solvePiecesBody = z
  .object({
    measured: measuredValues.optional(),
    body: draftBody.optional(),
    /** One entry for each level: half widths on the pieces, with their gaps. */
    widths: z.array(levelWidths).min(5).max(5),
    style: bodiceStyle.optional(),
  })
  .refine((body) => body.measured !== undefined || body.body !== undefined, {
    path: ['measured'],
    message: 'Give the measurements or a complete body.',
  })

export const solveTilesBody = tileOptions.extend({
  pieces: z.array(draftPiece).min(1).max(20),
  paper: paperId.default('A4'),
  /** Room between pieces, mm. */
  spacing: figure(0, 500).default(20),
})
