import { createRequire } from 'node:module'
import { readFile } from 'node:fs/promises'
import { create } from 'fontkit'
import type { Font } from 'fontkit'
import type { TextWeight } from '../../shared/domain/output/text-width'
import { fontFromWoff } from './woff'

/** One file of Inter: the package keeps Latin and the rest of Latin apart. */
export interface PrintFont {
  readonly name: string
  readonly weight: TextWeight
  readonly data: Buffer
  readonly font: Font
}

const FILES: readonly { readonly name: string; readonly weight: TextWeight; readonly file: string }[] = [
  { name: 'regular', weight: 'regular', file: 'inter-latin-400-normal.woff' },
  { name: 'regular-ext', weight: 'regular', file: 'inter-latin-ext-400-normal.woff' },
  { name: 'semibold', weight: 'semibold', file: 'inter-latin-600-normal.woff' },
  { name: 'semibold-ext', weight: 'semibold', file: 'inter-latin-ext-600-normal.woff' },
]

/** Gives the bytes of a file of @fontsource/inter by its name. */
export type FontSource = (file: string) => Promise<Uint8Array>

/** Reads the fonts from the package as Node resolves it from here. */
export const fontsFromPackage: FontSource = (file) => readFile(createRequire(import.meta.url).resolve(`@fontsource/inter/files/${file}`))

let loaded: Promise<readonly PrintFont[]> | null = null

/** The fonts of every print, read once. A failed read is tried again at the next print. */
export function loadPrintFonts(source: FontSource = fontsFromPackage): Promise<readonly PrintFont[]> {
  loaded ??= Promise.all(
    FILES.map(async ({ name, weight, file }) => {
      const data = fontFromWoff(Buffer.from(await source(file)))
      return { name, weight, data, font: create(data) as Font }
    }),
  ).catch((error: unknown) => {
    loaded = null
    throw error
  })
  return loaded
}

/** Signs that no file of Inter has, and how they are written instead. */
const INSTEAD: Readonly<Record<string, string>> = {
  '≤': '<=',
  '≥': '>=',
  '≈': '~',
  '→': '->',
  '←': '<-',
  '√': 'root ',
  '✓': 'yes',
  '‑': '-',
}

/** A stretch of text set in one font file. */
export interface FontRun {
  readonly font: PrintFont
  readonly text: string
}

/**
 * Splits a text by the font files that have its signs. A sign that none has is written another way, else by its base
 * letter, else as a question mark: never an empty box.
 */
export function fontRuns(text: string, weight: TextWeight, fonts: readonly PrintFont[]): FontRun[] {
  const own = fonts.filter((font) => font.weight === weight)
  const fontOf = (sign: string) => own.find(({ font }) => font.hasGlyphForCodePoint(sign.codePointAt(0)!))
  const runs: { font: PrintFont; text: string }[] = []
  const put = (sign: string): boolean => {
    const font = fontOf(sign)
    if (!font) return false
    const last = runs[runs.length - 1]
    if (last && last.font === font) last.text += sign
    else runs.push({ font, text: sign })
    return true
  }
  for (const sign of text.normalize('NFC')) {
    if (put(sign)) continue
    const base = INSTEAD[sign] ?? sign.normalize('NFD').charAt(0)
    for (const each of base) if (!put(each)) put('?')
  }
  return runs
}
