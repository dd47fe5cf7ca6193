import { describe, expect, it } from 'vitest'
import { paths, safeReturn, withQuery } from '../../src/paths.ts'

describe('where one may go after signing in', () => {
  it.each(['/galaxies', '/galaxies?host=ostrel&distance=2..5', '/submissions/8#talk'])('%s is kept', (from) => {
    expect(safeReturn(from)).toBe(from)
  })

  it.each(['//evil.test', '/\\evil.test', 'https://evil.test/', 'javascript:alert(1)', '/\t/evil.test', '\n/galaxies', '/sign-in', '/sign-in?from=/x', '', null, undefined])('%j leads home', (from) => {
    expect(safeReturn(from)).toBe(paths.home)
  })
})

describe('addresses', () => {
  it('encode what they are given', () => {
    expect(paths.galaxy('a/b c')).toBe('/galaxies/a%2Fb%20c')
    expect(withQuery('/galaxies', { host: 'a&b', q: '', page: null, n: 2 })).toBe('/galaxies?host=a%26b&n=2')
  })
})
