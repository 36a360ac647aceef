import type { Role } from './schemas/session'

/** Sign-ins of the demo. They exist only on a database that the start script made itself. People and houses are invented. */
export const DEMO_ACCOUNTS: readonly {
  readonly email: string
  readonly password: string
  readonly name: string
  readonly role: Role
  readonly workroom: string
}[] = [
  {
    email: 'owner@lakestage.example',
    password: 'reed-and-rosin-1',
    name: 'Orla Winterfeld',
    role: 'owner',
    workroom: 'Lake Stage Costume Room',
  },
  {
    email: 'drafter@lakestage.example',
    password: 'reed-and-rosin-2',
    name: 'Dario Anselm',
    role: 'drafter',
    workroom: 'Lake Stage Costume Room',
  },
  {
    email: 'maker@lakestage.example',
    password: 'reed-and-rosin-3',
    name: 'Mirela Quist',
    role: 'maker',
    workroom: 'Lake Stage Costume Room',
  },
  {
    email: 'owner@northquay.example',
    password: 'quay-and-quill-1',
    name: 'Nils Haverbrook',
    role: 'owner',
    workroom: 'North Quay Sewing Loft',
  },
]

export const DEMO_ZONE = 'Europe/Vienna'
