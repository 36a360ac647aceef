import type { DrawingOperation, DrawingRole } from '../../shared/domain/output/types'
import type { PrintFont } from './fonts'
import { writeForm, type PdfForm } from './pdf-form'

interface PrintLayer {
  /** As readers list it; null is always shown. */
  readonly title: string | null
  readonly form: string
  readonly roles: readonly DrawingRole[]
}

/** What a reader can switch, from under to over. A fold stays: cut open, its piece would be wrong whatever else is shown. */
const LAYERS: readonly PrintLayer[] = [
  {
    title: 'Labels and marks',
    form: 'Marks',
    roles: ['bone', 'stretch-tick', 'level', 'grain', 'stretch', 'notch', 'point', 'label', 'label-small'],
  },
  { title: 'Seam line', form: 'Seams', roles: ['seam-line'] },
  { title: null, form: 'Folds', roles: ['fold'] },
  { title: 'Cutting line', form: 'Cutting', roles: ['cutting-line'] },
]

/**
 * Writes the drawing of the pieces as one form a layer, each named in the document as content that a reader may switch
 * (ISO 32000-1, optional content). All are on to begin with, on screen and in print.
 */
export function writeLayers(document: PDFKit.PDFDocument, drawing: readonly DrawingOperation[], fonts: readonly PrintFont[]): PdfForm[] {
  const groups: PDFKit.PDFKitReference[] = []
  const forms = LAYERS.flatMap(({ title, form, roles }) => {
    const operations = drawing.filter(({ role }) => roles.includes(role))
    if (operations.length === 0) return []
    if (title === null) return [writeForm(document, form, operations, fonts)]
    // The writer takes a boxed string for a text and a bare one for a name.
    const group = document.ref({ Type: 'OCG', Name: new String(title) })
    group.end('')
    groups.push(group)
    return [writeForm(document, form, operations, fonts, group)]
  })
  const listed = groups.toReversed()
  catalogue(document).OCProperties = { OCGs: listed, D: { Order: listed, ON: listed } }
  return forms
}

/** The document's root dictionary, which the writer keeps to itself. */
export const catalogue = (
  document: PDFKit.PDFDocument,
): Record<string, unknown> & { ViewerPreferences?: { data: Record<string, unknown> } } =>
  (document as unknown as { _root: { data: Record<string, unknown> } })._root.data
