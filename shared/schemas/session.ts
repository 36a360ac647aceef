import { z } from 'zod'
import { id, name } from './base'

export const roles = ['owner', 'drafter', 'maker'] as const
export type Role = (typeof roles)[number]
export const role = z.enum(roles)

export const lengthUnit = z.enum(['cm', 'in'])
export type LengthUnit = z.output<typeof lengthUnit>

export const signInBody = z.object({
  email: z.string({ required_error: 'Enter your e-mail address.' }).trim().toLowerCase().max(200).email('This is not an e-mail address.'),
  password: z.string({ required_error: 'Enter your password.' }).min(1, 'Enter your password.').max(200),
})
export const preferencesBody = z.object({ unit: lengthUnit })

/** A sign-in of the demo workroom, shown on the sign-in page of a demo alone. */
export const demoSignIn = z.object({ email: z.string(), password: z.string(), role, workroom: z.string() })

export const me = z.object({
  account: z.object({ id, name: z.string(), email: z.string() }).nullable(),
  role: role.nullable(),
  workroom: z.object({ id, name, zone: z.string() }).nullable(),
  unit: lengthUnit,
  demo: z.boolean(),
  demoSignIns: z.array(demoSignIn),
})
export type Me = z.output<typeof me>
