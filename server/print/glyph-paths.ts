import type { TextWeight } from '../../shared/domain/output/text-width'
import { fontRuns, type PrintFont } from './fonts'

/** A text as outlines: SVG path data in millimetres, y down, from its start on the baseline; and its width. */
export interface TextOutline {
  readonly path: string
  readonly width: number
}

const short = (value: number) => String(Math.round(value * 1000) / 1000)

/** Sets a text in the fonts of the print, so that it looks the same where they are not installed. `size` mm. */
export function textOutline(text: string, size: number, weight: TextWeight, fonts: readonly PrintFont[]): TextOutline {
  let x = 0
  const parts: string[] = []
  for (const { font, text: run } of fontRuns(text, weight, fonts)) {
    const scale = size / font.font.unitsPerEm
    const { glyphs, positions } = font.font.layout(run)
    glyphs.forEach((glyph, index) => {
      const at = positions[index]!
      for (const { command, args } of glyph.path.commands) {
        const points: string[] = []
        for (let i = 0; i < args.length; i += 2)
          points.push(`${short(x + (at.xOffset + args[i]!) * scale)} ${short(-(at.yOffset + args[i + 1]!) * scale)}`)
        parts.push(`${LETTERS[command] ?? ''}${points.join(' ')}`)
      }
      x += at.xAdvance * scale
    })
  }
  return { path: parts.join(''), width: x }
}

const LETTERS: Readonly<Record<string, string>> = {
  moveTo: 'M',
  lineTo: 'L',
  quadraticCurveTo: 'Q',
  bezierCurveTo: 'C',
  closePath: 'Z',
}
