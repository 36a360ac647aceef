import { readFitting } from '../../shared/domain/fit/fitting'
import { completeBody } from '../../shared/domain/body/complete'
import { bodyLevels } from '../../shared/domain/body/levels'
import { freshLevel } from '../../shared/domain/document/fresh'
import { draftBodice } from '../../shared/domain/draft/bodice'
import { checkStyle, defaultStyle } from '../../shared/domain/draft/style'
import type { Draft } from '../../shared/domain/draft/types'
import { recut } from '../../shared/domain/garment/recut'
import { gapsOf, modeOf, ringGeometry } from '../../shared/domain/garment/rings'
import { levelCautions } from '../../shared/domain/garment/passes'
import { whatIf } from '../../shared/domain/garment/what-if'
import { fitLoadCurve } from '../../shared/domain/textile/curve'
import { DEFAULT_TEXTILE_SETTINGS } from '../../shared/domain/textile/defaults'
import { passLevel } from '../../shared/domain/textile/getting-in'
import { solveRing } from '../../shared/domain/textile/ring'
import { testFigures } from '../../shared/domain/textile/test'
import type { RingSolution } from '../../shared/domain/textile/types'
import type { Result } from '../../shared/domain/units/result'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { refuse } from './refusal'

/** The value, or the refusal with the domain's own words. */
function solved<T>(result: Result<T>): T {
  return result.ok ? result.value : refuse('cannot-solve', { problem: result.problem })
}

export function curveOfTest({ test }: ParsedBody<'solve.curve'>): RouteAnswer<'solve.curve'> {
  return { curve: solved(fitLoadCurve(test)), figures: testFigures(test) }
}

const answerOf = (level: string, result: Result<RingSolution>) => ({
  level,
  solution: result.ok ? result.value : null,
  problem: result.ok ? null : result.problem,
})

/** Each ring has its own answer: one that cannot be solved does not hide the others. */
export function ringsOf(body: ParsedBody<'solve.rings'>): RouteAnswer<'solve.rings'> {
  const settings = body.settings ?? DEFAULT_TEXTILE_SETTINGS
  if ('rings' in body) {
    return { rings: body.rings.map(({ geometry, mode }) => answerOf(geometry.level, solveRing(geometry, mode, settings))) }
  }
  const whole = solved(completeBody(body.measured))
  const rings = bodyLevels(whole).map((level) => {
    const choice = body.document.levels.find((one) => one.level === level.id) ?? freshLevel(level.id)
    const { exertion } = body.document.use
    const geometry = ringGeometry(level, { ...choice, ...gapsOf(body.document, choice) }, body.plans, body.measured, { exertion })
    const cut = solveRing(geometry, { solve: 'cut', hold: choice.hold }, settings)
    const mode = cut.ok ? modeOf(body.document, choice, cut.value) : null
    return answerOf(level.id, mode === null ? cut : solveRing(geometry, mode, settings))
  })
  return { rings }
}

export function gettingInOf({ levels }: ParsedBody<'solve.gettingIn'>): RouteAnswer<'solve.gettingIn'> {
  const passes = levels.map(({ ring, opening, needs }) => passLevel(ring.geometry, ring.widths, opening, needs))
  return { levels: passes, cautions: passes.flatMap((pass) => levelCautions({ ...pass, over: 'parts it passes' }, true)) }
}

export function recutOf({ fitted, final }: ParsedBody<'solve.recut'>): RouteAnswer<'solve.recut'> {
  return solved(recut(fitted, final))
}

export function fittingOf({ levels, geometries, rings, settings, standing }: ParsedBody<'solve.fitting'>): RouteAnswer<'solve.fitting'> {
  return readFitting(levels, geometries, rings, settings ?? DEFAULT_TEXTILE_SETTINGS, standing)
}

export function whatIfOf({ input, trials }: ParsedBody<'solve.whatIf'>): RouteAnswer<'solve.whatIf'> {
  const { rings, comes, goes, document } = solved(whatIf(input, trials))
  return { rings: [...rings], comes: [...comes], goes: [...goes], document }
}

export function piecesOf(given: ParsedBody<'solve.pieces'>): Draft {
  const body = given.body ?? solved(completeBody(given.measured ?? {}))
  const style = given.style ?? defaultStyle()
  const [misfit] = checkStyle(style, body)
  if (misfit) refuse('cannot-solve', { problem: misfit })
  return solved(draftBodice({ body, style, widths: given.widths }))
}
