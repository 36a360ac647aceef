import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { applyCommand, invertDiff, replayDiff, roleWords, type Command } from '../../../shared/domain/document/commands'
import { freshDocument } from '../../../shared/domain/document/fresh'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import type { PointRole } from '../../../shared/domain/draft/types'
import { mm, pascal } from '../../../shared/domain/units/brand'

const role: fc.Arbitrary<PointRole> = fc.record(
  {
    piece: fc.constantFrom('front-centre', 'side-front', 'side-back', 'back-centre'),
    edge: fc.constantFrom('princess', 'side', 'armhole'),
    node: fc.constantFrom('bust', 'waist', 'across'),
    handle: fc.constantFrom('before', 'after'),
  },
  { requiredKeys: ['piece', 'edge', 'node'] },
)
const shift = fc.double({ min: -30, max: 30, noNaN: true }).map(mm)
const id = fc.constantFrom('a', 'b', 'c', 'd', 'e')

const command: fc.Arbitrary<Command> = fc.oneof(
  fc.record({ kind: fc.constant('move-point' as const), role, dx: shift, dy: shift, carry: fc.boolean(), id: fc.uuid() }),
  fc.record({ kind: fc.constant('set-move' as const), role, dx: shift, dy: shift, carry: fc.boolean(), id: fc.uuid() }),
  fc.record({
    kind: fc.constant('set-level' as const),
    level: fc.constantFrom('bust' as const, 'waist' as const, 'all' as const),
    patch: fc.record({ hold: fc.integer({ min: 0, max: 4000 }).map(pascal) }),
  }),
  fc.record({ kind: fc.constant('set-style' as const), patch: fc.record({ princessAt: fc.double({ min: 0.2, max: 0.8, noNaN: true }) }) }),
  fc.record({ kind: fc.constant('remove-alteration' as const), id }),
  fc.record({ kind: fc.constant('order-alteration' as const), id, to: fc.integer({ min: -1, max: 9 }) }),
  fc.record({ kind: fc.constant('choose-measuring' as const), measuringId: fc.option(fc.uuid()) }),
)

const played = (commands: readonly Command[]) => {
  const states: GarmentDocument[] = [freshDocument()]
  const diffs = commands.map((one) => {
    const { document, diff } = applyCommand(states.at(-1)!, one)
    states.push(document)
    return diff
  })
  return { states, diffs }
}

describe('commands', () => {
  it('are undone step by step by the inverse differences, and redone', () => {
    fc.assert(
      fc.property(fc.array(command, { maxLength: 20 }), (commands) => {
        const { states, diffs } = played(commands)
        let document = states.at(-1)!
        for (let step = diffs.length - 1; step >= 0; step--) {
          document = replayDiff(document, invertDiff(diffs[step]!))
          expect(document).toEqual(states[step])
        }
        for (const diff of diffs) document = replayDiff(document, diff)
        expect(document).toEqual(states.at(-1))
      }),
      { numRuns: 200 },
    )
  })

  it('add up the moves of one point and keep other points apart', () => {
    const role: PointRole = { piece: 'side-front', edge: 'princess', node: 'bust' }
    let document = freshDocument()
    document = applyCommand(document, { kind: 'move-point', role, dx: mm(4), dy: mm(0), carry: false, id: 'a' }).document
    document = applyCommand(document, { kind: 'move-point', role, dx: mm(-1.5), dy: mm(2), carry: false, id: 'b' }).document
    document = applyCommand(document, {
      kind: 'move-point',
      role: { ...role, node: 'waist' },
      dx: mm(3),
      dy: mm(0),
      carry: false,
      id: 'c',
    }).document
    expect(document.alterations).toMatchObject([
      { id: 'a', dx: 2.5, dy: 2, role },
      { id: 'c', dx: 3, dy: 0 },
    ])
    document = applyCommand(document, { kind: 'set-move', role, dx: mm(0), dy: mm(0), carry: false, id: 'd' }).document
    expect(document.alterations.map((one) => one.id)).toEqual(['c'])
  })

  it('leave the document they are given untouched', () => {
    const document = Object.freeze(freshDocument())
    const before = JSON.stringify(document)
    applyCommand(document, { kind: 'set-level', level: 'all', patch: { hold: pascal(1200) } })
    expect(JSON.stringify(document)).toBe(before)
  })

  it('name a point in the words of the trade', () => {
    expect(roleWords({ piece: 'side-front', edge: 'princess', node: 'bust' })).toBe('side front, princess seam at bust')
    expect(roleWords({ piece: 'back-centre', edge: 'hem', node: 'side', handle: 'before' })).toBe('back centre, hem at side, curve before')
  })
})
