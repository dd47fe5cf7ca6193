import { Label, Meter as AriaMeter, ProgressBar } from 'react-aria-components'

export interface MeterProps {
  label: string
  value: number
  min?: number
  max?: number
  /** Instead of the percentage: "3 of 12 rows". */
  text?: string
}

function Bar({ percentage }: { percentage: number | undefined }) {
  return (
    <div className="mt-1 h-1.5 overflow-hidden rounded-full bg-line">
      <div
        className={percentage === undefined ? 'h-full w-1/3 animate-pulse rounded-full bg-ink' : 'h-full rounded-full bg-ink transition-[width] duration-200'}
        style={percentage === undefined ? undefined : { width: `${percentage}%` }}
      />
    </div>
  )
}

/** How much of a whole: a share, a completeness. */
export function Meter({ label, text, min, max, value }: MeterProps) {
  return (
    <AriaMeter value={value} minValue={min} maxValue={max} valueLabel={text}>
      {({ percentage, valueText }) => (
        <>
          <div className="flex justify-between gap-4">
            <Label>{label}</Label>
            <span className="figures text-muted">{valueText}</span>
          </div>
          <Bar percentage={percentage} />
        </>
      )}
    </AriaMeter>
  )
}

export interface ProgressProps extends Omit<MeterProps, 'value'> {
  /** Without one: at work, and nobody knows how long. */
  value?: number
}

/** How far a piece of work has come. */
export function Progress({ label, text, min, max, value }: ProgressProps) {
  return (
    <ProgressBar value={value} minValue={min} maxValue={max} valueLabel={text} isIndeterminate={value === undefined}>
      {({ percentage, valueText }) => (
        <>
          <div className="flex justify-between gap-4">
            <Label>{label}</Label>
            <span className="figures text-muted">{valueText}</span>
          </div>
          <Bar percentage={percentage} />
        </>
      )}
    </ProgressBar>
  )
}
