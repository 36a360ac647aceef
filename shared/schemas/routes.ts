import { z } from 'zod'
import { done, idParams, list, page, pageQuery } from './base'
import { client, clientBody, clientSummary, clientUpdate, clientWhole } from './clients'
import { cloth, clothBody, clothSummary, clothTest, clothUpdate, clothWhole, photoUpload, testBody, testUpdate } from './cloths'
import { draft } from './draft'
import { fitting, fittingBody } from './fittings'
import { garmentBody, garmentSummary, garmentUpdate, garmentWhole, workingCopy, workingCopySave } from './garments'
import { runAnswer, runQuery, runUpload } from './machine-file'
import { measuring, measuringBody, measuringUpdate } from './measuring'
import { printQuery, tileMap, tilePlan } from './print'
import { me, preferencesBody, signInBody, type Role } from './session'
import {
  solveCurveAnswer,
  solveCurveBody,
  solveFittingAnswer,
  solveFittingBody,
  solveGettingInAnswer,
  solveGettingInBody,
  solvePiecesBody,
  solveRecutAnswer,
  solveRecutBody,
  solveRingsAnswer,
  solveRingsBody,
  solveTilesBody,
  solveWhatIfAnswer,
  solveWhatIfBody,
} from './solve'
import { clearanceBody, restoreBody, versionBody, versionSummary, versionWhole } from './versions'
import { flagsBody, wearer, wearerBody, wearerUpdate } from './wearers'
import { member, workroom, workroomPatch } from './workroom'

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'

/** What the `id` of an address names. */
export type ResourceKind = 'client' | 'wearer' | 'measuring' | 'cloth' | 'test' | 'garment' | 'version'

/** Who may: anyone, whoever is signed in, or the roles listed. */
export type Access = 'public' | 'signed-in' | readonly Role[]

export interface Route {
  readonly method: Method
  readonly path: string
  readonly access: Access
  readonly resource: ResourceKind | null
  readonly params: z.ZodTypeAny | null
  readonly query: z.ZodTypeAny | null
  readonly body: z.ZodTypeAny | null
  /** Null where the answer is not JSON. */
  readonly response: z.ZodTypeAny | null
  readonly media?: string
  /** A file as the whole body, streamed: the form's field, the most bytes, its media types. */
  readonly upload?: { readonly field: string; readonly limit: number; readonly media: readonly string[] }
  readonly status?: number
  readonly group: string
  readonly summary: string
}

const owner: readonly Role[] = ['owner']
const drafting: readonly Role[] = ['owner', 'drafter']
const everyone: readonly Role[] = ['owner', 'drafter', 'maker']

const plain = { resource: null, params: null, query: null, body: null } as const
const of = <const K extends ResourceKind>(resource: K) => ({ resource, params: idParams, query: null, body: null }) as const

