import { describe, expect, it } from 'vitest'
import { PAGES, isCurrentPage } from '../../src/app/pages.ts'
import { fits, paletteGroups } from '../../src/app/palette-entries.ts'

describe('the palette', () => {
  it('finds by any words in any order, whatever accents and capitals', () => {
    expect(fits('Import a table, a paper’s whole table', 'TABLE imp')).toBe(true)
    expect(fits('Mündel', 'mund')).toBe(true)
    expect(fits('Releases', 'relish')).toBe(false)
    expect(fits('anything', '')).toBe(true)
  })

  it('puts galaxies first, says by which name they were found, and hides what is for keys only', () => {
    const groups = paletteGroups(
      'ostrel',
      [
        { slug: 'ostrel', name: 'Ostrel', matched: 'Ostrel', class: 'spiral', ra: 0, dec: 0, exact: true },
        { slug: 'ostrel-ix', name: 'Ostrel IX', matched: 'VS 1142+23', class: 'dwarf-spheroidal', ra: 0, dec: 0, exact: false },
      ],
      PAGES,
      [
        { name: 'x.ostrel', label: 'Show Ostrel', perform: () => undefined },
        { name: 'x.next', label: 'Next of Ostrel', keys: 'j', keysOnly: true, perform: () => undefined },
      ],
    )
    expect(groups.map((group) => group.title)).toEqual(['Galaxies', 'Actions'])
    expect(groups[0]?.entries.map((entry) => entry.hint)).toEqual(['spiral', 'dwarf spheroidal, also VS 1142+23'])
    expect(groups[1]?.entries.map((entry) => entry.label)).toEqual(['Show Ostrel'])
  })
})

describe('the top bar', () => {
  const current = (pathname: string): string[] => PAGES.filter((page) => page.bar && isCurrentPage(page, pathname)).map((page) => page.label)
  it.each([
    ['/atlas/plane', ['Atlas']],
    ['/galaxies/ostrel-ix', ['Galaxies']],
    ['/import/7', ['Submissions']],
    ['/reviewers', []],
    ['/', []],
  ])('on %s marks %j', (pathname, labels) => {
    expect(current(pathname)).toEqual(labels)
  })
})
