import { describe, expect, it } from 'vitest'
import type { MeasuredValues } from '../../../shared/domain/body/types'
import { applyCommand, invertDiff, replayDiff, type Command, type DocumentDiff } from '../../../shared/domain/document/commands'
import { PLAN_PRESETS, plansOfPreset } from '../../../shared/domain/document/presets'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import { applyAlterations } from '../../../shared/domain/draft/alterations'
import type { Alteration, BodiceStyle, Draft, DraftPiece, HalfPanels, PointRole } from '../../../shared/domain/draft/types'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { mm, pascal } from '../../../shared/domain/units/brand'
import { seeded } from '../../fixtures/bodies'
import { inventedDocument, inventedInput, MEASURED } from '../../fixtures/garment-inputs'

const SEQUENCES = 500
const STEPS = 6

type Random = () => number
const between = (random: Random, low: number, high: number) => low + (high - low) * random()
const pick = <T>(random: Random, from: readonly T[]): T => from[Math.floor(random() * from.length)]!

/** Bodies near the invented one, some of them odd. */
function bodyFor(random: Random): MeasuredValues {
  return Object.fromEntries(
    Object.entries(MEASURED).map(([key, measured]) => [key, { value: measured!.value * between(random, 0.94, 1.06) }]),
  ) as MeasuredValues
}

function panelsFor(random: Random): HalfPanels {
  if (random() < 0.15) return { princess: false, further: [] }
  const count = Math.floor(random() * 3)
  return {
    princess: true,
    further: (['a', 'b'] as const).slice(0, count).map((id) => ({ id, beside: 'side', at: null, end: null, share: 0.12, letOut: null })),
  }
}

/** A change of style: most can be drafted, some cannot. */
function styleFor(random: Random): Partial<BodiceStyle> {
  return pick<() => Partial<BodiceStyle>>(random, [
    () => ({ panels: { front: panelsFor(random), back: panelsFor(random) } }),
    () => ({ centreFront: pick(random, ['fold', 'seam', 'zip', 'busk'] as const) }),
    () => ({ hem: { level: pick(random, ['waist', 'high-hip', 'hip'] as const), below: mm(between(random, -20, 40)) } }),
    () => ({ hemShape: { form: 'pointed', front: mm(between(random, 0, 60)), back: mm(0), side: mm(0), curve: 0.4 } }),
    () => ({ necklineFrontDepth: mm(between(random, 0, 260)) }),
    () => ({ neckline: { front: pick(random, ['round', 'square', 'v'] as const), back: 'round' } }),
    () => ({
      princessEnd: { front: { edge: pick(random, ['shoulder', 'armhole'] as const), at: 0.5 }, back: { edge: 'shoulder', at: 0.5 } },
    }),
    () => ({ frontShares: { centre: 0, princess: between(random, 0.3, 0.8), side: 0.4 } }),
    () => ({ bustAngle: random() < 0.5 ? null : between(random, 0, 50) }),
  ])()
}

/** A role of the draft as it stands, or one that it may not have. */
function roleFor(random: Random, pieces: readonly DraftPiece[]): PointRole {
  if (random() < 0.1) return { piece: 'side-front-b', edge: 'seam-b', node: 'waist' }
  const piece = pick(random, pieces)
  const edge = pick(random, piece.edges)
  const index = Math.floor(random() * edge.nodes.length)
  const handle = random() < 0.25 && edge.path[index]?.kind === 'cubic' ? { handle: 'after' as const } : {}
  return { piece: piece.id, edge: edge.id, node: edge.nodes[index]!.name, ...handle }
}

function alterationFor(random: Random, pieces: readonly DraftPiece[], id: string): Alteration {
  const kind = random()
  const named = { id, name: `Alteration ${id}`, on: true }
  if (kind < 0.6)
    return {
      ...named,
      kind: 'move',
      role: roleFor(random, pieces),
      dx: mm(between(random, -8, 8)),
      dy: mm(between(random, -8, 8)),
      carry: random() < 0.6,
    }
  if (kind < 0.85) {
    const seams = pieces.flatMap((piece) =>
      piece.edges.filter((edge) => edge.mate !== null && edge.kind === 'seam').map((edge) => ({ piece: piece.id, edge: edge.id })),
    )
    return {
      ...named,
      kind: 'girth',
      level: pick(random, ['underbust', 'waist', 'high-hip']),
      amount: mm(between(random, -15, 20)),
      seams: [pick(random, seams)],
    }
  }
  return { ...named, kind: 'length', below: pick(random, ['bust', 'underbust', 'waist']), by: mm(between(random, -15, 25)) }
}

const edgesOf = (draft: Draft) => new Map(draft.pieces.map((piece) => [piece.id as string, piece.edges]))
const has = (draft: Draft, { piece, edge, node, handle }: PointRole) => {
  const own = draft.pieces.find(({ id }) => id === piece)?.edges.find(({ id }) => id === edge)
  const index = own?.nodes.findIndex(({ name }) => name === node) ?? -1
  return index >= 0 && (handle === undefined || own!.path[handle === 'before' ? index - 1 : index]?.kind === 'cubic')
}

