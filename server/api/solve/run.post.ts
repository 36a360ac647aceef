import { readRun } from '../../files/read-run'
import { runOf } from '../../services/machine-files'
import { handleUpload } from '../../utils/handle'

export default handleUpload(
  'solve.run',
  async (path, { query: { width, gauge, ...chosen } }) => runOf(await readRun({ path, width, gauge, chosen })),
  (_, run) => run,
)
