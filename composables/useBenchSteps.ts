import { allPieces } from '#shared/domain/draft/roles'
import { acknowledgementOf } from '#shared/domain/cautions/acknowledge'
import type { Caution, Severity } from '#shared/domain/cautions/types'
import type { GarmentDocument } from '#shared/domain/document/types'
import type { GarmentProblem, GarmentSolution } from '#shared/domain/garment/types'

export type BenchStep = 'body' | 'cloth' | 'layers' | 'draft' | 'cut' | 'fit'

export interface StepState {
  readonly id: BenchStep
  readonly name: string
  readonly state: 'done' | 'todo' | 'caution' | 'stop'
  readonly detail: string
}

/** The step at which a caution is dealt with. */
export function stepOf(caution: Caution): BenchStep {
  switch (caution.place.kind) {
    case 'body':
      return 'body'
    case 'cloth':
      return 'cloth'
    case 'plan':
    case 'ring':
      return 'layers'
    case 'piece':
    case 'alteration':
      return 'draft'
    case 'garment':
      return 'layers'
  }
}

const RANK: Readonly<Record<Severity, number>> = { stop: 0, caution: 1, note: 2 }

/** Stops first, then cautions, then notes; otherwise as they came. */
export function bySeverity(cautions: readonly Caution[]): Caution[] {
  return [...cautions].sort((a, b) => RANK[a.severity] - RANK[b.severity])
}

export interface StepFacts {
  readonly document: GarmentDocument
  readonly measuredOn: string | null
  readonly solution: GarmentSolution | null
  readonly problem: GarmentProblem | null
  readonly versions: readonly { readonly number: number; readonly cleared: boolean }[]
}

const plural = (count: number, one: string, many = `${one}s`) => `${count} ${count === 1 ? one : many}`

/** The steps of the bench with honest states: what is there, what is missing, where cautions stand. */
export function benchSteps(facts: StepFacts): StepState[] {
  const { document, solution, problem, versions } = facts
  const standing = problem ? [] : (solution?.cautions ?? [])
  const current = standing.filter((caution) => acknowledgementOf(caution, document.acknowledged) === null)
  const worst = (step: BenchStep) => {
    const own = current.filter((caution) => stepOf(caution) === step && caution.severity !== 'note')
    return own.some((caution) => caution.severity === 'stop') ? 'stop' : own.length > 0 ? 'caution' : null
  }
  const count = (step: BenchStep) => {
    const own = current.filter((caution) => stepOf(caution) === step && caution.severity !== 'note').length
    return own > 0 ? plural(own, 'caution') : ''
  }
  const layers = [...document.plans.front, ...document.plans.back]
  const cloths = new Set(layers.map((layer) => layer.clothId)).size
  const stack = (zone: 'front' | 'back') => document.plans[zone].reduce((sum, layer) => sum + layer.count, 0)
  const planned = document.plans.front.length > 0 && document.plans.back.length > 0
  const fails = (step: BenchStep) => problem?.step === step
  const state = (step: BenchStep, done: boolean): StepState['state'] => (fails(step) || !done ? 'todo' : (worst(step) ?? 'done'))
  const last = versions[0]
  return [
    {
      id: 'body',
      name: 'Body',
      state: state('body', document.measuringId !== null),
      detail:
        document.measuringId === null
          ? 'no measuring chosen'
          : fails('body')
            ? 'measurements missing'
            : count('body') || `measured ${shortDate(facts.measuredOn)}`,
    },
    {
      id: 'cloth',
      name: 'Cloth',
      state: state('cloth', cloths > 0),
      detail: cloths === 0 ? 'none chosen' : fails('cloth') ? 'test missing' : count('cloth') || plural(cloths, 'cloth'),
    },
    {
      id: 'layers',
      name: 'Layers',
      state: state('layers', planned),
      detail: !planned
        ? 'no layers yet'
        : count('layers') ||
          (stack('front') === stack('back') ? plural(stack('front'), 'layer') : `${stack('front')} front, ${stack('back')} back`),
    },
    {
      id: 'draft',
      name: 'Draft',
      state: state('draft', solution !== null && problem === null),
      detail: problem
        ? 'cannot be drafted'
        : solution
          ? count('draft') || plural(allPieces(solution.draft).length, 'piece')
          : 'not drafted',
    },
    {
      id: 'cut',
      name: 'Cut',
      state: last?.cleared ? 'done' : 'todo',
      detail: last ? `${last.number}, ${last.cleared ? 'cleared' : 'not cleared'}` : 'no version yet',
    },
    { id: 'fit', name: 'Fit', state: 'todo', detail: 'fittings, recut' },
  ]
}

/** `12 Nov`, without a year when it is this one. */
export function shortDate(iso: string | null): string {
  if (!iso) return 'on no date'
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' }).format(new Date(iso))
}
