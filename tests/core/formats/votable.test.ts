import { XMLParser, XMLValidator } from 'fast-xml-parser'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { COLUMNS, columnOf, type Column } from '../../../core/columns.ts'
import { votableWriter, xmlText } from '../../../core/formats/votable.ts'

const notes = { revision: 12, release: '2026.1', filter: 'Satellites of Ostrel, distance 2 to 5 Mpc', query: 'host=ostrel&distance=2..5' }

describe('VOTable', () => {
  it('is well-formed with every column, and says what it holds', () => {
    const writer = votableWriter(COLUMNS, notes)
    const text = writer.begin() + writer.row(COLUMNS.map(() => null)) + writer.end()
    expect(XMLValidator.validate(text)).toBe(true)
    const document = new XMLParser({ ignoreAttributes: false, attributeNamePrefix: '' }).parse(text) as {
      VOTABLE: { version: string; RESOURCE: { INFO: { name: string; value: string }[]; TABLE: { FIELD: { ID: string; ref?: string }[]; DATA: { TABLEDATA: { TR: { TD: string[] } } } } } }
    }
    const { version, RESOURCE } = document.VOTABLE
    expect(version).toBe('1.4')
    expect(Object.fromEntries(RESOURCE.INFO.map((i) => [i.name, i.value]))).toEqual({
      QUERY_STATUS: 'OK', revision: '12', release: '2026.1', filter: notes.filter, query: 'host=ostrel&distance=2..5',
    })
    expect(RESOURCE.TABLE.FIELD.map((f) => f.ID)).toEqual(COLUMNS.map((c) => c.key))
    expect(RESOURCE.TABLE.FIELD.filter((f) => f.ref === 'icrs').map((f) => f.ID)).toEqual(['ra', 'dec'])
    expect(RESOURCE.TABLE.DATA.TABLEDATA.TR.TD.every((cell) => cell === '')).toBe(true)
  })

  it('has no frame where it has no coordinates', () => {
    expect(votableWriter([columnOf('name') as Column], notes).begin()).not.toContain('COOSYS')
  })

  it('writes any text so that XML can hold it', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.string(), (binary, plain) => {
        const text = `${binary}${plain}\u0000\ud800]]><&"`
        const safe = xmlText(text)
        expect(XMLValidator.validate(`<a b="${safe}">${safe}</a>`)).toBe(true)
        expect(safe).not.toMatch(/[\u0000-\u0008\u000b\u000c\u000e-\u001f]/)
        // Throws where half of a surrogate pair is left.
        expect(encodeURIComponent(safe)).not.toBe('')
      }),
    )
  })
})
