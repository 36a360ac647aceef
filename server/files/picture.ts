import sharp from 'sharp'

/** Longest side kept of a photograph, pixels: enough to read a ruler beside a strip. */
export const LONGEST_SIDE = 2000
/** A picture that would unpack to more than this is refused before it is: 100 megapixels. */
const MOST_PIXELS = 100_000_000
const QUALITY = 82
const FORMATS: ReadonlySet<string> = new Set(['jpeg', 'png', 'webp'])

export interface Picture {
  readonly bytes: Buffer
  readonly width: number
  readonly height: number
}

/** Why a file gives no picture, in the words that the person reads. */
export type PictureProblem = 'not-a-picture' | 'other-format' | 'too-many-pixels'

/**
 * A photograph drawn anew: turned upright as its camera noted, at most 2000 pixels long, and without anything but its pixels. Place, time,
 * camera and thumbnail are left behind, because sharp writes no metadata unless it is told to.
 */
export async function redraw(path: string): Promise<Picture | PictureProblem> {
  const facts = await sharp(path, { failOn: 'error', limitInputPixels: false })
    .metadata()
    .catch(() => null)
  if (!facts?.width || !facts.height) return 'not-a-picture'
  if (!FORMATS.has(facts.format ?? '')) return 'other-format'
  if (facts.width * facts.height > MOST_PIXELS) return 'too-many-pixels'
  try {
    const { data, info } = await sharp(path, { failOn: 'error', limitInputPixels: MOST_PIXELS })
      .autoOrient()
      .resize({ width: LONGEST_SIDE, height: LONGEST_SIDE, fit: 'inside', withoutEnlargement: true })
      .webp({ quality: QUALITY })
      .toBuffer({ resolveWithObject: true })
    return { bytes: data, width: info.width, height: info.height }
  } catch {
    return 'not-a-picture'
  }
}
