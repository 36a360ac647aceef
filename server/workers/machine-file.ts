import { closeSync, createReadStream, openSync, readSync } from 'node:fs'
import { parentPort, workerData } from 'node:worker_threads'
import { encodingOf, readMachineFile, type TensileAsk } from '../../shared/utils/machine-file'

/** What the thread is started with: the file by its path, and what is known of the strip and its columns. */
export type MachineFileWork = Omit<TensileAsk, 'file' | 'encoding'> & { readonly path: string }

const { path, ...ask } = workerData as MachineFileWork
const head = new Uint8Array(2)
const opened = openSync(path, 'r')
readSync(opened, head, 0, 2, 0)
closeSync(opened)
const encoding = encodingOf(head)
// Node decodes UTF-16 in one order of bytes alone; the other is refused as a file without figures.
const file = createReadStream(path, { encoding: encoding === 'utf-16le' ? 'utf16le' : 'utf8' })
void readMachineFile({ ...ask, file }).then((said) => parentPort!.postMessage(said))