/** The one table of routes: handlers, API description, permission tests and the client read it. */
export const routes = {
  'session.get': {
    ...plain,
    method: 'GET',
    path: '/api/session',
    access: 'public',
    response: me,
    group: 'Session',
    summary: 'Who is signed in, in which role and workroom.',
  },
  'session.signIn': {
    ...plain,
    method: 'POST',
    path: '/api/session',
    access: 'public',
    body: signInBody,
    response: me,
    group: 'Session',
    summary: 'Sign in.',
  },
  'session.signOut': {
    ...plain,
    method: 'DELETE',
    path: '/api/session',
    access: 'public',
    response: done,
    group: 'Session',
    summary: 'Sign out here.',
  },
  'session.signOutEverywhere': {
    ...plain,
    method: 'DELETE',
    path: '/api/sessions',
    access: 'signed-in',
    response: done,
    group: 'Session',
    summary: 'End every session of this account.',
  },
  'session.preferences': {
    ...plain,
    method: 'PUT',
    path: '/api/session/preferences',
    access: 'signed-in',
    body: preferencesBody,
    response: me,
    group: 'Session',
    summary: 'Choose centimetres or inches.',
  },

  'workroom.get': {
    ...plain,
    method: 'GET',
    path: '/api/workroom',
    access: everyone,
    response: workroom,
    group: 'Workroom',
    summary: 'The workroom, its zone and its settings.',
  },
  'workroom.update': {
    ...plain,
    method: 'PATCH',
    path: '/api/workroom',
    access: owner,
    body: workroomPatch,
    response: workroom,
    group: 'Workroom',
    summary: 'Change name, zone or settings. Limits can be tightened, never loosened.',
  },
  'members.list': {
    ...plain,
    method: 'GET',
    path: '/api/members',
    access: owner,
    response: list(member),
    group: 'Workroom',
    summary: 'Who works here, and in which role.',
  },

  'clients.list': {
    ...plain,
    method: 'GET',
    path: '/api/clients',
    access: drafting,
    query: pageQuery,
    response: page(clientSummary),
    group: 'Clients',
    summary: 'Clients by name; `q` finds those whose name, or a word of it, begins so.',
  },
  'clients.create': {
    ...plain,
    method: 'POST',
    path: '/api/clients',
    access: drafting,
    body: clientBody,
    response: client,
    status: 201,
    group: 'Clients',
    summary: 'Add a client.',
  },
  'clients.get': {
    ...of('client'),
    method: 'GET',
    path: '/api/clients/:id',
    access: drafting,
    response: clientWhole,
    group: 'Clients',
    summary: 'A client with wearers and garments.',
  },
  'clients.update': {
    ...of('client'),
    method: 'PUT',
    path: '/api/clients/:id',
    access: drafting,
    body: clientUpdate,
    response: client,
    group: 'Clients',
    summary: 'Change a client. A stale base answers 409 with what stands.',
  },
  'clients.archive': {
    ...of('client'),
    method: 'POST',
    path: '/api/clients/:id/archive',
    access: drafting,
    response: client,
    group: 'Clients',
    summary: 'Put a client away.',
  },
  'clients.restore': {
    ...of('client'),
    method: 'POST',
    path: '/api/clients/:id/restore',
    access: drafting,
    response: client,
    group: 'Clients',
    summary: 'Bring a client back.',
  },

  'wearers.create': {
    ...of('client'),
    method: 'POST',
    path: '/api/clients/:id/wearers',
    access: drafting,
    body: wearerBody,
    response: wearer,
    status: 201,
    group: 'Wearers',
    summary: 'Add a wearer under a client.',
  },
  'wearers.get': {
    ...of('wearer'),
    method: 'GET',
    path: '/api/wearers/:id',
    access: drafting,
    response: wearer,
    group: 'Wearers',
    summary: 'A wearer, with what changes limits.',
  },
  'wearers.update': {
    ...of('wearer'),
    method: 'PUT',
    path: '/api/wearers/:id',
    access: drafting,
    body: wearerUpdate,
    response: wearer,
    group: 'Wearers',
    summary: 'Change a wearer.',
  },
  'wearers.flags': {
    ...of('wearer'),
    method: 'PUT',
    path: '/api/wearers/:id/flags',
    access: drafting,
    body: flagsBody,
    response: wearer,
    group: 'Wearers',
    summary: 'Note what changes limits. Health data: asked with its purpose, consent noted, for owner and drafter alone.',
  },

  'measurings.list': {
    ...of('wearer'),
    method: 'GET',
    path: '/api/wearers/:id/measurings',
    access: drafting,
    response: list(measuring),
    group: 'Measurings',
    summary: 'The measurings of a wearer, newest first.',
  },
  'measurings.create': {
    ...of('wearer'),
    method: 'POST',
    path: '/api/wearers/:id/measurings',
    access: drafting,
    body: measuringBody,
    response: measuring,
    status: 201,
    group: 'Measurings',
    summary: 'Add a dated measuring.',
  },
  'measurings.get': {
    ...of('measuring'),
    method: 'GET',
    path: '/api/measurings/:id',
    access: drafting,
    response: measuring,
    group: 'Measurings',
    summary: 'One measuring.',
  },
  'measurings.update': {
    ...of('measuring'),
    method: 'PUT',
    path: '/api/measurings/:id',
    access: drafting,
    body: measuringUpdate,
    response: measuring,
    group: 'Measurings',
    summary: 'Correct a measuring.',
  },

  'cloths.list': {
    ...plain,
    method: 'GET',
    path: '/api/cloths',
    access: everyone,
    query: pageQuery,
    response: page(clothSummary),
    group: 'Cloths',
    summary: 'Cloth lots by code, with their load curves.',
  },
  'cloths.create': {
    ...plain,
    method: 'POST',
    path: '/api/cloths',
    access: drafting,
    body: clothBody,
    response: cloth,
    status: 201,
    group: 'Cloths',
    summary: 'Add a lot.',
  },
  'cloths.get': {
    ...of('cloth'),
    method: 'GET',
    path: '/api/cloths/:id',
    access: everyone,
    response: clothWhole,
    group: 'Cloths',
    summary: 'A lot with its tests and the curve of each direction and state.',
  },
  'cloths.update': {
    ...of('cloth'),
    method: 'PUT',
    path: '/api/cloths/:id',
    access: drafting,
    body: clothUpdate,
    response: cloth,
    group: 'Cloths',
    summary: 'Change a lot.',
  },
  'cloths.archive': {
    ...of('cloth'),
    method: 'POST',
    path: '/api/cloths/:id/archive',
    access: drafting,
    response: cloth,
    group: 'Cloths',
    summary: 'Put a lot away. Garments that use it keep it.',
  },
  'cloths.restore': {
    ...of('cloth'),
    method: 'POST',
    path: '/api/cloths/:id/restore',
    access: drafting,
    response: cloth,
    group: 'Cloths',
    summary: 'Bring a lot back.',
  },
  'tests.create': {
    ...of('cloth'),
    method: 'POST',
    path: '/api/cloths/:id/tests',
    access: everyone,
    body: testBody,
    response: clothTest,
    status: 201,
    group: 'Cloths',
    summary: 'Enter a stretch test, finished or as far as it goes. An unfinished one is used by no garment.',
  },
  'tests.update': {
    ...of('test'),
    method: 'PUT',
    path: '/api/tests/:id',
    access: everyone,
    body: testUpdate,
    response: clothTest,
    group: 'Cloths',
    summary: 'Correct a stretch test.',
  },
  'tests.archive': {
    ...of('test'),
    method: 'DELETE',
    path: '/api/tests/:id',
    access: drafting,
    response: clothTest,
    group: 'Cloths',
    summary: 'Put a stretch test away.',
  },
  'tests.photo': {
    ...of('test'),
    method: 'GET',
    path: '/api/tests/:id/photo',
    access: everyone,
    response: null,
    media: 'image/webp',
    group: 'Cloths',
    summary: 'Photograph of the strip.',
  },
  'tests.attachPhoto': {
    ...of('test'),
    method: 'PUT',
    path: '/api/tests/:id/photo',
    access: everyone,
    upload: photoUpload,
    response: clothTest,
    group: 'Cloths',
    summary: 'Attach a photograph of the strip. It is drawn anew: upright, at most 2000 pixels long, without place, time or camera.',
  },
  'tests.removePhoto': {
    ...of('test'),
    method: 'DELETE',
    path: '/api/tests/:id/photo',
    access: everyone,
    response: clothTest,
    group: 'Cloths',
    summary: 'Remove the photograph of the strip.',
  },

  'garments.list': {
    ...plain,
    method: 'GET',
    path: '/api/garments',
    access: everyone,
    query: pageQuery,
    response: page(garmentSummary),
    group: 'Garments',
    summary: 'Garments by due date. A maker sees those with a cleared version, without names.',
  },
  'garments.create': {
    ...plain,
    method: 'POST',
    path: '/api/garments',
    access: drafting,
    body: garmentBody,
    response: garmentWhole,
    status: 201,
    group: 'Garments',
    summary: 'Start a garment for a wearer, with a fresh working copy.',
  },
  'garments.get': {
    ...of('garment'),
    method: 'GET',
    path: '/api/garments/:id',
    access: everyone,
    response: garmentWhole,
    group: 'Garments',
    summary: 'A garment.',
  },
  'garments.update': {
    ...of('garment'),
    method: 'PUT',
    path: '/api/garments/:id',
    access: drafting,
    body: garmentUpdate,
    response: garmentWhole,
    group: 'Garments',
    summary: 'Change a garment.',
  },
  'garments.workingCopy': {
    ...of('garment'),
    method: 'GET',
    path: '/api/garments/:id/working-copy',
    access: drafting,
    response: workingCopy,
    group: 'Garments',
    summary: 'What is being changed, with its solution or what keeps it from one.',
  },
  'garments.saveWorkingCopy': {
    ...of('garment'),
    method: 'PUT',
    path: '/api/garments/:id/working-copy',
    access: drafting,
    body: workingCopySave,
    response: workingCopy,
    group: 'Garments',
    summary: 'Save the working copy. A stale base answers 409 with theirs.',
  },

  'fittings.list': {
    ...of('garment'),
    method: 'GET',
    path: '/api/garments/:id/fittings',
    access: drafting,
    response: list(fitting),
    group: 'Fittings',
    summary: 'Fittings of a garment, newest first.',
  },
  'fittings.create': {
    ...of('garment'),
    method: 'POST',
    path: '/api/garments/:id/fittings',
    access: drafting,
    body: fittingBody,
    response: fitting,
    status: 201,
    group: 'Fittings',
    summary: 'Record what was seen at a fitting of a version. It never changes again.',
  },

  'versions.list': {
    ...of('garment'),
    method: 'GET',
    path: '/api/garments/:id/versions',
    access: everyone,
    response: list(versionSummary),
    group: 'Versions',
    summary: 'Versions of a garment, newest first.',
  },
  'versions.create': {
    ...of('garment'),
    method: 'POST',
    path: '/api/garments/:id/versions',
    access: drafting,
    body: versionBody,
    response: versionSummary,
    status: 201,
    group: 'Versions',
    summary: 'Name the working copy as a version. It never changes again.',
  },
  'versions.get': {
    ...of('version'),
    method: 'GET',
    path: '/api/versions/:id',
    access: everyone,
    response: versionWhole,
    group: 'Versions',
    summary: 'A version as it was saved. A maker sees cleared ones, without name, body girth or condition.',
  },
  'versions.restore': {
    ...of('version'),
    method: 'POST',
    path: '/api/versions/:id/restore',
    access: drafting,
    body: restoreBody,
    response: workingCopy,
    group: 'Versions',
    summary: 'Make a version the working copy again.',
  },
  'versions.clear': {
    ...of('version'),
    method: 'POST',
    path: '/api/versions/:id/clearance',
    access: drafting,
    body: clearanceBody,
    response: versionSummary,
    group: 'Versions',
    summary: 'Clear for cutting. Over a stop only the owner may, by name and reason; some stops nobody may.',
  },

  'print.tiles': {
    ...of('version'),
    method: 'GET',
    path: '/api/versions/:id/tiles',
    access: everyone,
    query: printQuery,
    response: tileMap,
    group: 'Print',
    summary: 'How a version is laid on pages.',
  },
  'print.pattern': {
    ...of('version'),
    method: 'GET',
    path: '/api/versions/:id/pattern.pdf',
    access: everyone,
    query: printQuery,
    response: null,
    media: 'application/pdf',
    group: 'Print',
    summary: 'The print set, true to scale.',
  },

  'solve.curve': {
    ...plain,
    method: 'POST',
    path: '/api/solve/curve',
    access: 'signed-in',
    body: solveCurveBody,
    response: solveCurveAnswer,
    group: 'Solve',
    summary: 'Load curve and figures of a stretch test.',
  },
  'solve.run': {
    ...plain,
    method: 'POST',
    path: '/api/solve/run',
    access: 'signed-in',
    query: runQuery,
    upload: runUpload,
    response: runAnswer,
    group: 'Solve',
    summary: 'A tensile machine’s file as a specimen: the last loading and its return. What the file does not say is asked back.',
  },
  'solve.rings': {
    ...plain,
    method: 'POST',
    path: '/api/solve/rings',
    access: 'signed-in',
    body: solveRingsBody,
    response: solveRingsAnswer,
    group: 'Solve',
    summary: 'Rings from a body, plans and a hold, a cut or a gap.',
  },
  'solve.gettingIn': {
    ...plain,
    method: 'POST',
    path: '/api/solve/getting-in',
    access: 'signed-in',
    body: solveGettingInBody,
    response: solveGettingInAnswer,
    group: 'Solve',
    summary: 'Whether levels pass what they have to on the way on and off, with the pull it takes. No stitch limit is applied.',
  },
  'solve.recut': {
    ...plain,
    method: 'POST',
    path: '/api/solve/recut',
    access: drafting,
    body: solveRecutBody,
    response: solveRecutAnswer,
    group: 'Solve',
    summary: 'Equal-hold recut of a fitted garment in another layer plan, for both targets.',
  },
  'solve.fitting': {
    ...plain,
    method: 'POST',
    path: '/api/solve/fitting',
    access: drafting,
    body: solveFittingBody,
    response: solveFittingAnswer,
    group: 'Solve',
    summary: 'What a fitting says: which level is tight and by how much, and the stiffness where a pull was taken.',
  },
  'solve.whatIf': {
    ...plain,
    method: 'POST',
    path: '/api/solve/what-if',
    access: drafting,
    body: solveWhatIfBody,
    response: solveWhatIfAnswer,
    group: 'Solve',
    summary: 'Rings of a garment as it stands beside those of a change.',
  },
  'solve.pieces': {
    ...plain,
    method: 'POST',
    path: '/api/solve/pieces',
    access: 'signed-in',
    body: solvePiecesBody,
    response: draft,
    group: 'Solve',
    summary: 'Pieces from a body, the widths of its rings and a style.',
  },
  'solve.tiles': {
    ...plain,
    method: 'POST',
    path: '/api/solve/tiles',
    access: 'signed-in',
    body: solveTilesBody,
    response: tilePlan,
    group: 'Solve',
    summary: 'Pages from pieces and a paper.',
  },

  'health.get': {
    ...plain,
    method: 'GET',
    path: '/api/health',
    access: 'public',
    response: z.object({ ready: z.boolean(), schema: z.string(), engine: z.string() }),
    group: 'Service',
    summary: 'Whether the server and its database are ready.',
  },
  'openapi.get': {
    ...plain,
    method: 'GET',
    path: '/api/openapi.json',
    access: 'public',
    response: z.record(z.unknown()),
    group: 'Service',
    summary: 'This description, as OpenAPI 3.1.',
  },
} as const satisfies Record<string, Route>

export type Routes = typeof routes
export type RouteId = keyof Routes
export type UploadRouteId = { [K in RouteId]: Routes[K] extends { readonly upload: object } ? K : never }[RouteId]
export const routeIds = Object.keys(routes) as RouteId[]

type Input<S> = S extends z.ZodTypeAny ? z.input<S> : undefined
type Output<S> = S extends z.ZodTypeAny ? z.output<S> : undefined

export type RouteBody<K extends RouteId> = Input<Routes[K]['body']>
export type RouteQuery<K extends RouteId> = Input<Routes[K]['query']>
export type RouteAnswer<K extends RouteId> = Output<Routes[K]['response']>
export type ParsedBody<K extends RouteId> = Output<Routes[K]['body']>
export type ParsedQuery<K extends RouteId> = Output<Routes[K]['query']>
export type RouteHasId<K extends RouteId> = Routes[K]['resource'] extends null ? false : true
