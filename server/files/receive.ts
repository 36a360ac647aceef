import { createWriteStream } from 'node:fs'
import { mkdtemp, rm } from 'node:fs/promises'
import type { IncomingMessage } from 'node:http'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Transform, type TransformCallback } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import { refuse } from '../services/refusal'

export interface UploadRule {
  /** Field of the form that a refusal is shown at. */
  readonly field: string
  readonly limit: number
}

const MEGABYTE = 1_000_000
const tooLarge = ({ field, limit }: UploadRule) =>
  refuse('too-large', { fields: [{ path: field, message: `This file is larger than ${limit / MEGABYTE} MB. Choose a smaller one.` }] })

/** What comes beyond the limit is read and dropped, so that the answer can be read too; a sender who does not stop is cut off. */
const DROPPED_AT_MOST = 4

/** Lets bytes through up to the limit and counts all of them. */
class Counted extends Transform {
  bytes = 0
  constructor(readonly limit: number) {
    super()
  }

  override _transform(chunk: Buffer, _: BufferEncoding, next: TransformCallback): void {
    this.bytes += chunk.length
    if (this.bytes > this.limit * DROPPED_AT_MOST) next(new Error('The sender does not stop.'))
    else next(null, this.bytes > this.limit ? undefined : chunk)
  }
}

/** Streams the body of a request to a temporary file, cut at the limit, hands its path to `work`, and removes it whatever comes of it. */
export async function receive<T>(request: IncomingMessage, rule: UploadRule, work: (path: string) => Promise<T>): Promise<T> {
  if (Number(request.headers['content-length'] ?? 0) > rule.limit) {
    request.resume()
    return tooLarge(rule)
  }
  const folder = await mkdtemp(join(tmpdir(), 'tenterframe-upload-'))
  try {
    const path = join(folder, 'file')
    const file = createWriteStream(path, { mode: 0o600 })
    const counted = new Counted(rule.limit)
    try {
      await pipeline(request, counted, file)
    } catch {
      return refuse('invalid-input', { fields: [{ path: rule.field, message: 'The file did not arrive whole. Send it again.' }] })
    }
    if (counted.bytes > rule.limit) return tooLarge(rule)
    if (counted.bytes === 0) refuse('invalid-input', { fields: [{ path: rule.field, message: 'Choose a file.' }] })
    return await work(path)
  } finally {
    await rm(folder, { recursive: true, force: true })
  }
}
