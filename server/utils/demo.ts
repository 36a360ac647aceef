import { DEMO_ACCOUNTS } from '../../shared/demo'
import type { Me } from '../../shared/schemas/session'

/** What the sign-in page of a demo may show: nothing unless the server was started as one. */
export function demoFacts(): Pick<Me, 'demo' | 'demoSignIns'> {
  const demo = String(useRuntimeConfig().demo) === '1'
  return {
    demo,
    demoSignIns: demo ? DEMO_ACCOUNTS.map(({ email, password, role, workroom }) => ({ email, password, role, workroom })) : [],
  }
}
