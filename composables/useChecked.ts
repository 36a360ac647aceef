import { toTypedSchema } from '@vee-validate/zod'
import { useForm } from 'vee-validate'
import { routes, type RouteBody, type RouteId } from '#shared/schemas/routes'

/**
 * Holds what is typed against the schema of the route that will take it, before it is sent: null when it can go, else the messages by
 * their fields, in the shape of the server's own refusal.
 */
export function useChecked<K extends RouteId>(route: K) {
  const { body } = routes[route] as { readonly body?: Parameters<typeof toTypedSchema>[0] }
  if (!body) throw new Error(`${route} takes no body`)
  const form = useForm({ validationSchema: toTypedSchema(body) })
  return async (typed: RouteBody<K>): Promise<Refusal | null> => {
    form.setValues(typed as object, false)
    const { valid, errors } = await form.validate()
    if (valid) return null
    return { offline: false, status: 422, problem: null, message: 'Look at the marked fields.', fields: errors as Record<string, string> }
  }
}