describe('random changes of style, panels, body, plan and alterations', () => {
  it(`lose nothing, move nothing to a neighbour, and draft or say why, in ${SEQUENCES} sequences`, { timeout: 120_000 }, () => {
    const random = seeded(20_261_201)
    const told: Record<string, number> = {}
    const states: Record<string, number> = {}
    const start = inventedDocument()
    const first = solveGarment(inventedInput())
    if (!first.ok) throw new Error(first.problem.message)

    for (let sequence = 0; sequence < SEQUENCES; sequence++) {
      let document: GarmentDocument = start
      let measured: MeasuredValues = MEASURED
      let pieces = first.value.draft.pieces
      const done: DocumentDiff[] = []
      /** What must be listed, in this order. */
      let expected: readonly string[] = []
      for (let step = 0; step < STEPS; step++) {
        const id = `${sequence}-${step}`
        const choice = random()
        let command: Command | null = null
        if (choice < 0.4) {
          command = { kind: 'add-alterations', alterations: [alterationFor(random, pieces, id)], label: id }
          expected = [...expected, id]
        } else if (choice < 0.65) command = { kind: 'set-style', patch: styleFor(random) }
        else if (choice < 0.75) measured = bodyFor(random)
        else if (choice < 0.82) {
          const tried = { clothId: 'net', direction: 'crosswise' as const }
          command = { kind: 'set-plans', plans: plansOfPreset(pick(random, PLAN_PRESETS), document.plans, tried, id), label: 'plan' }
        } else if (choice < 0.88) command = { kind: 'set-level', level: 'waist', patch: { hold: pascal(between(random, 300, 2500)) } }
        else if (expected.length > 0 && choice < 0.94) {
          command = { kind: 'change-alteration', id: pick(random, expected), patch: { on: random() < 0.5, carry: random() < 0.5 } }
        } else if (expected.length > 1) {
          const moved = pick(random, expected)
          const to = Math.floor(random() * expected.length)
          command = { kind: 'order-alteration', id: moved, to }
          const rest = expected.filter((one) => one !== moved)
          expected = [...rest.slice(0, to), moved, ...rest.slice(to)]
        }
        if (command) {
          const next = applyCommand(document, command)
          document = next.document
          done.push(next.diff)
        }

        expect(document.alterations.map((one) => one.id)).toEqual(expected)
        const solved = solveGarment(inventedInput({ document, measured }))
        if (!solved.ok) {
          told[solved.problem.code] = (told[solved.problem.code] ?? 0) + 1
          expect(solved.problem.message.length).toBeGreaterThan(10)
          expect(solved.problem.todo?.length ?? 0).toBeGreaterThan(5)
          continue
        }
        pieces = solved.value.draft.pieces
        const plain = solveGarment(inventedInput({ document: { ...document, alterations: [] }, measured }))
        if (!plain.ok) throw new Error(plain.problem.message)
        const { draft, effects } = applyAlterations(plain.value.draft, document.alterations)
        expect(draft.pieces.map((piece) => piece.id)).toEqual(pieces.map((piece) => piece.id))
        expect(effects.map((effect) => effect.id)).toEqual(expected)

        const touched = new Set<string>()
        let stretched = false
        document.alterations.forEach((alteration, index) => {
          const { state, moved } = effects[index]!
          states[state] = (states[state] ?? 0) + 1
          if (!alteration.on) expect(state).toBe('off')
          else if (alteration.kind === 'move') {
            expect(state === 'parked').toBe(!has(plain.value.draft, alteration.role))
            if (state !== 'applied') return
            expect(moved[0]).toEqual(alteration.role)
            const edge = plain.value.draft.pieces
              .find((piece) => piece.id === alteration.role.piece)!
              .edges.find((one) => one.id === alteration.role.edge)!
            if (moved[1]) {
              expect({ piece: moved[1].piece, edge: moved[1].edge }).toEqual(edge.mate)
              expect(moved[1].node).toBe(alteration.role.node)
            }
            moved.forEach((role) => touched.add(role.piece))
          } else if (alteration.kind === 'girth' && state === 'applied') {
            const [seam] = alteration.seams
            for (const role of moved) {
              touched.add(role.piece)
              const edge = plain.value.draft.pieces.find((piece) => piece.id === seam!.piece)!.edges.find((one) => one.id === seam!.edge)!
              expect([seam, edge.mate].some((own) => own?.piece === role.piece && own.edge === role.edge)).toBe(true)
            }
          } else if (alteration.kind === 'length' && state === 'applied') stretched = true
        })
        if (!stretched) {
          const before = edgesOf(plain.value.draft)
          for (const [piece, edges] of edgesOf(draft)) {
            if (touched.has(piece)) continue
            expect(edges.map(({ nodes, path }) => ({ nodes, path }))).toEqual(
              before.get(piece)!.map(({ nodes, path }) => ({ nodes, path })),
            )
          }
        }
      }
      const back = done.reduceRight((now, diff) => replayDiff(now, invertDiff(diff)), document)
      expect({ ...back, alteredIn: undefined }).toEqual({ ...start, alteredIn: undefined })
    }
    console.log(
      `${SEQUENCES} sequences of ${STEPS}: alterations ${JSON.stringify(states)}; not drafted and said why ${JSON.stringify(told)}`,
    )
    for (const state of ['applied', 'parked', 'off']) expect(states[state]).toBeGreaterThan(0)
  })
})
