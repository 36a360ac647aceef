import { randomUUID } from 'node:crypto'
import { findTestById, setTestPhoto } from '../db/queries/cloths'
import type { Picture, PictureProblem } from '../files/picture'
import type { FileStore } from '../files/store'
import { testOf } from './cloths'
import { found, refuse } from './refusal'
import type { Room } from './room'

const SAID: Readonly<Record<PictureProblem, string>> = {
  'not-a-picture': 'This file is no picture that can be read. Choose a photograph, or take it again.',
  'other-format': 'Only JPEG, PNG and WebP are taken. Save the picture as one of them.',
  'too-many-pixels': 'This picture is larger than 100 megapixels. Save it smaller.',
}

/** Holds a picture against what was found of its file; a refusal stands at the field. */
export function pictureOf(made: Picture | PictureProblem): Picture {
  return typeof made === 'string' ? refuse('invalid-input', { fields: [{ path: 'photo', message: SAID[made] }] }) : made
}

/** Attaches a photograph to a test, in place of the one before. The file is there before its row says so. */
export async function attachPhoto(room: Room, files: FileStore, id: string, picture: Picture) {
  const { db, workroom, account, now } = room
  const stands = found(await findTestById(db, workroom, id))
  if (stands.archivedAt) refuse('archived', { detail: 'This test was put away.' })
  const name = `${workroom}/strips/${randomUUID()}.webp`
  await files.put(name, picture.bytes)
  const saved = found(await setTestPhoto(db, workroom, id, { name, width: picture.width, height: picture.height }, account, now))
  if (stands.photo) await files.remove(stands.photo)
  return testOf(saved)
}

export async function removePhoto({ db, workroom, account, now }: Room, files: FileStore, id: string) {
  const stands = found(await findTestById(db, workroom, id))
  const saved = found(await setTestPhoto(db, workroom, id, null, account, now))
  if (stands.photo) await files.remove(stands.photo)
  return testOf(saved)
}

export async function readPhoto({ db, workroom }: Room, files: FileStore, id: string): Promise<Buffer> {
  const { photo } = found(await findTestById(db, workroom, id))
  return (photo && (await files.get(photo))) || refuse('no-photo')
}
