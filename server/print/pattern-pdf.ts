import { PassThrough } from 'node:stream'
import type { Readable } from 'node:stream'
import { setImmediate as nextTurn } from 'node:timers/promises'
import PDFDocument from 'pdfkit'
import type { Point } from '../../shared/domain/geometry/types'
import type { PrintSet } from '../../shared/domain/output/print-set'
import type { Sheet } from '../../shared/domain/output/sheet'
import type { PrintFont } from './fonts'
import { drawOperation, POINTS } from './pdf-draw'
import { placeForm, type PdfForm } from './pdf-form'
import { catalogue, writeLayers } from './pdf-layers'

export interface PatternPdfInput {
  readonly set: PrintSet
  /** Shown as the document's title by readers. No person's name. */
  readonly title: string
  /** Written into the file; the same input with the same time gives the same bytes. */
  readonly createdAt: Date
}

/**
 * A print set as a PDF at true scale, streamed page by page. The pieces are written once, a form a layer, and placed on every tile.
 * Between two pages the server answers others; when the reader goes away the rest is not drawn. Readers that heed it print without scaling.
 */
export function renderPatternPdf({ set, title, createdAt }: PatternPdfInput, fonts: readonly PrintFont[]): Readable {
  const { width, height } = set.plan.page
  const { scale } = set
  const document = new PDFDocument({
    pdfVersion: '1.5',
    autoFirstPage: false,
    size: [width * scale.x * POINTS, height * scale.y * POINTS],
    margin: 0,
    font: '',
    lang: 'en',
    displayTitle: true,
    info: { Title: title, Creator: 'Tenterframe', Producer: 'Tenterframe', CreationDate: createdAt },
  })
  for (const font of fonts) document.registerFont(font.name, font.data)
  askForNoScaling(document)
  const out = new PassThrough()
  document.pipe(out)
  drawSheets(document, set, { height, scale, fonts, isOpen: () => !out.destroyed }).catch((error: unknown) =>
    out.destroy(error instanceof Error ? error : new Error(String(error))),
  )
  return out
}

interface Pen {
  readonly height: number
  readonly scale: PrintSet['scale']
  readonly fonts: readonly PrintFont[]
  readonly isOpen: () => boolean
}

async function drawSheets(document: PDFKit.PDFDocument, set: PrintSet, pen: Pen): Promise<void> {
  await nextTurn()
  const forms = writeLayers(document, set.drawing, pen.fonts)
  for (const sheet of set.sheets) {
    if (!pen.isOpen()) return
    document.addPage()
    drawSheet(document, sheet, forms, pen)
    await nextTurn()
  }
  document.end()
}

function drawSheet(document: PDFKit.PDFDocument, sheet: Sheet, forms: readonly PdfForm[], pen: Pen): void {
  if (pen.scale.x !== 1 || pen.scale.y !== 1) document.scale(pen.scale.x, pen.scale.y, {})
  const onPage = ({ x, y }: Point): Point => ({ x: x * POINTS, y: (pen.height - y) * POINTS })
  for (const operation of sheet.under) drawOperation(document, operation, onPage, pen.fonts)
  if (sheet.drawing) {
    const { area, at } = sheet.drawing
    const shown = ({ x, y }: Point): Point => onPage({ x: x - area.left + at.x, y: y - area.bottom + at.y })
    const corner = shown({ x: area.left, y: area.top })
    document.save()
    document.rect(corner.x, corner.y, (area.right - area.left) * POINTS, (area.top - area.bottom) * POINTS).clip()
    for (const form of forms) placeForm(document, form, shown({ x: form.bounds.left, y: form.bounds.top }))
    document.restore()
  }
  for (const operation of sheet.operations) drawOperation(document, operation, onPage, pen.fonts)
}

/** Readers that heed it print without scaling to the page (ISO 32000-1, viewer preferences, PrintScaling). */
function askForNoScaling(document: PDFKit.PDFDocument): void {
  const { ViewerPreferences } = catalogue(document)
  if (ViewerPreferences) ViewerPreferences.data.PrintScaling = 'None'
}
