import { METRIC_SQUARE } from '../../shared/domain/output/measure-page'
import { printerCorrection, type CorrectedPrinter } from '../../shared/domain/output/printer-correction'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { archivePrinter, findPrinters, savePrinter } from '../db/queries/printers'
import { found, refuse } from './refusal'
import type { Room } from './room'

export async function listPrinters({ db, workroom }: Room): Promise<RouteAnswer<'printers.list'>> {
  return { items: await findPrinters(db, workroom) }
}

/** What a printer makes of the square of 100 mm, by its name; measured again it replaces what was known. */
export async function measurePrinter(room: Room, body: ParsedBody<'printers.measure'>): Promise<RouteAnswer<'printers.measure'>> {
  const { db, workroom, account, today } = room
  for (const path of ['acrossMm', 'alongMm'] as const) {
    const found = printerCorrection(METRIC_SQUARE, body[path])
    if (!found.ok) refuse('invalid-input', { fields: [{ path, message: `${found.problem.message} ${found.problem.todo ?? ''}`.trim() }] })
  }
  const id = await savePrinter(db, workroom, { ...body, measuredOn: today }, account)
  return found((await findPrinters(db, workroom)).find((one) => one.id === id))
}

export async function removePrinter({ db, workroom, now }: Room, id: string): Promise<{ done: true }> {
  await archivePrinter(db, workroom, id, now)
  return { done: true }
}

/** A printer as a print needs it; null for none. An unknown one is refused by its field. */
export async function printerFor({ db, workroom }: Room, id: string | undefined): Promise<CorrectedPrinter | null> {
  if (id === undefined) return null
  const one = (await findPrinters(db, workroom)).find((printer) => printer.id === id)
  if (!one) return refuse('invalid-input', { fields: [{ path: 'printer', message: 'Choose a printer of this workroom.' }] })
  const correction = (measured: number) => {
    const found = printerCorrection(METRIC_SQUARE, measured)
    return found.ok ? found.value.correction : 1
  }
  return { name: one.name, across: correction(one.acrossMm), along: correction(one.alongMm) }
}
