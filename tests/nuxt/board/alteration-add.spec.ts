import { mountSuspended } from '@nuxt/test-utils/runtime'
import { afterEach, describe, expect, it } from 'vitest'
import AlterationAdd from '~/components/board/AlterationAdd.vue'
import { draftBodice } from '#shared/domain/draft/bodice'
import { withPanelCount } from '#shared/domain/draft/panels'
import { allPieces } from '#shared/domain/draft/roles'
import { baseStyle } from '#shared/domain/draft/style'
import { mm } from '#shared/domain/units/brand'
import { bodyOf, valueOf, widthsOf } from '../../fixtures/draft-inputs'

const mounted: { unmount: () => void }[] = []
afterEach(() => mounted.splice(0).forEach((each) => each.unmount()))

describe('letting out and taking in where the halves differ', () => {
  it('offers each seam once, by the left half: the right one goes with it', async () => {
    const body = bodyOf()
    const base = { ...baseStyle(), centreFront: 'seam' as const, centreBack: 'lacing' as const, necklineBackDepth: mm(40) }
    const right = {
      panels: { front: withPanelCount(base.panels.front, 3), back: base.panels.back },
      princessAt: base.princessAt,
      princessEnd: base.princessEnd,
      backPrincessAt: 0.5,
      neckline: base.neckline,
      necklineWidth: mm(30),
    }
    const draft = valueOf(draftBodice({ body, style: { ...base, right }, widths: widthsOf(body, { front: 0.1, back: 0.1, gapBack: 50 }) }))
    const wrapper = await mountSuspended(AlterationAdd, { props: { draft: { ...draft, pieces: allPieces(draft) }, unit: 'cm' } })
    mounted.push(wrapper)
    await wrapper.findAll('button')[0]!.trigger('click')
    const offered = wrapper.findAll('fieldset label').map((label) => label.text())
    expect(offered).toContain('Side seam')
    expect(offered.filter((name) => /right/i.test(name))).toEqual([])
    expect(new Set(offered).size).toBe(offered.length)
  })
})
