import { Copy } from 'lucide-react'
import { classNames } from '../lib/class-names.ts'
import { copyText } from '../lib/clipboard.ts'
import { NBSP } from '../lib/format.ts'
import { declinationParts, rightAscensionParts } from '../lib/sexagesimal.ts'
import { IconButton } from './icon-button.tsx'
import { Missing } from './measure.tsx'

export interface SkyCoordinateProps {
  /** ICRS, degrees. */
  ra: number | null | undefined
  dec: number | null | undefined
  /** With a button that copies the decimal degrees; true unless said otherwise. */
  copy?: boolean
  className?: string
}

const DECIMALS_COPIED = 6

/** An ICRS position, `11h 42m 07.3s +23° 15′ 41″`; copies as decimal degrees, ready to paste elsewhere. */
export function SkyCoordinate({ ra, dec, copy = true, className }: SkyCoordinateProps) {
  if (ra == null || dec == null) return <Missing />
  const alpha = rightAscensionParts(ra)
  const delta = declinationParts(dec)
  const spoken = `right ascension ${alpha.units} hours ${alpha.minutes} minutes ${alpha.seconds} seconds, declination ${delta.sign === '+' ? 'plus' : 'minus'} ${delta.units} degrees ${delta.minutes} minutes ${delta.seconds} seconds`
  return (
    <span className={classNames('inline-flex flex-wrap items-center gap-x-2 figures', className)}>
      <span className="sr-only">{spoken}</span>
      <span aria-hidden className="whitespace-nowrap">
        {alpha.units}
        <sup>h</sup>
        <span className="ml-1">{alpha.minutes}</span>
        <sup>m</sup>
        <span className="ml-1">{alpha.seconds}</span>
        <sup>s</sup>
      </span>
      <span aria-hidden className="whitespace-nowrap">{`${delta.sign}${delta.units}°${NBSP}${delta.minutes}′${NBSP}${delta.seconds}″`}</span>
      {copy && (
        <IconButton
          label="Copy as decimal degrees, ICRS"
          size="small"
          icon={<Copy size={14} aria-hidden />}
          onPress={() => void copyText(`${ra.toFixed(DECIMALS_COPIED)} ${dec.toFixed(DECIMALS_COPIED)}`, 'the position in degrees')}
        />
      )}
    </span>
  )
}
