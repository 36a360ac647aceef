import { mountSuspended } from '@nuxt/test-utils/runtime'
import { expect, it } from 'vitest'
import { useChecked } from '../../../composables/useChecked'

it('holds what is typed against the schema of the route, each time anew, with messages by the field', async () => {
  let check!: ReturnType<typeof useChecked<'clients.create'>>
  await mountSuspended({
    setup() {
      check = useChecked('clients.create')
      return () => null
    },
  })
  const typed = { name: '', email: 'not an address', phone: null, note: null }
  const refusal = await check(typed)
  expect(refusal?.status).toBe(422)
  expect(Object.keys(refusal!.fields).sort()).toEqual(['email', 'name'])
  const sound = { ...typed, name: 'Corvin Aldermoor', email: '' }
  expect(await check(sound)).toBeNull()
  expect(await check(sound)).toBeNull()
  expect((await check(typed))?.fields.name).toBe(refusal!.fields.name)
})
