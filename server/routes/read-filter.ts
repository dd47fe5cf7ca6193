/** The filter of a request. */
import type { Request } from 'express'
import type { Filter } from '../../core/filters/filter.ts'
import { parseFilter } from '../../core/filters/parse.ts'
import { BadInput } from '../http/errors.ts'
import { searchParams } from '../http/route.ts'

/** @throws BadInput naming every parameter that cannot be understood */
export function readFilter(request: Request): Filter {
  const { filter, errors } = parseFilter(searchParams(request))
  if (errors.length === 0) return filter
  const [first] = errors
  const detail = errors.length === 1 && first ? first.message : `${errors.length} parts of the filter cannot be understood.`
  throw new BadInput(detail, errors)
}
