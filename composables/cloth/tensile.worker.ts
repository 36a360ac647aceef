import { readMachineFile, type TensileAsk } from '../../shared/utils/machine-file'

/** Reads a machine's file away from the screen's own thread. */
self.addEventListener(
  'message',
  (event: MessageEvent<TensileAsk>) => void readMachineFile(event.data).then((said) => self.postMessage(said)),
)
