/**
 * Query keys, one factory a resource. Everything of a resource begins with its name, so `invalidateQueries({ queryKey:
 * keys.submissions.all })` refreshes all of it.
 */

/** Whatever chooses an answer: filters, page, revision. Must be JSON. */
export type KeyParams = Readonly<Record<string, unknown>> | string | number | null

function resource<Name extends string>(name: Name) {
  return {
    all: [name] as const,
    list: (params: KeyParams = null) => [name, 'list', params] as const,
    one: (id: string | number, params: KeyParams = null) => [name, 'one', id, params] as const,
    /** A part of one thing: `keys.galaxies.part('ostrel', 'measurements')`. */
    part: (id: string | number, part: string, params: KeyParams = null) => [name, 'one', id, part, params] as const,
    /** Something about the whole resource: `keys.galaxies.about('facets', filters)`. */
    about: (what: string, params: KeyParams = null) => [name, what, params] as const,
  }
}

export const keys = {
  session: ['session'] as const,
  summary: ['summary'] as const,
  resolve: (name: string) => ['resolve', name] as const,
  galaxies: resource('galaxies'),
  hosts: resource('hosts'),
  submissions: resource('submissions'),
  imports: resource('imports'),
  review: resource('review'),
  sources: resource('sources'),
  scale: resource('scale'),
  releases: resource('releases'),
  figures: resource('figures'),
  views: resource('views'),
  revisions: resource('revisions'),
  audit: resource('audit'),
}
