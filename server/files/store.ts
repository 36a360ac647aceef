import { createStorage, type Driver, type Storage } from 'unstorage'
import fsDriver from 'unstorage/drivers/fs'
import memoryDriver from 'unstorage/drivers/memory'
import s3Driver from 'unstorage/drivers/s3'

/** Where files that people attach lie: a folder of the server, a bucket that speaks S3, or memory for tests. */
export interface FilesSettings {
  readonly driver: string
  readonly folder: string
  readonly endpoint: string
  readonly region: string
  readonly bucket: string
  readonly accessKeyId: string
  readonly secretAccessKey: string
}

/** What keeps the settings from a store, or null. The server says it at its start. */
export function filesProblem({ driver, folder, endpoint, region, bucket, accessKeyId, secretAccessKey }: FilesSettings): string | null {
  if (driver === 'memory') return null
  if (driver === 'folder') return folder ? null : 'NUXT_FILES_FOLDER is not set.'
  if (driver !== 's3') return `NUXT_FILES_DRIVER is ${driver}; it can be folder, s3 or memory.`
  const missing = Object.entries({ endpoint, region, bucket, accessKeyId, secretAccessKey }).filter(([, value]) => !value)
  const names = missing.map(([key]) => `NUXT_FILES_${key.replace(/[A-Z]/g, (letter) => `_${letter}`).toUpperCase()}`)
  return names.length === 0 ? null : `Files are to lie in a bucket, but ${names.join(', ')} ${names.length === 1 ? 'is' : 'are'} not set.`
}

function driverOf(settings: FilesSettings): Driver {
  const { driver, folder, endpoint, region, bucket, accessKeyId, secretAccessKey } = settings
  if (driver === 'memory') return memoryDriver()
  if (driver === 's3') return s3Driver({ endpoint, region, bucket, accessKeyId, secretAccessKey })
  return fsDriver({ base: folder })
}

/** A store of files by name. Names are `<workroom>/<what>/<random>.<ending>`, so that one workroom's files lie together. */
export class FileStore {
  readonly #storage: Storage

  constructor(settings: FilesSettings) {
    this.#storage = createStorage({ driver: driverOf(settings) })
  }

  async put(name: string, bytes: Uint8Array): Promise<void> {
    await this.#storage.setItemRaw(name, Buffer.from(bytes))
  }

  /** Null where no such file lies. */
  async get(name: string): Promise<Buffer | null> {
    const bytes = await this.#storage.getItemRaw<Buffer | Uint8Array | ArrayBuffer>(name)
    if (!bytes) return null
    return Buffer.isBuffer(bytes) ? bytes : Buffer.from(bytes as Uint8Array)
  }

  async remove(name: string): Promise<void> {
    await this.#storage.removeItem(name)
  }
}
