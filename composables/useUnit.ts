import type { LengthUnit } from '#shared/schemas/session'

/** The person's unit of length, kept with the account. */
export function useUnit() {
  const { me } = useSession()
  const unit = computed<LengthUnit>(() => me.value?.unit ?? 'cm')

  async function choose(next: LengthUnit) {
    if (!me.value || next === unit.value) return
    const before = me.value
    me.value = { ...before, unit: next }
    try {
      await $fetch('/api/session/preferences', { method: 'PUT', body: { unit: next } })
    } catch (error) {
      me.value = before
      throw error
    }
  }
  return { unit, choose }
}
