/** Programs of other people that judge our files. */
import { execFile } from 'node:child_process'
import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'

const run = promisify(execFile)
const PYTHON = '/usr/bin/python3'
const LARGEST_OUTPUT = 64 * 1024 * 1024

async function inFile<Result>(name: string, bytes: Uint8Array | string, use: (path: string) => Promise<Result>): Promise<Result> {
  const folder = await mkdtemp(join(tmpdir(), 'vicinage-judge-'))
  try {
    const path = join(folder, name)
    await writeFile(path, bytes)
    return await use(path)
  } finally {
    await rm(folder, { recursive: true, force: true })
  }
}

/** What `stilts votlint` finds wrong, line by line; empty when nothing. (Its exit status is 0 either way.) */
export function votlint(bytes: Uint8Array | string): Promise<string[]> {
  return inFile('table.vot', bytes, async (path) => {
    const { stdout, stderr } = await run('stilts', ['votlint', 'ucd=true', 'unit=true', path], { maxBuffer: LARGEST_OUTPUT })
    return `${stdout}\n${stderr}`.split('\n').filter((line) => line.trim() !== '')
  })
}

export interface AstropyTable {
  warnings: string[]
  fields: { name: string; unit: string | null; ucd: string | null; datatype: string; ref: string | null }[]
  infos: Record<string, string>
  coosys: string[]
  /** Columns of values; null where masked, and for a number that is none. */
  columns: Record<string, (string | number | null)[]>
}

const READ_VOTABLE = `
import json, math, sys, warnings
from astropy.io.votable import parse
with warnings.catch_warnings(record=True) as seen:
    warnings.simplefilter('always')
    document = parse(sys.argv[1], verify='warn')
    resource = document.resources[0]
    table = resource.tables[0]
    array = table.array
    astropy_table = table.to_table()
def plain(value, masked):
    if masked: return None
    if hasattr(value, 'item'): value = value.item()
    if isinstance(value, float) and math.isnan(value): return None
    return value
columns = {}
for field in table.fields:
    column, mask = array[field.ID].data, array[field.ID].mask
    columns[field.ID] = [plain(v, bool(m)) for v, m in zip(column, mask)]
print(json.dumps({
    'warnings': [str(w.message) for w in seen],
    'fields': [{'name': f.name, 'unit': None if astropy_table[f.ID].unit is None else astropy_table[f.ID].unit.to_string('vounit'), 'ucd': f.ucd, 'datatype': f.datatype, 'ref': f.ref} for f in table.fields],
    'infos': {i.name: i.value for i in resource.infos},
    'coosys': [c.system for c in resource.coordinate_systems],
    'columns': columns,
}))
`

/** The table as astropy reads it, with everything that it warns of. */
export function astropyTable(bytes: Uint8Array | string): Promise<AstropyTable> {
  return inFile('table.vot', bytes, async (path) => {
    const { stdout } = await run(PYTHON, ['-c', READ_VOTABLE, path], { maxBuffer: LARGEST_OUTPUT })
    return JSON.parse(stdout) as AstropyTable
  })
}

const CHECK_UCDS = `
import json, sys
from astropy.io.votable.ucd import parse_ucd
from astropy import units
wrong = []
for key, ucd, unit in json.loads(sys.argv[1]):
    try:
        parse_ucd(ucd, check_controlled_vocabulary=True, has_colon=False)
    except ValueError as error:
        wrong.append(key + ': ' + str(error))
    try:
        units.Unit(unit, format='vounit', parse_strict='raise')
    except ValueError as error:
        wrong.append(key + ': ' + str(error))
print(json.dumps(wrong))
`

/** What is wrong with the UCDs and units of columns, by astropy's copies of the standards' word lists. */
export async function wrongWords(columns: readonly { key: string; ucd: string; unit: string }[]): Promise<string[]> {
  const { stdout } = await run(PYTHON, ['-c', CHECK_UCDS, JSON.stringify(columns.map((c) => [c.key, c.ucd, c.unit]))])
  return JSON.parse(stdout) as string[]
}
