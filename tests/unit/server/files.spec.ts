import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { FileStore, filesProblem, type FilesSettings } from '../../../server/files/store'

const settings = (change: Partial<FilesSettings>): FilesSettings => ({
  driver: 'folder',
  folder: '',
  endpoint: '',
  region: '',
  bucket: '',
  accessKeyId: '',
  secretAccessKey: '',
  ...change,
})
const NAME = 'a-workroom/strips/one.webp'
const bytes = Buffer.from([0, 1, 2, 250, 255, 10])

async function keeps(store: FileStore): Promise<void> {
  expect(await store.get(NAME)).toBeNull()
  await store.put(NAME, bytes)
  expect(await store.get(NAME)).toEqual(bytes)
  await store.remove(NAME)
  expect(await store.get(NAME)).toBeNull()
}

/** A bucket in memory that takes signed requests alone: no more of S3 than is needed here. */
async function bucket() {
  const objects = new Map<string, Buffer>()
  const unsigned: string[] = []
  const server = createServer((request, response) => {
    const path = request.url!.split('?')[0]!
    if (!request.headers.authorization?.startsWith('AWS4-HMAC-SHA256')) unsigned.push(path)
    const parts: Buffer[] = []
    request.on('data', (part: Buffer) => parts.push(part))
    request.on('end', () => {
      if (request.method === 'PUT') objects.set(path, Buffer.concat(parts))
      if (request.method === 'DELETE') objects.delete(path)
      const found = objects.get(path)
      response.writeHead(request.method === 'GET' && !found ? 404 : 200)
      response.end(request.method === 'GET' ? found : undefined)
    })
  })
  await new Promise<void>((ready) => server.listen(0, '127.0.0.1', ready))
  const { port } = server.address() as AddressInfo
  return { endpoint: `http://127.0.0.1:${port}`, objects, unsigned, close: () => new Promise((done) => server.close(done)) }
}

describe('the file store', () => {
  it('keeps bytes in memory', () => keeps(new FileStore(settings({ driver: 'memory' }))))

  it('keeps bytes in a folder, one workroom’s together', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'tenterframe-files-'))
    try {
      const store = new FileStore(settings({ folder }))
      await keeps(store)
      await store.put(NAME, bytes)
      expect(readdirSync(folder)).toEqual(['a-workroom'])
    } finally {
      rmSync(folder, { recursive: true, force: true })
    }
  })

  it('keeps bytes in a bucket, by signed requests alone', async () => {
    const { endpoint, objects, unsigned, close } = await bucket()
    try {
      const store = new FileStore(
        settings({ driver: 's3', endpoint, region: 'eu-1', bucket: 'strips', accessKeyId: 'key', secretAccessKey: 'secret' }),
      )
      await keeps(store)
      await store.put(NAME, bytes)
      expect([...objects.keys()]).toEqual([expect.stringMatching(/^\/strips\//)])
      expect(unsigned).toEqual([])
    } finally {
      await close()
    }
  })

  it('says which settings are missing before it is needed', () => {
    expect(filesProblem(settings({ driver: 'memory' }))).toBeNull()
    expect(filesProblem(settings({ folder: 'files' }))).toBeNull()
    expect(filesProblem(settings({}))).toContain('NUXT_FILES_FOLDER')
    expect(filesProblem(settings({ driver: 'tape' }))).toContain('folder, s3 or memory')
    expect(filesProblem(settings({ driver: 's3', endpoint: 'http://bucket' }))).toBe(
      'Files are to lie in a bucket, but NUXT_FILES_REGION, NUXT_FILES_BUCKET, NUXT_FILES_ACCESS_KEY_ID, NUXT_FILES_SECRET_ACCESS_KEY are not set.',
    )
  })
})
