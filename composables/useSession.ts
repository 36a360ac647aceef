import type { Me, Role } from '#shared/schemas/session'

const nobody: Me = { account: null, role: null, workroom: null, unit: 'cm', demo: false, demoSignIns: [] }

/** Who is signed in, their role and workroom. Loaded once by the middleware and kept until sign-out. */
export function useSession() {
  const me = useState<Me | null>('session', () => null)
  const request = useRequestFetch()

  async function load(again = false): Promise<Me> {
    if (!me.value || again) me.value = await request<Me>('/api/session')
    return me.value
  }

  async function leave(everywhere: boolean) {
    await $fetch(everywhere ? '/api/sessions' : '/api/session', { method: 'DELETE' })
    wipeUnsent()
    me.value = nobody
    await navigateTo('/sign-in')
  }

  const role = computed<Role | null>(() => me.value?.role ?? null)
  return {
    me,
    role,
    load,
    leave,
    zone: computed(() => me.value?.workroom?.zone ?? 'UTC'),
    /** Owner and drafter change clients, bodies, cloths and garments; makers read cloths and add tests. */
    drafts: computed(() => role.value === 'owner' || role.value === 'drafter'),
  }
}

const UNSENT = 'tenterframe:unsent:'

/** Where a form keeps what was typed until it is saved, by account. */
export const unsentKey = (account: string, form: string) => `${UNSENT}${account}:${form}`

function wipeUnsent() {
  for (const key of Object.keys(localStorage)) if (key.startsWith(UNSENT)) localStorage.removeItem(key)
}
