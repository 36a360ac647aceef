import { defineEventHandler, getRequestHeader, getRequestHost } from 'h3'
import { problemAnswer } from '../utils/problem'

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])

/** A request that changes something must come from our own pages, or say whence it comes. */
export default defineEventHandler((event) => {
  if (SAFE.has(event.method)) return
  const site = getRequestHeader(event, 'sec-fetch-site')
  const origin = getRequestHeader(event, 'origin')
  const own = origin !== undefined && URL.canParse(origin) && new URL(origin).host === getRequestHost(event)
  if (site === undefined ? own : site === 'same-origin' && (origin === undefined || own)) return
  return problemAnswer(event, 'wrong-origin')
})
