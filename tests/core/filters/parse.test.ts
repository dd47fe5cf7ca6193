import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { COLUMNS } from '../../../core/columns.ts'
import { EMPTY_FILTER, type Condition, type Filter, type Range } from '../../../core/filters/filter.ts'
import { parseFilter } from '../../../core/filters/parse.ts'
import { printFilter } from '../../../core/filters/print.ts'

const parse = (query: string) => parseFilter(new URLSearchParams(query))
const messageOf = (query: string): string => {
  const { errors } = parse(query)
  expect(errors, query).toHaveLength(1)
  return `${errors[0]?.path}: ${errors[0]?.message}`
}

describe('reading a filter', () => {
  it('reads the example of the interface', () => {
    const { filter, errors } = parse(
      'host=ostrel&class=dwarf-spheroidal,dwarf-irregular&distance=2..5&abs_v=..-10&tidal_index=0..&status=confirmed&has=v_hel&sort=-abs_v,name&limit=50&columns=name,dm',
    )
    expect(errors).toEqual([])
    expect(filter).toEqual({
      ...EMPTY_FILTER,
      conditions: {
        host: { kind: 'list', values: ['ostrel'], exclude: false },
        class: { kind: 'list', values: ['dwarf-spheroidal', 'dwarf-irregular'], exclude: false },
        distance: { kind: 'numbers', ranges: [{ lo: 2, hi: 5 }], exclude: false },
        abs_v: { kind: 'numbers', ranges: [{ lo: null, hi: -10 }], exclude: false },
        tidal_index: { kind: 'numbers', ranges: [{ lo: 0, hi: null }], exclude: false },
        status: { kind: 'list', values: ['confirmed'], exclude: false },
      },
      has: ['v_hel'],
      sort: [{ column: 'abs_v', descending: true }, { column: 'name', descending: false }],
      limit: 50,
      columns: ['name', 'dm'],
    })
  })

  it('reads a condition on every column of the registry', () => {
    const example: Record<string, string> = { real: '-1.5..2', integer: '1,3..4', time: '2026-01-01..', text: 'a', choice: 'ostrel' }
    for (const column of COLUMNS) {
      const text = column.choices?.[0] ?? example[column.type] ?? ''
      const { filter, errors } = parse(`${column.key}=!${text}`)
      expect(errors, column.key).toEqual([])
      expect(filter.conditions[column.key]?.exclude).toBe(true)
    }
  })

  it('reads cones, spheres, words, and a number with a true minus', () => {
    const { filter, errors } = parse('cone=360,-41.3,0.5&within=ostrel,300&q=%20NGC%20%20224&abs_v=..%E2%88%9210&at=2026.1')
    expect(errors).toEqual([])
    expect(filter.cone).toEqual({ ra: 0, dec: -41.3, radius: 0.5 })
    expect(filter.within).toEqual({ host: 'ostrel', radius: 300 })
    expect(filter.q).toBe('NGC 224')
    expect(filter.conditions.abs_v).toEqual({ kind: 'numbers', ranges: [{ lo: null, hi: -10 }], exclude: false })
    expect(filter.at).toBe('2026.1')
  })

  it('keeps a comma, a backslash and an exclamation mark inside a name', () => {
    const names = ['Dwarf, the second', '!odd', 'back\\slash']
    const filter: Filter = { ...EMPTY_FILTER, conditions: { name: { kind: 'list', values: names, exclude: false } } }
    expect(parseFilter(printFilter(filter))).toEqual({ filter, errors: [] })
  })
})

