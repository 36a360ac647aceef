import { allPieces } from '#shared/domain/draft/roles'
import { defineStore } from 'pinia'
import { unsentKey } from '~/composables/useSession'
import { applyCommand, invertDiff, replayDiff, type Command, type DocumentDiff } from '#shared/domain/document/commands'
import type { GarmentDocument } from '#shared/domain/document/types'
import type { PointRole } from '#shared/domain/draft/types'
import { solveGarment } from '#shared/domain/garment/solve'
import { garmentDocument } from '#shared/schemas/garments'
import type { GarmentInput, GarmentProblem, GarmentSolution } from '#shared/domain/garment/types'
import type { MeasuredValues, MeasurementKey } from '#shared/domain/body/types'
import { mm } from '#shared/domain/units/brand'

/** What the server holds of a working copy, as it was last read or saved. */
export interface HeldCopy {
  readonly revision: number
  readonly document: GarmentDocument
  readonly savedAt: string
  readonly savedBy: string | null
}

export interface BenchMeasuring {
  readonly id: string
  readonly measuredOn: string
  readonly values: MeasuredValues
}

/** What the bench needs besides the document. */
export interface BenchFacts {
  readonly garmentId: string
  readonly accountId: string
  readonly input: Omit<GarmentInput, 'document'>
  readonly measurings: readonly BenchMeasuring[]
}

export type SaveOutcome =
  | { readonly kind: 'saved'; readonly held: HeldCopy }
  | { readonly kind: 'conflict'; readonly theirs: HeldCopy }
  | { readonly kind: 'offline' }
export type SaveWorkingCopy = (base: number, document: GarmentDocument) => Promise<SaveOutcome>
export type SaveState = 'saved' | 'unsaved' | 'saving' | 'offline' | 'conflict'

const SAVE_AFTER = 700
const RETRY_AFTER = 5000
const keptUnder = (facts: BenchFacts) => unsentKey(facts.accountId, `bench:${facts.garmentId}`)

