import { Copy } from 'lucide-react'
import { formatDeclination, formatRightAscension } from '../../core/astro/position-format.ts'
import { classNames } from '../lib/class-names.ts'
import { copyText } from '../lib/clipboard.ts'
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
const RAISED: Record<string, string> = { ʰ: 'h', ᵐ: 'm', ˢ: 's' }
const SPOKEN: Record<string, string> = { ʰ: ' hours', ᵐ: ' minutes', ˢ: ' seconds', '°': ' degrees', '′': ' minutes', '″': ' seconds', '\u2212': 'minus ', '+': 'plus ' }

const say = (text: string): string => text.replace(/[ʰᵐˢ°′″\u2212+]/g, (sign) => SPOKEN[sign] ?? sign)

/** An ICRS position, `11h 42m 07.3s +23° 15′ 41″`; copies as decimal degrees, ready to paste elsewhere. */
export function SkyCoordinate({ ra, dec, copy = true, className }: SkyCoordinateProps) {
  if (ra == null || dec == null) return <Missing />
  const alpha = formatRightAscension(ra)
  const delta = formatDeclination(dec)
  return (
    <span className={classNames('inline-flex flex-wrap items-center gap-x-2 figures', className)}>
      <span className="sr-only">{`right ascension ${say(alpha)}, declination ${say(delta)}`}</span>
      <span aria-hidden className="whitespace-nowrap">
        {[...alpha].map((sign, index) => (RAISED[sign] ? <sup key={index}>{RAISED[sign]}</sup> : sign))}
      </span>
      <span aria-hidden className="whitespace-nowrap">
        {delta}
      </span>
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
