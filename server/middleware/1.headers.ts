import { defineEventHandler, setResponseHeader } from 'h3'

/** What a signed-in person sees stays out of every cache; built files carry a hash and may be kept. */
export default defineEventHandler((event) => {
  if (!event.path.startsWith('/_nuxt/') && !event.path.startsWith('/mark.')) setResponseHeader(event, 'cache-control', 'no-store')
})
