/** Proof that a write comes from our own pages: for everybody its origin, for a signed-in person the session's token too. */
import { timingSafeEqual } from 'node:crypto'
import type { Request } from 'express'
import { Forbidden } from '../http/errors.ts'

/**
 * @param publicUrl - the address people know the site by, which a proxy may not pass on
 * @throws Forbidden when the request was set off by another site, or lacks the session's token
 */
export function requireOwnPage(request: Request, publicUrl: string): void {
  if (!fromOwnSite(request, publicUrl)) throw new Forbidden('This request was set off by another site. Nothing was changed.')
  if (!request.user) return
  const sent = request.get('x-csrf-token') ?? ''
  const held = request.session.csrfToken ?? ''
  if (held === '' || !same(sent, held)) throw new Forbidden('This page is older than your session. Nothing was changed; reload the page and try again.')
}

function fromOwnSite(request: Request, publicUrl: string): boolean {
  const site = request.get('sec-fetch-site')
  if (site !== undefined && site !== 'same-origin' && site !== 'none') return false
  const origin = request.get('origin')
  if (origin === undefined) return true
  try {
    return origin === new URL(publicUrl).origin || new URL(origin).host === request.host
  } catch {
    return false
  }
}

function same(a: string, b: string): boolean {
  const x = Buffer.from(a)
  const y = Buffer.from(b)
  return x.length === y.length && timingSafeEqual(x, y)
}
