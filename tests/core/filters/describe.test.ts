import { describe, expect, it } from 'vitest'
import { describeFilter, filterChips } from '../../../core/filters/describe.ts'
import { choosing, chosenRange, chosenValues, EMPTY_FILTER, ranging } from '../../../core/filters/filter.ts'
import { nearestName } from '../../../core/filters/nearest.ts'
import { parseFilter } from '../../../core/filters/parse.ts'
import { printFilter } from '../../../core/filters/print.ts'

const labels = { ostrel: 'Ostrel', mirrow: 'Mirrow' }
const plain = (text: string): string => text.replace(/\u00a0/g, ' ')

function filterOf(query: string) {
  const { filter, errors } = parseFilter(new URLSearchParams(query))
  expect(errors).toEqual([])
  return filter
}

describe('a filter as a sentence', () => {
  it.each([
    ['', 'Galaxies'],
    ['host=ostrel,mirrow&distance=2..5&abs_v=..-10', 'Satellites of Ostrel or Mirrow, distance 2 to 5 Mpc, M_V brighter than −10'],
    ['status=confirmed&host_relation=field&class=dwarf-spheroidal,ultra-faint', 'Confirmed galaxies in the field, class dwarf spheroidal or ultra-faint'],
    ['host_relation=host&log_mstar=9..', 'Hosts, log stellar mass at least 9'],
    ['host=!ostrel&glat=!-10..10', 'Galaxies, Galactic latitude not −10 to 10°, host not Ostrel'],
    ['has=v_hel&lacks=hi_flux', 'Galaxies, with heliocentric velocity, without H I flux'],
    ['cone=10.68,41.27,2&within=ostrel,300', 'Galaxies, within 2° of RA 10.68°, Dec +41.27°, within 300 kpc of Ostrel'],
    ['q=NGC&abs_b=-12..&n_distance=3', 'Galaxies, distance measurements used 3, M_B fainter than −12, a name like “NGC”'],
    ['updated_at=2026-01-01..&distance=..1,4..', 'Galaxies, distance at most 1 Mpc or at least 4 Mpc, last changed since 2026-01-01'],
    ['distance_method=trgb', 'Galaxies, distance method TRGB'],
  ])('%s', (query, sentence) => {
    expect(plain(describeFilter(filterOf(query), labels))).toBe(sentence)
  })
})

describe('a filter as chips', () => {
  const query = 'host=ostrel,mirrow&class=!spiral&distance=2..5&has=v_hel&q=dw&cone=10,20,1&within=ostrel,300&cursor=abc'
  const chips = filterChips(filterOf(query), labels)

  it('has one a value, and one a condition of another kind', () => {
    expect(chips.map((chip) => plain(chip.label))).toEqual([
      'not spiral', 'distance 2 to 5 Mpc', 'Ostrel', 'Mirrow', 'with heliocentric velocity', '“dw”', 'within 1° of RA 10°, Dec +20°', 'within 300 kpc of Ostrel',
    ])
    expect(new Set(chips.map((chip) => chip.key)).size).toBe(chips.length)
  })

  it('takes away its own condition only, and begins again at the first page', () => {
    const without = Object.fromEntries(chips.map((chip) => [plain(chip.label), printFilter(chip.without).toString()]))
    expect(without.Ostrel).toContain('host=mirrow')
    expect(without['distance 2 to 5 Mpc']).not.toContain('distance')
    for (const text of Object.values(without)) expect(text).not.toContain('cursor')
  })

  it('ends at an empty filter when all are taken away', () => {
    let filter = filterOf(query)
    for (let chip = filterChips(filter)[0]; chip; chip = filterChips(filter)[0]) filter = chip.without
    expect(filter).toEqual(EMPTY_FILTER)
  })
})

describe('setting conditions', () => {
  it('chooses values and ranges, and lets go of them', () => {
    const chosen = ranging(choosing(EMPTY_FILTER, 'class', ['spiral']), 'distance', { lo: 1, hi: null })
    expect(printFilter(chosen).toString()).toBe('class=spiral&distance=1..')
    expect(chosenValues(chosen, 'class')).toEqual(['spiral'])
    expect(chosenRange(chosen, 'distance')).toEqual({ lo: 1, hi: null })
    expect(ranging(choosing(chosen, 'class', []), 'distance', { lo: null, hi: null })).toEqual(EMPTY_FILTER)
  })
})

describe('the nearest known name', () => {
  it.each([['distnace', 'distance'], ['Distance', 'distance'], ['absv', 'abs_v'], ['dist', 'distance'], ['vhel', 'v_hel'], ['xyzzy', undefined], ['', undefined]])('%s', (typed, meant) => {
    expect(nearestName(typed, ['name', 'distance', 'distance_lo', 'abs_v', 'v_hel'])).toBe(meant)
  })
})
