import { describe, expect, it } from 'vitest'
import { readCitation } from '../../../core/formats/citation.ts'

describe('citations as tables write them', () => {
  it.each([
    ['Gieren+2005 ApJ 628 695', { label: 'Gieren et al. 2005', authors: ['Gieren', 'others'], year: 2005, venue: 'ApJ 628 695', kind: 'article' }],
    ['Karachentsev+2002 A&A 389 812 (astro-ph/0204507)', { label: 'Karachentsev et al. 2002', year: 2002, venue: 'A&A 389 812 (astro-ph/0204507)' }],
    ['Jang & Lee 2014 ApJ 792 52', { label: 'Jang & Lee 2014', authors: ['Jang', 'Lee'], year: 2014, venue: 'ApJ 792 52' }],
    ['Bland-Hawthorn & Gerhard 2016 ARA&A 54 529', { label: 'Bland-Hawthorn & Gerhard 2016', venue: 'ARA&A 54 529' }],
    ['Rejkuba 2004 A&A 413 903', { label: 'Rejkuba 2004', authors: ['Rejkuba'], year: 2004, venue: 'A&A 413 903' }],
    ['Gieren et al. (2005), ApJ, 628, 695', { label: 'Gieren et al. 2005', authors: ['Gieren', 'others'], venue: 'ApJ, 628, 695' }],
    ['GRAVITY Collaboration 2019 A&A 625 L10', { label: 'GRAVITY Collaboration 2019', year: 2019, venue: 'A&A 625 L10' }],
    ['Smith 2019, private communication', { label: 'Smith 2019', kind: 'private' }],
    ['RC3-style type', { label: 'RC3-style type', authors: ['RC3'], year: 1991, venue: '', kind: 'catalogue' }],
  ])('reads %s', (text, expected) => {
    expect(readCitation(text)).toMatchObject(expected)
  })

  it.each(['this paper', 'ApJ 628 695', ''])('makes no source of "%s", which gives no year', (text) => {
    expect(readCitation(text)).toBeUndefined()
  })
})
