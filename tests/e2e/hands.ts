import { expect, type Locator, type Page } from '@playwright/test'

/** Two ways of working: what a test does with a screen is said once and done by pointer, or by keyboard alone. */
export interface Hands {
  readonly name: 'pointer' | 'keyboard'
  readonly press: (target: Locator) => Promise<void>
  readonly write: (target: Locator, text: string) => Promise<void>
  /** Picks the entry of a list box that begins with these words. */
  readonly pick: (target: Locator, label: string) => Promise<void>
}

export function pointer(): Hands {
  return {
    name: 'pointer',
    press: (target) => target.click(),
    write: (target, text) => target.fill(text),
    pick: async (target, label) => {
      const value = await target.locator('option').filter({ hasText: label }).first().getAttribute('value')
      await target.selectOption(value)
    },
  }
}

const MOST_TABS = 200

/** Never touches the pointer: goes with Tab until the target has the focus, and asks that the focus can be seen there. */
export function keyboard(page: Page): Hands {
  async function reach(target: Locator): Promise<void> {
    await expect(target).toBeVisible()
    for (let tabs = 0; tabs < MOST_TABS; tabs++) {
      const there = await target.evaluate((element) => element === document.activeElement)
      if (there) {
        const seen = await target.evaluate((element) => {
          const { outlineStyle, outlineWidth, boxShadow } = getComputedStyle(element)
          return (outlineStyle !== 'none' && parseFloat(outlineWidth) > 0) || boxShadow !== 'none'
        })
        expect(seen, 'the focus can be seen').toBe(true)
        return
      }
      await page.keyboard.press('Tab')
    }
    throw new Error(`Tab does not reach ${String(target)}`)
  }
  return {
    name: 'keyboard',
    press: async (target) => {
      await reach(target)
      const isSwitch = await target.evaluate((element) => element.matches('input, [role=switch]'))
      await page.keyboard.press(isSwitch ? 'Space' : 'Enter')
    },
    write: async (target, text) => {
      await reach(target)
      if ((await target.getAttribute('type')) !== 'date') await page.keyboard.press('ControlOrMeta+a')
      await page.keyboard.type(text)
    },
    pick: async (target, label) => {
      await reach(target)
      await page.keyboard.type(label)
      await expect(target.locator('option:checked')).toContainText(label)
    },
  }
}