describe('what cannot be understood is said in a sentence', () => {
  it.each([
    ['distnace=2..5', 'distnace: There is no column "distnace". Did you mean distance?'],
    ['absV=..-10', 'absV: There is no column "absV". Did you mean abs_v?'],
    ['columns=name,distanc', 'columns: There is no column "distanc". Did you mean distance?'],
    ['sort=-magnitude_of_the_moon', 'sort: There is no column "magnitude_of_the_moon". The columns are listed at /api/docs.'],
    ['__proto__=1', 'There is no column "__proto__"'],
    ['constructor=1', 'There is no column "constructor"'],
    ['distance=5..2', 'distance: The range runs from 5 down to 2. Write the smaller end first: 2..5.'],
    ['ra=350..10', 'For a range through 0 write ra=350..360,0..10'],
    ['distance=near', '"near" is not a number'],
    ['distance=NaN..', '"NaN" is not a number'],
    ['distance=..Infinity', '"Infinity" is not a number'],
    ['distance=1e999..', '"1e999" is not a number'],
    ['distance=0x10', '"0x10" is not a number'],
    ['distance=2..5..8', '"5..8" is not a number'],
    ['distance=..', 'has no end at all'],
    ['distance=', 'Nothing stands after "distance="'],
    ['class=!', 'Nothing stands after "class=!"'],
    ['class=spiral&class=elliptical', 'class: "class" stands 2 times. Write alternatives in one list: class=a,b.'],
    ['limit=5&limit=6', '"limit" stands 2 times. Give it once.'],
    ['class=dwarf-sphroidal', 'class is never "dwarf-sphroidal". Did you mean dwarf-spheroidal?'],
    ['status=gone', 'It is one of confirmed, candidate, withdrawn.'],
    ['class=spiral,,elliptical', 'An entry of the list is empty'],
    [`name=${Array.from({ length: 201 }, (_, i) => i).join(',')}`, 'The list has 201 entries; at most 200 are possible.'],
    [`name=${'x'.repeat(201)}`, 'longer than 200 characters'],
    ['host=Ostrel%20B', 'no identifier of a galaxy'],
    ['updated_at=2026-02-30..', '"2026-02-30" is not a day'],
    ['updated_at=2026-03-02..2026-03-01', 'runs from 2026-03-02 down to 2026-03-01'],
    ['cone=1,2', 'cone: A cone is three numbers'],
    ['cone=1,2,3,4', 'cone: A cone is three numbers'],
    ['cone=1,-91,1', 'not -91'],
    ['cone=361,0,1', 'not 361'],
    ['cone=1,2,0', 'above 0 and at most 180'],
    ['within=ostrel', 'within: A sphere is a galaxy and a radius'],
    ['within=ostrel,-3', 'above 0'],
    ['limit=0', '1 to 500 rows'],
    ['limit=501', '1 to 500 rows'],
    ['limit=ten', '1 to 500 rows'],
    ['sort=name,-name', 'name stands twice'],
    ['cursor=%27;--', 'no cursor of ours'],
    ['at=a%20b', 'a revision number or the label of a release'],
    ['q=!!!', 'no letter and no digit'],
    ['has=v_hel&lacks=v_hel', 'nothing could match'],
  ])('%s', (query, message) => {
    expect(messageOf(query)).toContain(message)
  })

  it('names every parameter that is wrong, and keeps what was right', () => {
    const { filter, errors } = parse('distnace=2..5&limit=0&class=spiral')
    expect(errors.map((e) => e.path)).toEqual(['distnace', 'limit'])
    expect(Object.keys(filter.conditions)).toEqual(['class'])
  })

  it('answers to anything without throwing', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(fc.constantFrom(...COLUMNS.map((c) => c.key), 'cone', 'q', 'x', 'sort', 'within', 'cursor'), fc.string())), (pairs) => {
        for (const { path, message } of parseFilter(new URLSearchParams(pairs)).errors) {
          expect(path).not.toBe('')
          expect(message).toMatch(/\.$|\?$/)
        }
      }),
    )
  })
})

const orNull = <Value>(arbitrary: fc.Arbitrary<Value>) => fc.option(arbitrary, { nil: null })
const number = fc.double({ noNaN: true, noDefaultInfinity: true }).map((n) => n + 0)
const slug = fc.stringMatching(/^[a-z0-9]{1,8}(-[a-z0-9]{1,4})?$/)
const day = fc.date({ min: new Date('0001-01-01T00:00:00Z'), max: new Date('9999-12-31T00:00:00Z'), noInvalidDate: true }).map((d) => d.toISOString())
const time = fc.oneof(day.map((d) => d.slice(0, 10)), day.map((d) => `${d.slice(0, 19)}Z`))

