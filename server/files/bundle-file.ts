import { createReadStream } from 'node:fs'
import { Unzip, UnzipInflate, zipSync, type Zippable } from 'fflate'
import { BUNDLE_FILE } from '../../shared/schemas/bundle'

/** What the data of a bundle may unpack to, bytes; the whole of a usual one is a tenth of it. */
const MOST_UNPACKED = 30_000_000
const MOST_FILES = 100
/** Read in small steps: one step of a file made to burst unpacks to no more than some sixteen megabytes. */
const STEP = 16_384

export type BundleFileProblem = 'not-a-bundle' | 'broken' | 'too-large-inside' | 'outside-names' | 'not-json'

class Unfit extends Error {
  constructor(readonly problem: BundleFileProblem) {
    super(problem)
  }
}

/** Names that point anywhere but under the place where a ZIP is unpacked. */
const pointsOutside = (name: string) => /^[/\\]|^[a-z]:|\\|\0/i.test(name) || name.split('/').includes('..')

/**
 * The data in a bundle, read as a stream: nothing but its one file of data is unpacked, nothing is written to disk, and unpacking stops at
 * the limit whatever the file says of its size.
 */
export async function readBundleFile(path: string): Promise<{ readonly data: unknown } | BundleFileProblem> {
  const parts: Uint8Array[] = []
  let files = 0
  let size = 0
  let begun = false
  let whole = false
  const zip = new Unzip((file) => {
    if (++files > MOST_FILES) throw new Unfit('too-large-inside')
    if (pointsOutside(file.name)) throw new Unfit('outside-names')
    if (file.name !== BUNDLE_FILE) return
    if (begun) throw new Unfit('broken')
    begun = true
    file.ondata = (error, chunk, final) => {
      // What is thrown here comes back once as an error: the first reason stands.
      if (error) throw error instanceof Unfit ? error : new Unfit('broken')
      size += chunk.length
      if (size > MOST_UNPACKED) throw new Unfit('too-large-inside')
      parts.push(chunk)
      whole ||= final
    }
    file.start()
  })
  zip.register(UnzipInflate)
  try {
    for await (const chunk of createReadStream(path, { highWaterMark: STEP })) zip.push(new Uint8Array(chunk as Buffer))
    zip.push(new Uint8Array(0), true)
  } catch (error) {
    return error instanceof Unfit ? error.problem : 'broken'
  }
  if (!begun) return 'not-a-bundle'
  if (!whole) return 'broken'
  try {
    return { data: JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(parts))) as unknown }
  } catch {
    return 'not-json'
  }
}

/** One file of a bundle; what is packed already is laid in as it is. */
export interface BundleEntry {
  readonly name: string
  readonly bytes: Uint8Array
  readonly packed?: boolean
}

/** A bundle as a ZIP. The same files give the same bytes. */
export function writeBundleFile(entries: readonly BundleEntry[]): Uint8Array {
  const files: Zippable = {}
  // The format keeps local time from 1980 on; a fixed one so that the clock of the server does not matter.
  const options = { mtime: new Date(1980, 0, 1), os: 0 }
  for (const { name, bytes, packed } of entries) files[name] = [bytes, { ...options, level: packed ? 0 : 6 }]
  return zipSync(files)
}
