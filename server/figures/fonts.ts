/** The files of the fonts that figures are set in: the same designs as the pages', as plain TrueType. */
import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import type { Face } from '../../core/figure/scene.ts'

const FILES: Readonly<Record<Face, readonly [packageName: string, file: string]>> = {
  sans: ['source-sans', 'TTF/SourceSans3-Regular.ttf'],
  'sans-semibold': ['source-sans', 'TTF/SourceSans3-Semibold.ttf'],
  'sans-italic': ['source-sans', 'TTF/SourceSans3-It.ttf'],
  serif: ['source-serif', 'TTF/SourceSerif4-Regular.ttf'],
  'serif-semibold': ['source-serif', 'TTF/SourceSerif4-Semibold.ttf'],
}

const require = createRequire(import.meta.url)

/** Path of a face's file. */
export function fontPath(face: Face): string {
  const [packageName, file] = FILES[face]
  return join(dirname(require.resolve(`${packageName}/package.json`)), file)
}

const read = new Map<Face, Promise<Buffer>>()

/** A face's file, read once. */
export function fontBytes(face: Face): Promise<Buffer> {
  const known = read.get(face) ?? readFile(fontPath(face))
  read.set(face, known)
  return known
}
