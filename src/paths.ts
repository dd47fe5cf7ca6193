/** Every address of the client, in one place. Parameters are encoded here and nowhere else. */

const part = encodeURIComponent

/** Adds a query; empty, null and undefined values are left out. */
export function withQuery(path: string, query: Record<string, string | number | null | undefined>): string {
  const search = new URLSearchParams()
  for (const [key, value] of Object.entries(query)) if (value != null && value !== '') search.set(key, String(value))
  const text = search.toString()
  return text ? `${path}?${text}` : path
}

export const paths = {
  home: '/',
  atlas: '/atlas/sky',
  sky: '/atlas/sky',
  plane: '/atlas/plane',
  galaxies: '/galaxies',
  galaxy: (slug: string) => `/galaxies/${part(slug)}`,
  hosts: '/hosts',
  host: (slug: string) => `/hosts/${part(slug)}`,
  submissions: '/submissions',
  newSubmission: '/submissions/new',
  submission: (id: string | number) => `/submissions/${part(String(id))}`,
  imports: '/import',
  import: (id: string | number) => `/import/${part(String(id))}`,
  review: '/review',
  reviewOf: (id: string | number) => `/review/${part(String(id))}`,
  sources: '/sources',
  source: (id: string | number) => `/sources/${part(String(id))}`,
  scale: '/scale',
  proposeScale: '/scale/propose',
  releases: '/releases',
  release: (label: string) => `/releases/${part(label)}`,
  figures: '/figures',
  figure: (id: string | number) => `/figures/${part(String(id))}`,
  signIn: '/sign-in',
  /** Back to where the reader was; `returnTo` must be a path of this site. */
  signInFrom: (returnTo: string) => withQuery('/sign-in', { from: returnTo }),
  account: '/account',
  /** Served by the API, not by the client. */
  apiDocs: '/api/docs',
} as const

/**
 * A path of this site that may be gone to after signing in, or the home page. Anything that a browser could read as another
 * site (`//host`, `/\host`, `https:`, control characters) is refused.
 */
export function safeReturn(from: string | null | undefined): string {
  if (!from) return paths.home
  const hasControls = [...from].some((letter) => letter.charCodeAt(0) < 0x20 || letter === '\\')
  if (!from.startsWith('/') || from.startsWith('//') || hasControls || from.startsWith(paths.signIn)) return paths.home
  return from
}
