/** Where uploaded files are kept: under names of our own making, never under those that people sent. */
import { createHash, randomUUID } from 'node:crypto'
import { mkdir, open, readFile, rename, rm } from 'node:fs/promises'
import { join } from 'node:path'

export interface StoredFile {
  key: string
  bytes: number
  /** In hexadecimal. */
  sha256: string
}

export interface FileStore {
  /** Returns when the bytes are safe on the disk. */
  put: (bytes: Uint8Array) => Promise<StoredFile>
  /** @throws RangeError for a key that this store did not make */
  get: (key: string) => Promise<Buffer>
  /** What is gone already is no error. */
  remove: (key: string) => Promise<void>
}

const KEY = /^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/

/** A store in a folder of the machine, which is made when it is missing. */
export function folderStore(folder: string): FileStore {
  const pathOf = (key: string): string => {
    if (!KEY.test(key)) throw new RangeError('that is no key of the file store')
    return join(folder, key.slice(0, 2), key)
  }
  return {
    put: async (bytes) => {
      const key = randomUUID()
      const path = pathOf(key)
      await mkdir(join(folder, key.slice(0, 2)), { recursive: true, mode: 0o750 })
      const temporary = `${path}.part`
      const file = await open(temporary, 'wx', 0o640)
      try {
        await file.writeFile(bytes)
        // A file counts as kept only once its bytes have left the machine's memory.
        await file.sync()
      } finally {
        await file.close()
      }
      await rename(temporary, path)
      return { key, bytes: bytes.length, sha256: createHash('sha256').update(bytes).digest('hex') }
    },
    get: (key) => readFile(pathOf(key)),
    remove: (key) => rm(pathOf(key), { force: true }),
  }
}
