import { GAP } from '../../core/spaces.ts'
import { formatMeasure, formatNumber, MISSING, unitText, type MeasureParts } from '../lib/format.ts'
import { classNames } from '../lib/class-names.ts'
import { Unit } from './unit.tsx'

export interface MeasureProps extends MeasureParts {
  /** `large`: the adopted value at the head of a sheet. */
  size?: 'text' | 'large'
  /** Errors raised and lowered even where they are equal. Unequal ones always are. */
  stacked?: boolean
  className?: string
}

/** What stands where a value is missing: an em dash to look at, a word to listen to. */
export function Missing() {
  return (
    <>
      <span aria-hidden className="text-muted">
        {MISSING}
      </span>
      <span className="sr-only">no value</span>
    </>
  )
}

function spoken({ value, plus, minus, unit, decimals }: MeasureParts): string {
  return formatMeasure({ value, plus, minus, unit, decimals }).replace('±', ' plus or minus ').replace('+', ' plus ').replace(/(?<=\S)\s−/, ' minus ')
}

/** A value with its errors and unit: `3.61 +0.09 −0.08 Mpc`, raised and lowered, or `27.77 ± 0.05 mag`. */
export function Measure({ value, plus, minus, unit, decimals = 2, size = 'text', stacked = false, className }: MeasureProps) {
  if (value == null || !Number.isFinite(value)) return <Missing />
  const shownUnit = unit ? unitText(unit) : undefined
  const up = plus ?? minus
  const down = minus ?? plus
  const above = up == null ? null : formatNumber(up, decimals)
  const below = down == null ? null : formatNumber(down, decimals)
  const hasErrors = above !== null && below !== null
  const apart = hasErrors && (stacked || above !== below)
  const large = size === 'large'
  return (
    <span className={classNames('inline-flex items-center whitespace-nowrap figures', large && 'font-serif', className)}>
      <span className="sr-only">{spoken({ value, plus, minus, unit: shownUnit, decimals })}</span>
      <span aria-hidden className={large ? 'text-2xl' : undefined}>
        {formatNumber(value, decimals)}
      </span>
      {hasErrors && !apart && <span aria-hidden className={large ? 'ml-1.5 text-lg text-muted' : 'ml-1'}>{`±${GAP}${above}`}</span>}
      {apart && (
        <span aria-hidden className={classNames('ml-1 inline-flex flex-col text-muted', large ? 'text-base leading-[1.1]' : 'text-[0.75em] leading-[1.12]')}>
          <span>+{above}</span>
          <span>−{below}</span>
        </span>
      )}
      {shownUnit && (
        <span aria-hidden className={classNames('ml-1 text-muted', large && 'text-lg')}>
          <Unit unit={shownUnit} />
        </span>
      )}
    </span>
  )
}
