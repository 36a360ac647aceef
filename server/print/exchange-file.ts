import { setResponseHeaders, type H3Event } from 'h3'
import sharp from 'sharp'
import type { PrintedLines } from '../../shared/domain/output/print-words'
import type { LengthUnit } from '../../shared/schemas/session'
import { patternOfVersion } from '../services/print'
import type { Room } from '../services/room'
import { loadPrintFonts } from './fonts'
import { patternDxf } from './pattern-dxf'
import { patternSvg } from './pattern-svg'

export type ExchangeKind = 'svg' | 'dxf' | 'png'

const MEDIA: Readonly<Record<ExchangeKind, string>> = { svg: 'image/svg+xml', dxf: 'image/vnd.dxf', png: 'image/png' }
/** A preview: dots in an inch, and the most pixels it may take. */
const PREVIEW_DPI = 50
const MOST_PIXELS = 40_000_000

/** A version's pieces for another program, as a file that the browser keeps. */
export async function exchangeFile(event: H3Event, kind: ExchangeKind, room: Room, id: string, lines: PrintedLines, unit: LengthUnit) {
  const { pieces, facts, drawing, title } = await patternOfVersion(room, id, lines, unit)
  const file = `${title.replace(/[^\w.-]+/g, '-')}.${kind}`
  setResponseHeaders(event, {
    'content-type': MEDIA[kind],
    'content-disposition': `${kind === 'png' ? 'inline' : 'attachment'}; filename="${file}"`,
  })
  if (kind === 'dxf') return patternDxf(pieces, facts)
  const svg = patternSvg(drawing, title, await loadPrintFonts())
  if (kind === 'svg') return svg
  return sharp(Buffer.from(svg), { density: PREVIEW_DPI, limitInputPixels: MOST_PIXELS })
    .flatten({ background: '#ffffff' })
    .png()
    .toBuffer()
}
