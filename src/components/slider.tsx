import { Label, Slider, SliderOutput, SliderThumb, SliderTrack } from 'react-aria-components'
import { GAP } from '../../core/spaces.ts'
import { formatNumber } from '../lib/format.ts'

export interface RangeSliderProps {
  label: string
  value: readonly [number, number]
  onChange: (value: [number, number]) => void
  /** When the thumb is let go: for what is costly. */
  onChangeEnd?: (value: [number, number]) => void
  min: number
  max: number
  step?: number
  unit?: string
  decimals?: number
}

const pair = (values: number | number[]): [number, number] => (typeof values === 'number' ? [values, values] : [values[0] ?? 0, values[1] ?? 0])

/** A range between two thumbs, as the atlas's distances. */
export function RangeSlider({ label, value, onChange, onChangeEnd, min, max, step = 0.1, unit, decimals = 1 }: RangeSliderProps) {
  const span = max - min || 1
  const at = (v: number): number => (100 * (Math.min(max, Math.max(min, v)) - min)) / span
  return (
    <Slider value={[...value]} onChange={(next) => onChange(pair(next))} onChangeEnd={onChangeEnd && ((next) => onChangeEnd(pair(next)))} minValue={min} maxValue={max} step={step}>
      <div className="flex justify-between text-sm text-muted">
        <Label>{unit ? `${label} / ${unit}` : label}</Label>
        <SliderOutput className="figures text-ink">{`${formatNumber(value[0], decimals)}${GAP}to${GAP}${formatNumber(value[1], decimals)}`}</SliderOutput>
      </div>
      <SliderTrack className="relative mx-2 h-8">
        <div aria-hidden className="absolute top-1/2 h-1 w-full -translate-y-1/2 rounded-full bg-line" />
        <div aria-hidden className="absolute top-1/2 h-1 -translate-y-1/2 rounded-full bg-ink" style={{ left: `${at(value[0])}%`, width: `${at(value[1]) - at(value[0])}%` }} />
        {[0, 1].map((index) => (
          <SliderThumb
            key={index}
            index={index}
            aria-label={index === 0 ? `${label}, from` : `${label}, to`}
            className="top-1/2 size-4 cursor-grab rounded-full border-2 border-ink bg-sheet before:absolute before:-inset-2 before:content-[''] data-dragging:bg-ink"
          />
        ))}
      </SliderTrack>
    </Slider>
  )
}
