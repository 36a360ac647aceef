/** Keeps what is being typed in a form on this device, by account, until it is saved or dropped; wiped at sign-out. */
export function useKept<T extends object>(form: string, fresh: () => T) {
  const { me } = useSession()
  const key = computed(() => unsentKey(me.value?.account?.id ?? 'nobody', form))
  const state = ref(fresh()) as Ref<T>
  const brought = ref(false)
  const ready = ref(false)

  onMounted(() => {
    const kept = localStorage.getItem(key.value)
    if (kept) {
      try {
        state.value = { ...fresh(), ...(JSON.parse(kept) as T) }
        brought.value = true
      } catch {
        localStorage.removeItem(key.value)
      }
    }
    ready.value = true
  })
  watch(
    state,
    (now) => {
      if (ready.value) localStorage.setItem(key.value, JSON.stringify(now))
    },
    { deep: true },
  )

  /** Forgets what was kept, after it has been saved or dropped on purpose. */
  async function forget(next: T = fresh()) {
    state.value = next
    await nextTick()
    localStorage.removeItem(key.value)
    brought.value = false
  }
  return { state, brought, forget }
}
