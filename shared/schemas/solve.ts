import { z } from 'zod'
import { figure, length, mirrors, pressure, ratio, tension } from './base'
import { MEASUREMENT_CATALOGUE } from '../domain/body/catalogue'
import type { MeasurementKey } from '../domain/body/types'
import type { FittingReading } from '../domain/fit/types'
import type { Recut } from '../domain/garment/recut'
import type { RingDifference, Trial } from '../domain/garment/what-if'
import type { LevelPass, Opening } from '../domain/textile/getting-in'
import type { Problem } from '../domain/units/result'
import { bodiceStyle, draftBody, draftPiece, levelId, levelWidths } from './draft'
import { fittingLevel } from './fittings'
import { caution, garmentDocument, garmentInput, garmentSolution, layerChoice } from './garments'
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
  /** Tiles lie on sheets: a roll is for the print of a version. */
  paper: paperId.exclude(['roll-841', 'roll-914', 'roll-36in']).default('A4'),
  width: figure(1, 5000).optional(),
  height: figure(1, 5000).optional(),
  /** Room between pieces, mm. */
  spacing: figure(0, 500).default(20),
})

const opening = mirrors<Opening>()(
  z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('closed') }),
    z.object({ kind: z.literal('by'), width: length(0, 5000) }),
    z.object({ kind: z.literal('whole') }),
  ]),
)
const worn = z
  .object({ geometry: ringGeometry, widths: z.array(length(0, 5000)).max(60) })
  .refine(({ geometry, widths }) => widths.length === geometry.segments.length, {
    path: ['widths'],
    message: 'Give one width for each segment.',
  })

/** Each level as cut, how it opens, and the girth that it has to pass, mm. */
export const solveGettingInBody = z.object({
  levels: z
    .array(z.object({ ring: worn, opening, needs: length(50, 5000) }))
    .min(1)
    .max(40),
})
const levelPass = mirrors<LevelPass>()(
  z.object({
    level: z.string(),
    name: z.string(),
    needs: length(),
    reach: length(),
    limit: tension(),
    tension: tension().nullable(),
    pull: figure().nullable(),
    verdict: z.enum(['open', 'passes', 'tight', 'cannot']),
  }),
)
/** `cautions` are those of the levels; who opens it and how it is left is asked of a whole garment. */
export const solveGettingInAnswer = z.object({ levels: z.array(levelPass), cautions: z.array(caution) })

const holdBand = z.enum(['light', 'easy', 'firm', 'strong', 'stop'])
const recutProposal = z.object({
  document: garmentDocument,
  solution: garmentSolution,
  steps: z.array(
    z.object({
      level: z.string(),
      asked: pressure(),
      cut: length(),
      pressure: pressure(),
      band: holdBand,
      governs: z.enum(['hold', 'stretch', 'reduction']).nullable(),
      change: length(),
      changeFront: length(),
      changeBack: length(),
      factor: figure(),
    }),
  ),
  alterations: z.array(z.object({ id: z.string(), name: z.string(), before: length(), after: length(), factor: z.number() })),
})

/** Equal-hold recut: the garment that fitted and the one with the final layers, each as an input of its solve. */
export const solveRecutBody = z.object({ fitted: garmentInput, final: garmentInput })
export const solveRecutAnswer = mirrors<Recut>()(
  z.object({
    levels: z.array(
      z.object({
        level: z.string(),
        name: z.string(),
        fitted: z.object({ cut: length(), pressure: pressure(), band: holdBand }),
        copied: z.object({ pressure: pressure(), band: holdBand }).nullable(),
      }),
    ),
    targets: z.object({ fitted: recutProposal, own: recutProposal }),
  }),
)

/** What a fitting says: what was seen, and the rings that were drafted with their geometry. */
export const solveFittingBody = z.object({
  levels: z.array(fittingLevel).min(1).max(5),
  geometries: z.array(ringGeometry).min(1).max(40),
  rings: z.array(ringSolution).min(1).max(40),
  /** The stiffness that the version was already solved with. */
  standing: z
    .object({ factor: figure(0.05, 20), uncertainty: figure(0, 5), learntOn: z.string().max(40), levels: z.array(z.string()).optional() })
    .nullable()
    .default(null),
  settings: textileSettings.optional(),
})
export const solveFittingAnswer = mirrors<FittingReading>()(
  z.object({
    levels: z.array(
      z.object({
        level: levelId,
        name: z.string(),
        model: tension(),
        wanted: tension(),
        share: figure(),
        letOut: length().nullable(),
        measured: tension().nullable(),
      }),
    ),
    tightest: levelId.nullable(),
    stiffness: z
      .object({
        factor: figure(),
        uncertainty: figure(),
        pulls: z.number().int(),
        isOdd: z.boolean(),
        levels: z.array(levelId),
        left: z.number().int(),
      })
      .nullable(),
  }),
)

const anyLevel = z.union([levelId, z.literal('all')])
const zone = z.enum(['front', 'back', 'side', 'cups', 'yoke', 'sleeve', 'waistPanel', 'both'])
const keys = MEASUREMENT_CATALOGUE.map((entry) => entry.key) as [MeasurementKey, ...MeasurementKey[]]
const trial = mirrors<Trial>()(
  z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('hold'), level: anyLevel, hold: pressure(0, 20_000) }),
    z.object({ kind: z.literal('gap'), level: anyLevel, half: z.enum(['front', 'back']), gap: length(0, 2000) }),
    z.object({ kind: z.literal('layers'), zone, layers: z.array(layerChoice).max(12) }),
    z.object({ kind: z.literal('count'), zone, layer: z.string().max(60), count: z.number().int().min(0).max(12) }),
    z.object({ kind: z.literal('measurement'), key: z.enum(keys), value: figure(0, 5000) }),
  ]),
)
/** A garment as it stands, and what is tried on it, in that order. */
export const solveWhatIfBody = z.object({ input: garmentInput, trials: z.array(trial).min(1).max(20) })
export const solveWhatIfAnswer = z.object({
  rings: z.array(
    mirrors<RingDifference>()(
      z.object({
        level: z.string(),
        name: z.string(),
        before: ringSolution,
        after: ringSolution,
        cut: length(),
        gap: length(),
        pressure: pressure(-1e7),
        breathPressure: pressure(-1e7),
        negativeEase: figure(),
        strain: ratio(),
        governsChanged: z.boolean(),
      }),
    ),
  ),
  comes: z.array(caution),
  goes: z.array(caution),
  document: garmentDocument,
})
