/** Reading bodies: JSON in UTF-8, or one uploaded file. */
import express, { type RequestHandler } from 'express'
import multer from 'multer'
import { BadInput } from './errors.ts'
import { requirePlain, requireUtf8, wrongMediaType } from './plain-text.ts'

const BODY_LIMIT = '2mb'

const json = express.json({ limit: BODY_LIMIT, strict: true, type: 'application/json', verify: requireUtf8 })

const requireJson: RequestHandler = (request, _response, next) => {
  if (request.is('application/json')) return next()
  const empty = request.headers['transfer-encoding'] === undefined && Number(request.headers['content-length'] ?? 0) === 0
  next(empty ? new BadInput('The request has no body, and this address needs one (JSON). Nothing was changed.', [{ path: '', message: 'Send a JSON object.' }]) : wrongMediaType('The body must be JSON (content type application/json). Nothing was changed.'))
}

const requireReadable: RequestHandler = (request, _response, next) => {
  requirePlain(request.body)
  next()
}

/** What reads a JSON body before the schema judges it. */
export const readJson: readonly RequestHandler[] = [requireJson, json, requireReadable]

/** What reads one file, into memory, from a field of a form. */
export function readUpload({ field, maxBytes }: { field: string; maxBytes: number }): RequestHandler {
  const reader = multer({ storage: multer.memoryStorage(), limits: { fileSize: maxBytes, files: 1, fields: 20, parts: 24 } }).single(field)
  return (request, response, next) => {
    if (!request.is('multipart/form-data')) return next(wrongMediaType(`Send the file as multipart/form-data, in the field "${field}". Nothing was kept.`))
    reader(request, response, (error: unknown) => next(error === undefined || error === null || error instanceof multer.MulterError ? error : new BadInput('The upload broke off or is malformed. Nothing was kept.')))
  }
}
