import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { strToU8, unzipSync, zipSync } from 'fflate'
import { afterAll, describe, expect, it } from 'vitest'
import { readBundleFile, writeBundleFile } from '../../../server/files/bundle-file'

const folder = mkdtempSync(join(tmpdir(), 'tenterframe-bundle-file-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))
let count = 0
function read(bytes: Uint8Array) {
  const path = join(folder, `${count++}.zip`)
  writeFileSync(path, bytes)
  return readBundleFile(path)
}
const data = strToU8('{"a":1}')

describe('the file of a bundle', () => {
  it('is read as it was written, packed or not, and written to the same bytes', async () => {
    for (const packed of [false, true]) {
      const write = () =>
        writeBundleFile([
          { name: 'prints/other.bin', bytes: new Uint8Array(50_000) },
          { name: 'bundle.json', bytes: data, packed },
        ])
      expect(await read(write())).toEqual({ data: { a: 1 } })
      expect(Buffer.from(write()).equals(Buffer.from(write()))).toBe(true)
      expect(Object.keys(unzipSync(write()))).toEqual(['prints/other.bin', 'bundle.json'])
    }
  })

  it.each([
    ['../up.txt', 'outside-names'],
    ['prints/../../up.txt', 'outside-names'],
    ['/etc/up.txt', 'outside-names'],
    ['C:\\up.txt', 'outside-names'],
    ['prints\\up.txt', 'outside-names'],
  ] as const)('with %s in it is not read further', async (name, problem) => {
    expect(await read(zipSync({ [name]: data, 'bundle.json': data }))).toBe(problem)
  })

  it('stops at its limit whatever it says of its size, and at too many files', async () => {
    const bomb = Buffer.from(zipSync({ 'bundle.json': new Uint8Array(200_000_000) }, { level: 9 }))
    expect(await read(bomb)).toBe('too-large-inside')
    bomb.writeUInt32LE(100, 22)
    bomb.writeUInt32LE(100, bomb.lastIndexOf('PK\u0001\u0002') + 24)
    expect(await read(bomb)).toBe('too-large-inside')
    expect(await read(zipSync(Object.fromEntries(Array.from({ length: 101 }, (_, i) => [`${i}.txt`, data]))))).toBe('too-large-inside')
  })

  it('says what else is wrong with it', async () => {
    const whole = zipSync({ 'bundle.json': new Uint8Array(20_000).map((_, i) => (i * 7919) % 251) })
    expect(await read(strToU8('no zip'))).toBe('not-a-bundle')
    expect(await read(zipSync({ 'other.json': data }))).toBe('not-a-bundle')
    expect(await read(whole.subarray(0, 120))).toBe('broken')
    expect(await read(whole)).toBe('not-json')
    expect(await read(zipSync({ 'bundle.json': new Uint8Array([0xff, 0xfe, 0x7b]) }))).toBe('not-json')
  })
})
