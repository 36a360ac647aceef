import { mountSuspended } from '@nuxt/test-utils/runtime'
import axe from 'axe-core'
import { afterEach, describe, expect, it } from 'vitest'
import GirthRings from '~/components/rings/GirthRings.vue'
import RingStrip from '~/components/rings/RingStrip.vue'
import { cautions, rings } from '../../unit/board/rings-fixture'

/** happy-dom lays nothing out: colours are looked at in the browser tests. */
const RULES = { rules: { 'color-contrast': { enabled: false }, region: { enabled: false } } }
const findings = async (element: Element) => (await axe.run(element, RULES)).violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)
const mounted: { unmount: () => void }[] = []
afterEach(() => mounted.splice(0).forEach((each) => each.unmount()))

async function show(props: Record<string, unknown> = {}) {
  const wrapper = await mountSuspended(GirthRings, {
    props: { rings, cautions, unit: 'cm', active: null, ...props },
    attachTo: document.body,
  })
  mounted.push(wrapper)
  return wrapper
}

describe('girth rings', () => {
  it('are a table of levels with word, figure and mark', async () => {
    const wrapper = await show()
    expect(wrapper.find('[role="table"]').attributes('aria-label')).toBe('Girth rings')
    expect(wrapper.findAll('[role="rowheader"]').map((header) => header.text())).toEqual(['Bust', 'Underbust', 'Waist', 'High hip', 'Hip'])
    const waist = wrapper.find('[data-level="waist"]')
    expect(waist.text()).toContain('strong')
    expect(waist.text()).toContain('2.40')
    expect(waist.text()).toContain('18 mmHg')
    expect(waist.find('.hold svg path').exists()).toBe(true)
    const cells = (row: { findAll: (selector: string) => unknown[] }) => row.findAll('[role="cell"], [role="rowheader"]').length
    const headers = wrapper.findAll('[role="columnheader"]').length
    expect(wrapper.findAll('[data-level]').map(cells)).toEqual(rings.map(() => headers))
    expect(await findings(wrapper.element)).toEqual([])
  })

  it('open a working from every figure and a level from its name', async () => {
    const wrapper = await show({ active: 'waist' })
    const row = wrapper.find('[data-level="waist"]')
    for (const button of row.findAll('button')) await button.trigger('click')
    const asked = wrapper.emitted('explain')!.map(([level, figure]) => `${level} ${figure}`)
    for (const figure of ['pressure', 'gap', 'negativeEase', 'governs', 'breath', 'side', 'hold', 'tension', 'strain', 'cut', 'k'])
      expect(asked).toContain(`waist ${figure}`)
    expect(wrapper.emitted('activate')).toEqual([['waist']])
    expect(await findings(wrapper.element)).toEqual([])
  })

  it('stand cautions at their ring, the worst first, and what to do when it is open', async () => {
    const stop = { ...cautions[0]!, code: 'invented-stop', severity: 'stop' as const, message: 'The waist presses too hard.' }
    const wrapper = await show({ cautions: [...cautions, stop], active: 'waist' })
    const found = wrapper.findAll('[data-level="waist"] li').map((item) => item.text())
    expect(found).toHaveLength(2)
    expect(found[0]).toContain('The waist presses too hard.')
    expect(found[1]).toContain('Ask for less hold, or take a layer out.')
    expect(wrapper.find('[data-level="bust"] li').exists()).toBe(false)
  })

  it('show the hold of assumed cloth as a range and ask for a strip', async () => {
    const assumed = rings.map((ring) => ({ ...ring, assumed: ring.level === 'bust' }))
    const wrapper = await show({ rings: assumed, lowHoldFrom: { bust: 210 } })
    const bust = wrapper.find('[data-level="bust"]').text()
    expect(bust).toMatch(/0\.21 to\s*1\.05/)
    expect(bust).toContain('Hold unknown, pull a strip')
  })

  it('say what is missing when there are none', async () => {
    const wrapper = await show({ rings: [] })
    expect(wrapper.find('[role="table"]').exists()).toBe(false)
    expect(wrapper.text()).toContain('Choose a measuring and a layer plan')
  })

  it('fold to a strip of one button a level', async () => {
    const wrapper = await mountSuspended(RingStrip, { props: { rings, cautions, unit: 'cm', active: 'waist' }, attachTo: document.body })
    mounted.push(wrapper)
    const waist = wrapper.find('button[aria-pressed="true"]')
    expect(waist.attributes('aria-label')).toBe('Waist: strong, 2.40 kPa (18.0 mmHg), with a caution')
    await waist.trigger('click')
    expect(wrapper.emitted('activate')).toEqual([['waist']])
    expect(wrapper.emitted('open')).toHaveLength(1)
    expect(await findings(wrapper.element)).toEqual([])
  })
})
