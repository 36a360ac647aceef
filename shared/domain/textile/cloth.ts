import type { Mm, Strain } from '../units/brand'
import { strain } from '../units/brand'
import type { Problem, Result } from '../units/result'
import { fail, succeed } from '../units/result'
import { fitLoadCurve } from './curve'
import { testFigures } from './test'
import type { LayerCloth, StretchTest } from './types'

/** Part of the tested stretch that is the wear limit where nobody has found the strain of acceptable recovery. A setting. */
export const WEAR_SHARE = 0.5
/** Part of the tested stretch allowed for the seconds of getting in. A setting. */
export const PULL_ON_SHARE = 0.9

/** What a cloth brings besides its test. */
export interface ClothIdentity {
  readonly clothId: string
  readonly name: string
  readonly thickness: Mm
  readonly testedOn: string | null
  /** The strain at which the workroom still found the recovery acceptable; null takes the test's own, else half the tested stretch. */
  readonly acceptableStrain?: Strain | null
  /** Spread taken with fewer than three specimens; the workroom's setting. */
  readonly fewSpread?: number
}

/** A cloth as a layer needs it: curve, figures, wear limit u and pull-on limit p (never beyond the tested range), for one direction and state. */
export function layerCloth(identity: ClothIdentity, test: StretchTest): Result<LayerCloth> {
  if (!(identity.thickness >= 0 && Number.isFinite(identity.thickness))) {
    const problem: Problem = {
      code: 'thickness-impossible',
      message: `${identity.name} has no possible thickness.`,
      todo: 'Enter its thickness in mm.',
      at: 'thickness',
    }
    return fail(problem)
  }
  const curve = fitLoadCurve(test, identity.fewSpread)
  if (!curve.ok) return curve
  const figures = testFigures(test)
  const acceptable = identity.acceptableStrain ?? test.acceptableStrain ?? null
  return succeed({
    clothId: identity.clothId,
    name: identity.name,
    direction: test.direction,
    ...(test.angle === undefined ? {} : { angle: test.angle }),
    state: test.state,
    curve: curve.value,
    figures,
    thickness: identity.thickness,
    wearLimit: strain(acceptable === null ? WEAR_SHARE * figures.stretch : Math.min(acceptable, curve.value.testedTo)),
    pullOnLimit: strain(Math.min(PULL_ON_SHARE * figures.stretch, curve.value.testedTo)),
    testedOn: identity.testedOn,
  })
}
