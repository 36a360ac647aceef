import { createReadStream } from 'node:fs'
import { mm } from '../../shared/domain/units/brand'
import { readMachineFile } from '../../shared/utils/machine-file'

/** Streams one machine's file and prints the most memory the process held, MB. */
const said = await readMachineFile({ file: createReadStream(process.argv[2]!, 'utf8'), width: mm(50), gauge: mm(100), chosen: {} })
if (said.kind !== 'read') throw new Error(JSON.stringify(said))
console.log(process.resourceUsage().maxRSS / 1000)
