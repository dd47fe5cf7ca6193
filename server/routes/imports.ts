/** Batch entry. */
import { readFile } from 'node:fs/promises'
import type { Request } from 'express'
import type {} from 'multer'
import { z } from 'zod'
import {
  importDraftAnswerSchema, importDraftSchema, importListSchema, importPatchSchema, importRowPatchSchema, importRowsSchema, importSchema,
} from '../../core/schema/imports.ts'
import { route } from '../http/route.ts'
import type { Route } from '../http/route.ts'
import { draftOfImport } from '../services/imports/draft.ts'
import { createImport, getImport, listImports, patchMapping, patchRow, readImportRows } from '../services/imports/imports.ts'
import type { Upload } from '../services/imports/imports.ts'
import { MOST_BYTES } from '../services/imports/read-table.ts'

const number = z.coerce.number().int().positive().max(2_147_483_647)
const one = z.object({ id: number })
const rowQuery = z.strictObject({
  only: z.enum(['bad', 'ok', 'all']).default('all'),
  offset: z.coerce.number().int().min(0).max(100_000).default(0),
  limit: z.coerce.number().int().min(1).max(500).default(100),
})

/** The file that came with a request, whether the upload was kept in memory or on disk. */
async function uploadOf(request: Request): Promise<Upload | undefined> {
  const { file } = request
  if (!file) return undefined
  const bytes = file.buffer instanceof Uint8Array ? file.buffer : await readFile(file.path)
  return { name: utf8Name(file.originalname), bytes }
}

/** Multipart heads are read as Latin-1; browsers send UTF-8. */
function utf8Name(name: string): string {
  const bytes = Buffer.from(name, 'latin1')
  const read = bytes.toString('utf8')
  return bytes.toString('latin1') === name && !read.includes('\uFFFD') ? read : name
}

export const importRoutes: Route[] = [
  route({
    method: 'get', path: '/api/imports', summary: 'Your imports, newest first', permission: 'import.write', answer: importListSchema,
    handle: async (context) => ({ imports: await listImports(context, context.reader) }),
  }),
  route({
    method: 'post', path: '/api/imports', summary: 'Upload a table (CSV or TSV, multipart field "file")', permission: 'import.write', limit: 'upload',
    upload: { field: 'file', maxBytes: MOST_BYTES }, answer: importSchema, status: 201,
    handle: async (context) => createImport(context, context.reader, await uploadOf(context.request)),
  }),
  route({
    method: 'get', path: '/api/imports/:id', summary: 'An import: columns, mapping, counts', permission: 'import.write', params: one, answer: importSchema,
    handle: (context) => getImport(context, context.reader, context.params.id),
  }),
  route({
    method: 'patch', path: '/api/imports/:id', summary: 'Say what the columns hold; all rows are read anew', permission: 'import.write', limit: 'write', params: one,
    body: importPatchSchema, answer: importSchema,
    handle: (context) => patchMapping(context, context.reader, context.params.id, context.body.mapping),
  }),
  route({
    method: 'get', path: '/api/imports/:id/rows', summary: 'Rows with what they would become and their problems', permission: 'import.write', params: one,
    query: rowQuery, answer: importRowsSchema,
    handle: (context) => readImportRows(context, context.reader, context.params.id, context.query),
  }),
  route({
    method: 'patch', path: '/api/imports/:id/rows/:number', summary: 'Mend the cells of a row, or leave it out', permission: 'import.write', limit: 'write',
    params: z.object({ id: number, number }), body: importRowPatchSchema, answer: importSchema,
    handle: (context) => patchRow(context, context.reader, context.params.id, context.params.number, context.body),
  }),
  route({
    method: 'post', path: '/api/imports/:id/draft', summary: 'Make a draft of the rows that are good and in no draft yet', permission: 'import.write', limit: 'write',
    params: one, body: importDraftSchema, answer: importDraftAnswerSchema, status: 201,
    handle: (context) => draftOfImport(context, context.reader, context.params.id, context.body),
  }),
]