/** Document, history, selection, view and drag preview of the garment on the bench: five things, kept apart. */
export const useBench = defineStore('bench', () => {
  const facts = shallowRef<BenchFacts | null>(null)
  const held = shallowRef<HeldCopy | null>(null)
  /** The working copy: what is saved, undone and redone. */
  const kept = shallowRef<GarmentDocument | null>(null)
  /** What is tried before it is taken: a document beside the working copy, and measurements other than the measured ones. */
  const trial = shallowRef<{ readonly document: GarmentDocument; readonly measured: MeasuredValues } | null>(null)
  /** What the bench shows and edits: the trial while there is one. */
  const document = computed<GarmentDocument | null>(() => trial.value?.document ?? kept.value)
  const past = shallowRef<readonly DocumentDiff[]>([])
  const future = shallowRef<readonly DocumentDiff[]>([])
  const selection = shallowRef<PointRole | null>(null)
  const activeLevel = ref<string | null>(null)
  const carry = ref(true)
  const drag = shallowRef<{ readonly role: PointRole; readonly dx: number; readonly dy: number } | null>(null)
  const saveState = ref<SaveState>('saved')
  const theirs = shallowRef<HeldCopy | null>(null)
  const lastGood = shallowRef<GarmentSolution | null>(null)

  let saver: SaveWorkingCopy | null = null
  let timer: ReturnType<typeof setTimeout> | undefined
  let counter = 0

  function inputOf(shown: GarmentDocument | null, tried = trial.value?.measured): GarmentInput | null {
    if (!facts.value || !shown) return null
    const measuring = facts.value.measurings.find((one) => one.id === shown.measuringId)
    const measured = { ...measuring?.values, ...tried }
    return { ...facts.value.input, document: shown, measured, measuredOn: measuring?.measuredOn ?? null }
  }

  /** A move goes over to the mate where it is wished and there is one. */
  function carries(role: PointRole): boolean {
    const piece = lastGood.value && allPieces(lastGood.value.draft).find((one) => one.id === role.piece)
    return carry.value && Boolean(piece?.edges.find((edge) => edge.id === role.edge)?.mate)
  }

  const input = computed<GarmentInput | null>(() => inputOf(document.value))
  const outcome = computed(() => (input.value ? solveGarment(input.value) : null))
  /** The working copy as it stands, while something else is tried. */
  const present = computed<GarmentSolution | null>(() => {
    const standing = trial.value ? inputOf(kept.value, {}) : null
    const solved = standing ? solveGarment(standing) : null
    return solved?.ok ? solved.value : null
  })
  /** The garment while a point is being dragged: lengths, seams and rings follow live; the board draws the drag itself. */
  const dragged = computed<GarmentSolution | null>(() => {
    if (!document.value || !drag.value) return null
    const { role, dx, dy } = drag.value
    const moved = applyCommand(document.value, {
      kind: 'move-point',
      role,
      dx: mm(dx),
      dy: mm(dy),
      carry: carries(role),
      id: 'drag',
    }).document
    const solved = solveGarment(inputOf(moved)!)
    return solved.ok ? solved.value : null
  })
  const problem = computed<GarmentProblem | null>(() => (outcome.value && !outcome.value.ok ? outcome.value.problem : null))
  watch(
    outcome,
    (now) => {
      if (now?.ok) lastGood.value = now.value
    },
    { immediate: true, flush: 'sync' },
  )
  /** The garment as solved now, or as it last could be. */
  const resting = computed<GarmentSolution | null>(() => (outcome.value?.ok ? outcome.value.value : lastGood.value))
  const solution = computed<GarmentSolution | null>(() => dragged.value ?? resting.value)
  const isStale = computed(() => problem.value !== null && lastGood.value !== null)

  function open(next: BenchFacts, copy: HeldCopy, save: SaveWorkingCopy) {
    clearTimeout(timer)
    facts.value = next
    held.value = copy
    kept.value = copy.document
    trial.value = null
    past.value = []
    future.value = []
    selection.value = null
    drag.value = null
    theirs.value = null
    lastGood.value = null
    saveState.value = 'saved'
    saver = save
    recover()
  }

  /** Changes that a crash or a dropped connection kept from being sent. */
  function recover() {
    if (!import.meta.client || !facts.value || !held.value) return
    const stored = localStorage.getItem(keptUnder(facts.value))
    if (!stored) return
    const unsent = JSON.parse(stored) as { readonly base: number; readonly document: unknown }
    const read = garmentDocument.safeParse(unsent.document)
    if (!read.success) return
    kept.value = read.data
    if (unsent.base === held.value.revision) schedule()
    else {
      theirs.value = held.value
      saveState.value = 'conflict'
    }
  }

  function run(command: Command) {
    if (!document.value) return
    const { document: next, diff } = applyCommand(document.value, command)
    drag.value = null
    if (diff.changes.length === 0) return
    if (trial.value) {
      trial.value = { ...trial.value, document: next }
      return
    }
    kept.value = next
    past.value = [...past.value, diff]
    future.value = []
    schedule()
  }

  function undo() {
    const diff = past.value.at(-1)
    if (!diff || !kept.value || trial.value) return
    kept.value = replayDiff(kept.value, invertDiff(diff))
    past.value = past.value.slice(0, -1)
    future.value = [diff, ...future.value]
    schedule()
  }

  function redo() {
    const diff = future.value[0]
    if (!diff || !kept.value || trial.value) return
    kept.value = replayDiff(kept.value, diff)
    future.value = future.value.slice(1)
    past.value = [...past.value, diff]
    schedule()
  }

  const freshId = () => `alteration-${Date.now().toString(36)}-${(counter++).toString(36)}`
  const movePoint = (role: PointRole, dx: number, dy: number) =>
    run({ kind: 'move-point', role, dx: mm(dx), dy: mm(dy), carry: carries(role), id: freshId() })
  const setPoint = (role: PointRole, dx: number, dy: number) =>
    run({ kind: 'set-move', role, dx: mm(dx), dy: mm(dy), carry: carries(role), id: freshId() })

  function schedule(after = SAVE_AFTER) {
    if (saveState.value === 'conflict') return
    if (import.meta.client && facts.value && held.value) {
      localStorage.setItem(keptUnder(facts.value), JSON.stringify({ base: held.value.revision, document: kept.value }))
    }
    if (saveState.value !== 'saving') saveState.value = 'unsaved'
    clearTimeout(timer)
    timer = setTimeout(() => void save(), after)
  }

  /** Sends what is unsent. One at a time; what changes meanwhile is sent after it. */
  async function save(): Promise<boolean> {
    clearTimeout(timer)
    if (!saver || !held.value || !kept.value || saveState.value === 'saving' || saveState.value === 'conflict') return false
    if (kept.value === held.value.document) return true
    const sent = kept.value
    saveState.value = 'saving'
    const result = await saver(held.value.revision, sent)
    if (result.kind === 'saved') {
      held.value = { ...result.held, document: sent }
      if (kept.value === sent) {
        saveState.value = 'saved'
        if (facts.value) localStorage.removeItem(keptUnder(facts.value))
        return true
      }
      saveState.value = 'unsaved'
      schedule(0)
      return false
    }
    if (result.kind === 'conflict') {
      saveState.value = 'conflict'
      theirs.value = result.theirs
      return false
    }
    saveState.value = 'offline'
    timer = setTimeout(() => {
      saveState.value = 'unsaved'
      void save()
    }, RETRY_AFTER)
    return false
  }

  /** After a conflict: the other person's copy, dropping what was unsent here. */
  function takeTheirs() {
    if (!theirs.value) return
    held.value = theirs.value
    kept.value = theirs.value.document
    past.value = []
    future.value = []
    theirs.value = null
    saveState.value = 'saved'
    if (facts.value) localStorage.removeItem(keptUnder(facts.value))
  }

  /** Everything that is changed from here on is tried only, until it is taken or dropped. */
  function beginTrial() {
    if (kept.value && !trial.value) trial.value = { document: kept.value, measured: {} }
  }
  /** A girth other than the measured one, mm; null goes back to it. */
  function tryMeasurement(key: MeasurementKey, value: number | null) {
    if (!trial.value) return
    const { [key]: _before, ...others } = trial.value.measured
    trial.value = { ...trial.value, measured: value === null ? others : { ...others, [key]: { value } } }
  }
  function dropTrial() {
    trial.value = null
  }
  /** Takes what was tried into the working copy, as one step. A measurement that was tried is not: it has to be measured. */
  function takeTrial() {
    const tried = trial.value?.document
    trial.value = null
    if (tried) run({ kind: 'take-over', document: tried, label: 'what was tried' })
  }

  return {
    facts,
    held,
    document,
    kept,
    trial,
    present,
    beginTrial,
    tryMeasurement,
    dropTrial,
    takeTrial,
    past,
    future,
    selection,
    activeLevel,
    carry,
    drag,
    saveState,
    theirs,
    input,
    problem,
    solution,
    resting,
    isStale,
    open,
    run,
    undo,
    redo,
    movePoint,
    setPoint,
    save,
    takeTheirs,
  }
})