function range<Bound>(bound: fc.Arbitrary<Bound>, rises: (lo: Bound, hi: Bound) => boolean): fc.Arbitrary<Range<Bound>> {
  return fc
    .record({ lo: orNull(bound), hi: orNull(bound) })
    .filter(({ lo, hi }) => (lo !== null || hi !== null) && (lo === null || hi === null || rises(lo, hi)))
}

const uniqueRanges = <Bound>(of: fc.Arbitrary<Range<Bound>>) => fc.uniqueArray(of, { minLength: 1, maxLength: 3, selector: (r) => JSON.stringify(r) })

function conditionOn(key: string): fc.Arbitrary<Condition> {
  const column = COLUMNS.find((c) => c.key === key)
  const exclude = fc.boolean()
  if (column?.type === 'real' || column?.type === 'integer') {
    return fc.record({ kind: fc.constant('numbers' as const), ranges: uniqueRanges(range(number, (lo, hi) => lo <= hi)), exclude })
  }
  if (column?.type === 'time') {
    return fc.record({ kind: fc.constant('times' as const), ranges: uniqueRanges(range(time, (lo, hi) => lo.slice(0, 10) < hi.slice(0, 10))), exclude })
  }
  const value = column?.choices ? fc.constantFrom(...column.choices) : column?.type === 'choice' ? slug : fc.string({ minLength: 1, maxLength: 20 }).map((s) => s.trim()).filter((s) => s !== '')
  return fc.record({ kind: fc.constant('list' as const), values: fc.uniqueArray(value, { minLength: 1, maxLength: 4 }), exclude })
}

const keys = COLUMNS.map((c) => c.key)
const filters: fc.Arbitrary<Filter> = fc
  .record({
    conditions: fc.uniqueArray(fc.constantFrom(...keys), { maxLength: 5 }).chain((chosen) => fc.record(Object.fromEntries(chosen.map((key) => [key, conditionOn(key)])))),
    presence: fc.uniqueArray(fc.constantFrom(...keys), { maxLength: 4 }),
    q: orNull(fc.stringMatching(/^[a-z0-9]{1,9}( [a-z0-9]{1,9})?$/)),
    cone: orNull(fc.record({ ra: fc.double({ min: 0, max: 359.999, noNaN: true }), dec: fc.double({ min: -90, max: 90, noNaN: true }).map((d) => d + 0), radius: fc.double({ min: 1e-6, max: 180, noNaN: true }) })),
    within: orNull(fc.record({ host: slug, radius: fc.double({ min: 1e-3, max: 1e6, noNaN: true }) })),
    columns: orNull(fc.uniqueArray(fc.constantFrom(...keys), { minLength: 1, maxLength: 6 })),
    sort: fc.uniqueArray(fc.record({ column: fc.constantFrom(...keys), descending: fc.boolean() }), { maxLength: 4, selector: (k) => k.column }),
    limit: orNull(fc.integer({ min: 1, max: 500 })),
    cursor: orNull(fc.stringMatching(/^[A-Za-z0-9_-]{1,20}$/)),
    at: orNull(fc.stringMatching(/^[0-9A-Za-z][0-9A-Za-z.-]{0,9}$/)),
  })
  .map(({ presence, ...rest }) => ({ ...rest, has: presence.slice(0, 2), lacks: presence.slice(2) }))

describe('printing a filter', () => {
  it('gives back every filter that can be held', () => {
    fc.assert(
      fc.property(filters, (filter) => {
        const again = parseFilter(new URLSearchParams(printFilter(filter).toString()))
        expect(again.errors).toEqual([])
        expect(again.filter).toEqual(filter)
      }),
      { numRuns: 500 },
    )
  })

  it('is one spelling, whatever the order in which it was typed', () => {
    const one = printFilter(parse('sort=name&distance=2..5.0&class=spiral').filter).toString()
    const other = printFilter(parse('class=spiral&distance=%202..5&sort=name').filter).toString()
    expect(one).toBe(other)
  })
})
