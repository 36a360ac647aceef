/** Print fonts against fontkit, a general-purpose font reader, and against the WOFF files of @fontsource/inter. */
import { createRequire } from 'node:module'
import { readFileSync } from 'node:fs'
import { create } from 'fontkit'
import type { Font } from 'fontkit'
import { describe, expect, it } from 'vitest'
import { fontRuns, loadPrintFonts } from '../../server/print/fonts'
import { fontFromWoff } from '../../server/print/woff'
import { textWidth } from '../../shared/domain/output/text-width'

const fileOf = (file: string) => readFileSync(createRequire(import.meta.url).resolve(`@fontsource/inter/files/${file}`))

describe('print fonts', () => {
  it('unpack to the same glyphs and widths that fontkit reads from the WOFF file', () => {
    for (const file of ['inter-latin-400-normal.woff', 'inter-latin-ext-600-normal.woff']) {
      const packed = create(fileOf(file)) as Font
      const unpacked = create(fontFromWoff(fileOf(file))) as Font
      expect(unpacked.numGlyphs).toBe(packed.numGlyphs)
      for (const code of packed.characterSet) {
        expect(unpacked.glyphForCodePoint(code).advanceWidth).toBe(packed.glyphForCodePoint(code).advanceWidth)
        expect(unpacked.glyphForCodePoint(code).path.toSVG()).toBe(packed.glyphForCodePoint(code).path.toSVG())
      }
    }
    expect(() => fontFromWoff(Buffer.alloc(64))).toThrow('not a WOFF file')
  })

  it('lay out plain words within 3 % of the widths that pages are set by', () => {
    for (const [weight, file] of [
      ['regular', 'inter-latin-400-normal.woff'],
      ['semibold', 'inter-latin-600-normal.woff'],
    ] as const) {
      const font = create(fileOf(file)) as Font
      for (const text of ['Cut each tile along its join lines at the left and above', 'HER-02 · version 3', '100 mm, 4 in, 59.8 cm']) {
        const laid = (font.layout(text).advanceWidth / font.unitsPerEm) * 10
        expect(Math.abs(textWidth(text, 10, weight) / laid - 1)).toBeLessThan(0.03)
      }
    }
  })

  it('set every sign: from the Latin file, from the other one, or written another way', async () => {
    const fonts = await loadPrintFonts()
    const set = (text: string) => fontRuns(text, 'regular', fonts).map((run) => `${run.font.name}:${run.text}`)
    expect(set('Größe 3 · 92,5')).toEqual(['regular:Größe 3 · 92,5'])
    expect(set('Żółw')).toEqual(['regular-ext:Ż', 'regular:ó', 'regular-ext:ł', 'regular:w'])
    expect(set('≤ 5')).toEqual(['regular:<= 5'])
    expect(set('ε')).toEqual(['regular:?'])
    expect(fontRuns('', 'regular', fonts)).toEqual([])
    const all = fontRuns('≤≥≈→√✓漢🪡ệ', 'semibold', fonts)
    for (const { font, text } of all) for (const sign of text) expect(font.font.hasGlyphForCodePoint(sign.codePointAt(0)!)).toBe(true)
  })
})
