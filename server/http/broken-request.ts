/** What Node itself cannot read as a request: no route, no session, only the open socket. */
import type { Socket } from 'node:net'
import { BadInput, HttpError } from './errors.ts'
import { problemOf } from './problem.ts'

/** For a server's `clientError`: a problem document in the place of Node's bare status line. */
export function answerBrokenRequest(error: NodeJS.ErrnoException, socket: Socket): void {
  if (error.code === 'ECONNRESET' || !socket.writable) {
    socket.destroy()
    return
  }
  const problem = problemOf(answerTo(error.code))
  const body = JSON.stringify(problem)
  socket.end(
    `HTTP/1.1 ${problem.status} ${problem.title}\r\nContent-Type: application/problem+json; charset=utf-8\r\nContent-Length: ${Buffer.byteLength(body)}\r\n` +
      `Cache-Control: no-store\r\nX-Content-Type-Options: nosniff\r\nConnection: close\r\n\r\n${body}`,
  )
}

function answerTo(code: string | undefined): HttpError {
  if (code === 'HPE_HEADER_OVERFLOW') return new HttpError(431, 'Too large', 'The address or the headers are longer than can be read. Nothing was changed; ask for less at a time.', { kind: 'too-large' })
  if (code === 'ERR_HTTP_REQUEST_TIMEOUT') return new HttpError(408, 'Too slow', 'The request did not arrive in time. Nothing was changed; send it again.', { kind: 'too-slow' })
  return new BadInput('This is no HTTP request that can be read. Nothing was changed.')
}
