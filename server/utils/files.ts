import { FileStore } from '../files/store'

let opened: FileStore | null = null

/** Where attached files lie, as the settings of this server say. */
export function files(): FileStore {
  opened ??= new FileStore(useRuntimeConfig().files)
  return opened
}
