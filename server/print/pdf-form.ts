import type { Point } from '../../shared/domain/geometry/types'
import { boundsOfPoints, joinBounds } from '../../shared/domain/output/placing'
import type { Bounds } from '../../shared/domain/output/placing'
import type { DrawingOperation } from '../../shared/domain/output/types'
import type { PrintFont } from './fonts'
import { drawOperation, POINTS } from './pdf-draw'

/** Words may reach this many sizes to either side of their point. */
const TEXT_REACH = 20
/** A stroke reaches past its path by half its width, mm. */
const STROKE_REACH = 2

/** Points to a thousandth (.35 µm): finer figures only make the file longer. */
const fine = (value: number) => Math.round(value * 1000) / 1000

/** A drawing written once into the file, to be placed on any page. */
export interface PdfForm {
  readonly name: string
  readonly reference: PDFKit.PDFKitReference
  /** What it covers of the drafting plane, mm. */
  readonly bounds: Bounds
}

/**
 * Writes a drawing once, as a form object with its own box and resources (ISO 32000-1, form XObjects). One unit is a point, y down
 * from the upper left corner of its bounds, as pages are drawn here. With a layer it is shown only while that is.
 */
export function writeForm(
  document: PDFKit.PDFDocument,
  name: string,
  operations: readonly DrawingOperation[],
  fonts: readonly PrintFont[],
  layer: PDFKit.PDFKitReference | null = null,
): PdfForm {
  const bounds = joinBounds(operations.map(reachOf))
  const [width, height] = [(bounds.right - bounds.left) * POINTS, (bounds.top - bounds.bottom) * POINTS]
  const resources = { ProcSet: ['PDF', 'Text'], Font: {} }
  const shown = layer ? { OC: layer } : {}
  const reference = document.ref({ Type: 'XObject', Subtype: 'Form', BBox: [0, 0, width, height], Resources: resources, ...shown })
  const place = ({ x, y }: Point): Point => ({ x: fine((x - bounds.left) * POINTS), y: fine((bounds.top - y) * POINTS) })
  drawnInto(document, { width, height, fonts: resources.Font, write: (chunk) => reference.write(chunk) }, () => {
    for (const operation of operations) drawOperation(document, operation, place, fonts)
  })
  reference.end('')
  return { name, reference, bounds }
}

/** Places a form on the page so that the point of the drafting plane it begins at lies at `corner`, points, y down. */
export function placeForm(document: PDFKit.PDFDocument, form: PdfForm, corner: Point): void {
  const xobjects = document.page.xobjects as Record<string, PDFKit.PDFKitReference>
  xobjects[form.name] = form.reference
  document.save()
  document.translate(corner.x, corner.y)
  document.addContent(`/${form.name} Do`)
  document.restore()
}

/** What drawing asks of a page. */
interface Canvas {
  readonly width: number
  readonly height: number
  readonly fonts: Record<string, PDFKit.PDFKitReference>
  readonly write: (chunk: string) => void
}

/** Drawing goes to the page that the document is at: here a form stands in for it. */
function drawnInto(document: PDFKit.PDFDocument, canvas: Canvas, draw: () => void): void {
  const page = document.page
  document.page = canvas as unknown as PDFKit.PDFPage
  try {
    draw()
  } finally {
    document.page = page
  }
}

function reachOf(operation: DrawingOperation): Bounds {
  if (operation.kind === 'text') {
    const { at, size } = operation
    return { left: at.x - size * TEXT_REACH, right: at.x + size * TEXT_REACH, bottom: at.y - size, top: at.y + size * 1.5 }
  }
  const { left, right, bottom, top } = boundsOfPoints(
    operation.path.flatMap((segment) =>
      segment.kind === 'line' ? [segment.from, segment.to] : [segment.from, segment.c1, segment.c2, segment.to],
    ),
  )
  return { left: left - STROKE_REACH, right: right + STROKE_REACH, bottom: bottom - STROKE_REACH, top: top + STROKE_REACH }
}
