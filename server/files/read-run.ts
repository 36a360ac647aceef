import { Worker } from 'node:worker_threads'
import source from '#machine-file-worker'
import type { TensileAnswer } from '../../shared/utils/machine-file'
import type { MachineFileWork } from '../workers/machine-file'

/** No run takes longer: 50 MB are read in a few seconds. */
const LONGEST_MS = 60_000
const MEMORY = { maxOldGenerationSizeMb: 192 }

/** Threads that read at once; whoever comes then waits for a turn. */
let free = 2
const waiting: (() => void)[] = []

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (free > 0) free--
  else await new Promise<void>((turn) => waiting.push(turn))
  try {
    return await work()
  } finally {
    const next = waiting.shift()
    if (next) next()
    else free++
  }
}

/** Reads a machine's file in a thread of its own, so that no request waits for it. A file that is too much for it is a problem, no crash. */
export const readRun = (work: MachineFileWork): Promise<TensileAnswer> => inTurn(() => readInThread(work))

function readInThread(work: MachineFileWork): Promise<TensileAnswer> {
  return new Promise((done) => {
    const worker = new Worker(source, { eval: true, workerData: work, resourceLimits: MEMORY })
    const end = (answer: TensileAnswer) => {
      clearTimeout(late)
      done(answer)
      void worker.terminate()
    }
    const unreadable = () =>
      end({
        kind: 'problem',
        problem: {
          code: 'file-unreadable',
          message: 'This file is too much to be read at once.',
          todo: 'Export fewer rows a second, or the last cycles only.',
        },
      })
    const late = setTimeout(unreadable, LONGEST_MS)
    worker.once('message', end)
    worker.once('error', unreadable)
  })
}
