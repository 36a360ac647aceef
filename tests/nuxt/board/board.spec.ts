import { mountSuspended } from '@nuxt/test-utils/runtime'
import axe from 'axe-core'
import { afterEach, describe, expect, it } from 'vitest'
import AlterationList from '~/components/board/AlterationList.vue'
import BoardList from '~/components/board/BoardList.vue'
import BoardStage from '~/components/board/BoardStage.vue'
import SeamTable from '~/components/board/SeamTable.vue'
import type { Alteration, PointRole } from '#shared/domain/draft/types'
import { mm } from '#shared/domain/units/brand'
import { drawnDraft } from '../../unit/board/draft-fixture'

const RULES = { rules: { 'color-contrast': { enabled: false }, region: { enabled: false } } }
const findings = async (element: Element) => (await axe.run(element, RULES)).violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)
const mounted: { unmount: () => void }[] = []
afterEach(() => mounted.splice(0).forEach((each) => each.unmount()))

const draft = drawnDraft()
const front: PointRole = { piece: 'side-front', edge: 'princess', node: 'n1' }
const back: PointRole = { piece: 'back-centre', edge: 'princess', node: 'n1' }
const alteration = (id: string, role: PointRole, on = true): Alteration => ({
  id,
  kind: 'move',
  name: `move ${id}`,
  role,
  dx: mm(4),
  dy: mm(-1.5),
  carry: false,
  on,
})

describe('list beside the board', () => {
  async function show(props: Record<string, unknown> = {}) {
    const wrapper = await mountSuspended(BoardList, { props: { draft, unit: 'cm', selection: front, ...props }, attachTo: document.body })
    mounted.push(wrapper)
    return wrapper
  }

  it('opens at the chosen point, with the length and the difference of its seam', async () => {
    const wrapper = await show({ alterations: [alteration('a', front)] })
    const chosen = wrapper.find('[data-chosen="true"]')
    expect(chosen.text()).toContain('n1')
    expect(chosen.text()).toContain('out 4.0 mm, down 1.5 mm')
    expect(wrapper.text()).toContain('off by 1.2 mm')
    expect(await findings(wrapper.element)).toEqual([])
  })

  it('nudges as the board shows it: right is in on a mirrored piece', async () => {
    const wrapper = await show()
    await wrapper.find('[data-chosen="true"]').trigger('keydown', { key: 'ArrowRight' })
    await wrapper.find('[data-chosen="true"]').trigger('keydown', { key: 'ArrowUp', shiftKey: true })
    await wrapper.setProps({ selection: back })
    await wrapper.find('[data-chosen="true"]').trigger('keydown', { key: 'ArrowRight' })
    expect(wrapper.emitted('nudge')).toEqual([
      [front, 0.5, 0],
      [front, 0, 5],
      [back, -0.5, 0],
    ])
  })

  it('chooses and lets go', async () => {
    const wrapper = await show()
    const points = wrapper.findAll('[data-chosen]')
    await points.find((point) => point.text() === 'n2')!.trigger('click')
    await wrapper.find('[data-chosen="true"]').trigger('keydown', { key: 'Escape' })
    expect(wrapper.emitted('select')).toEqual([[{ ...front, node: 'n2' }], [null]])
  })

  it('takes an exact move in the unit of the person and keeps what it cannot read', async () => {
    const wrapper = await show({ unit: 'in' })
    const [across, up] = wrapper.findAll('input')
    await across!.setValue('1/8')
    await wrapper.find('form').trigger('submit')
    await up!.setValue('a bit')
    await wrapper.find('form').trigger('submit')
    const [role, dx, dy] = wrapper.emitted('set')![0]!
    expect([role, dy]).toEqual([front, 0])
    expect(dx).toBeCloseTo(3.175, 9)
    expect(wrapper.emitted('set')).toHaveLength(1)
    expect((up!.element as HTMLInputElement).value).toBe('a bit')
    expect(wrapper.find('[role="alert"]').text()).toContain('is not a number')
    expect(up!.attributes('aria-invalid')).toBe('true')
  })

  it('moves nothing when it may only be read', async () => {
    const wrapper = await show({ readonly: true })
    await wrapper.find('[data-chosen="true"]').trigger('keydown', { key: 'ArrowRight' })
    expect(wrapper.emitted('nudge')).toBeUndefined()
    expect(wrapper.find('input').exists()).toBe(false)
  })
})

describe('seams and alterations', () => {
  it('says of every seam whether it is true, by how much it is off, and the lengths', async () => {
    const wrapper = await mountSuspended(SeamTable, {
      props: { seams: draft.seams, pieces: draft.pieces, unit: 'cm', selection: front },
      attachTo: document.body,
    })
    mounted.push(wrapper)
    const rows = wrapper.findAll('tbody tr').map((row) => row.findAll('td').map((cell) => cell.text()))
    expect(rows.map(([, state]) => state)).toEqual(['off by 1.2 mm', 'true', 'true'])
    expect(rows[0]![0]).toBe('52.4 cm52.5 cm')
    await wrapper.find('tbody button').trigger('click')
    expect(wrapper.emitted('choose')![0]).toEqual([draft.seams[0]])
    expect(await findings(wrapper.element)).toEqual([])
  })

  it('lists alterations, parked ones too, switches and removes them, and keeps the focus', async () => {
    const gone = alteration('gone', { ...front, node: 'gone' })
    const wrapper = await mountSuspended(AlterationList, {
      props: { alterations: [alteration('a', front), alteration('b', back, false)], parked: [gone], unit: 'cm' },
      attachTo: document.body,
    })
    mounted.push(wrapper)
    expect(wrapper.findAll('li').map((item) => item.text().includes('Parked'))).toEqual([false, false, true])
    expect(await findings(wrapper.element)).toEqual([])
    await wrapper.findAll('[role="switch"]')[1]!.trigger('click')
    expect(wrapper.emitted('toggle')).toEqual([['b', true]])
    await wrapper.findAll('[data-remove]')[0]!.trigger('click')
    await wrapper.setProps({ alterations: [alteration('b', back, false)] })
    expect(wrapper.emitted('remove')).toEqual([['a']])
    await new Promise((done) => setTimeout(done))
    expect(wrapper.element.contains(document.activeElement)).toBe(true)
  })
})

describe('board', () => {
  it('is one place to focus with its keys said, and zooms, moves and lets go by key', async () => {
    const wrapper = await mountSuspended(BoardStage, {
      props: { draft, unit: 'cm', selection: back, strains: { front: {}, back: {} } },
      attachTo: document.body,
    })
    mounted.push(wrapper)
    const board = wrapper.find('[aria-label="Board"]')
    expect(board.attributes('tabindex')).toBe('0')
    expect(wrapper.text()).toContain('Chosen: Back centre, princess, n1.')
    await board.trigger('keydown', { key: 'ArrowRight' })
    await board.trigger('keydown', { key: 'Escape' })
    expect(wrapper.emitted('move')).toEqual([[back, -0.5, 0]])
    expect(wrapper.emitted('select')).toEqual([[null]])
    expect(wrapper.findAll('[data-board-control] button').map((button) => button.attributes('aria-label'))).toEqual([
      'Zoom out',
      'Show all pieces',
      'Zoom in',
    ])
    expect(await findings(wrapper.element)).toEqual([])
  })
})
