import { createHash } from 'node:crypto'
import { mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { folderStore } from '../../server/gateways/file-store.ts'

const folder = mkdtempSync(join(tmpdir(), 'vicinage-store-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

describe('the file store', () => {
  const store = folderStore(join(folder, 'not', 'yet', 'there'))

  it('gives back what it was given, under a name of its own, and forgets it on request', async () => {
    const bytes = Buffer.from('galaxy,value\n')
    const kept = await store.put(bytes)
    expect(kept).toMatchObject({ bytes: 13, sha256: createHash('sha256').update(bytes).digest('hex') })
    expect(await store.get(kept.key)).toEqual(bytes)
    expect((await store.put(bytes)).key).not.toBe(kept.key)
    expect(readdirSync(folder, { recursive: true }).map(String).some((name) => name.endsWith('.part'))).toBe(false)
    await store.remove(kept.key)
    await store.remove(kept.key)
    await expect(store.get(kept.key)).rejects.toThrow('ENOENT')
  })

  it.each(['../../etc/passwd', '', 'a', '/etc/passwd', '00000000-0000-4000-8000-00000000000g'])('knows no key "%s"', (key) => {
    expect(() => store.get(key)).toThrow(RangeError)
  })
})
