/**
 * VOTable 1.4, TABLEDATA serialisation.
 *
 * @see IVOA Recommendation VOTable 1.4 (2019-10-21); units VOUnits 1.0, UCDs UCD1+, QUERY_STATUS by DALI 1.1
 */
import type { CatalogueValue, Column } from '../columns.ts'
import type { TableNotes, TableWriter } from './table-writer.ts'

const FRAME_ID = 'icrs'
/** Columns of the registry that are coordinates of that frame. */
const IN_FRAME: ReadonlySet<string> = new Set(['ra', 'dec'])
/** Text columns that may hold letters beyond ASCII: `char` has none. */
const BEYOND_ASCII: ReadonlySet<string> = new Set(['name', 'morphology'])

/** What XML 1.0 cannot hold in any spelling: control characters, halves of surrogate pairs, U+FFFE and U+FFFF. */
const UNSPEAKABLE = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/g
const ENTITIES: Readonly<Record<string, string>> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', '\r': '&#13;' }

/** Text for an element or an attribute. */
export function xmlText(text: string): string {
  return text.replace(UNSPEAKABLE, '\ufffd').replace(/[&<>"\r]/g, (letter) => ENTITIES[letter] ?? letter)
}

export function votableWriter(columns: readonly Column[], notes: TableNotes): TableWriter {
  return {
    mediaType: 'application/x-votable+xml; charset=utf-8; serialization=tabledata',
    begin: () => head(columns, notes),
    row: (values) => `<TR>${columns.map((column, i) => cell(values[i], column)).join('')}</TR>\n`,
    end: () => '</TABLEDATA></DATA>\n</TABLE>\n</RESOURCE>\n</VOTABLE>\n',
  }
}

function head(columns: readonly Column[], notes: TableNotes): string {
  const frame = columns.some((column) => IN_FRAME.has(column.key)) ? `<COOSYS ID="${FRAME_ID}" system="ICRS"/>\n` : ''
  const release = notes.release === null ? '' : info('release', notes.release, 'Release that the revision was read by')
  return `<?xml version="1.0" encoding="UTF-8"?>
<VOTABLE version="1.4" xmlns="http://www.ivoa.net/xml/VOTable/v1.3" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance" xsi:schemaLocation="http://www.ivoa.net/xml/VOTable/v1.3 http://www.ivoa.net/xml/VOTable/v1.3">
<RESOURCE type="results" name="vicinage">
<DESCRIPTION>${xmlText(`${notes.filter}, at revision ${notes.revision} of the catalogue.`)}</DESCRIPTION>
<INFO name="QUERY_STATUS" value="OK"/>
${info('revision', String(notes.revision), 'Revision of the catalogue')}${release}${info('filter', notes.filter, 'What the filter lets through')}${info('query', notes.query, 'The filter as query parameters')}${frame}<TABLE name="galaxies">
${columns.map(field).join('')}<DATA><TABLEDATA>
`
}

function info(name: string, value: string, description: string): string {
  return `<INFO name="${name}" value="${xmlText(value)}">${xmlText(description)}</INFO>\n`
}

function field(column: Column): string {
  const attributes = [
    `name="${column.key}"`, `ID="${column.key}"`, datatype(column),
    column.unit === '' ? '' : `unit="${xmlText(column.unit)}"`,
    column.ucd === '' ? '' : `ucd="${xmlText(column.ucd)}"`,
    IN_FRAME.has(column.key) ? `ref="${FRAME_ID}"` : '',
  ]
  return `<FIELD ${attributes.filter((a) => a !== '').join(' ')}><DESCRIPTION>${xmlText(column.description)}</DESCRIPTION></FIELD>\n`
}

function datatype(column: Column): string {
  if (column.type === 'real') return 'datatype="double"'
  if (column.type === 'integer') return 'datatype="int"'
  if (column.type === 'time') return 'datatype="char" arraysize="*" xtype="timestamp"'
  return `datatype="${BEYOND_ASCII.has(column.key) ? 'unicodeChar' : 'char'}" arraysize="*"`
}

/** A missing value is an empty cell, for numbers of either kind too. */
function cell(value: CatalogueValue | undefined, column: Column): string {
  if (value === null || value === undefined || value === '') return '<TD/>'
  if (typeof value === 'number') return Number.isFinite(value) ? `<TD>${value}</TD>` : '<TD/>'
  return `<TD>${xmlText(column.type === 'time' ? value.replace('Z', '') : value)}</TD>`
}
