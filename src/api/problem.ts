import { problemSchema, type Conflict, type Problem } from '../../core/problem.ts'

/** What a failed request says for itself: a problem document (RFC 9457) as an error that can be thrown and caught. */
export class ApiProblem extends Error {
  override readonly name = 'ApiProblem'
  readonly status: number
  readonly type: string
  readonly title: string
  readonly detail: string
  /** The request's number in the server's log. */
  readonly instance: string | undefined
  readonly errors: readonly { path: string; message: string }[]
  /** For 409: what differs, field by field. */
  readonly conflicts: readonly Conflict[]
  /** For 429 and 503: how many seconds to wait. */
  readonly retryAfter: number | undefined

  constructor(problem: Problem, retryAfter?: number) {
    super(problem.detail || problem.title)
    this.status = problem.status
    this.type = problem.type
    this.title = problem.title
    this.detail = problem.detail
    this.instance = problem.instance
    this.errors = problem.errors ?? []
    this.conflicts = problem.conflicts ?? []
    this.retryAfter = retryAfter
  }
}

const UNREACHABLE: Problem = {
  type: 'urn:vicinage:problem:unreachable',
  title: 'The server cannot be reached',
  status: 0,
  detail: 'Nothing was changed, and what you typed is kept on this page. Look at the connection, then try again.',
}

/** The problem behind a request that never got an answer. */
export function unreachable(): ApiProblem {
  return new ApiProblem(UNREACHABLE)
}

/** The problem behind an answer that is not what the contract promises: a fault of ours, said as one. */
export function unreadable(path: string, reason: string): ApiProblem {
  return new ApiProblem({
    type: 'urn:vicinage:problem:unreadable',
    title: 'The answer could not be read',
    status: 502,
    detail: `The server's answer to ${path} is not what this page expects (${reason}). Reload the page: it may be older than the server.`,
  })
}

/** Reads a failed answer; one without a problem document gets a plain sentence by its status. */
export async function problemOf(response: Response): Promise<ApiProblem> {
  const wait = Number(response.headers.get('retry-after'))
  const retryAfter = Number.isFinite(wait) && wait > 0 ? wait : undefined
  const body: unknown = await response.json().catch(() => null)
  const parsed = problemSchema.safeParse(body)
  if (parsed.success) return new ApiProblem(parsed.data, retryAfter)
  const gateway = response.status === 502 || response.status === 503 || response.status === 504
  return new ApiProblem(
    {
      type: 'about:blank',
      title: gateway ? 'The server is not ready' : `The server answered ${response.status}`,
      status: response.status,
      detail: gateway ? 'The server may be starting. Nothing was changed; try again in a few seconds.' : 'Nothing was changed. Try again; if it stays so, tell the steward.',
    },
    retryAfter,
  )
}

/** The message for one field of a refused form, for example `fieldError(problem, 'email')`. */
export function fieldError(error: unknown, path: string): string | undefined {
  return error instanceof ApiProblem ? error.errors.find((entry) => entry.path === path)?.message : undefined
}
