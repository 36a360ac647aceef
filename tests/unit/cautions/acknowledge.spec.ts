import { describe, expect, it } from 'vitest'
import { acknowledgementOf, cautionKey } from '../../../shared/domain/cautions/acknowledge'
import { cautions } from '../../../shared/domain/cautions/registry'
import { applyCommand } from '../../../shared/domain/document/commands'
import { freshDocument } from '../../../shared/domain/document/fresh'

const hard = (pull: number) => cautions.hardToPullOn({ kind: 'ring', level: 'waist' }, { ring: 'Waist', pull, limit: 100 })
const acknowledged = { key: cautionKey(hard(120)), reason: 'The dresser is strong.', by: 'Dario', on: '2026-11-20' }

describe('acknowledging a caution', () => {
  it('stands with its reason for the caution as it was, and lapses when a figure changes or the place does', () => {
    const { document } = applyCommand(freshDocument(), { kind: 'acknowledge', acknowledged })
    expect(acknowledgementOf(hard(120), document.acknowledged)).toEqual(acknowledged)
    expect(acknowledgementOf(hard(150), document.acknowledged)).toBeNull()
    const elsewhere = cautions.hardToPullOn({ kind: 'ring', level: 'bust' }, { ring: 'Waist', pull: 120, limit: 100 })
    expect(acknowledgementOf(elsewhere, document.acknowledged)).toBeNull()
    const back = applyCommand(document, { kind: 'withdraw-acknowledgement', key: acknowledged.key }).document
    expect(acknowledgementOf(hard(120), back.acknowledged)).toBeNull()
  })

  it('is for cautions only: a stop is cleared with the version, by the owner', () => {
    const stop = cautions.noDresser({ kind: 'garment' }, {})
    expect(acknowledgementOf(stop, [{ ...acknowledged, key: cautionKey(stop) }])).toBeNull()
  })

  it('keeps none of the words, which may speak of the wearer', () => {
    expect(cautionKey(hard(120))).toMatch(/^hard-to-pull-on [0-9a-f]+$/)
  })
})
