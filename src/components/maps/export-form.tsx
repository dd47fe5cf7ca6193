import { DPI, FIGURE_THEMES, WIDTH_MM, type FigureRecipe } from '../../../core/figure/recipe.ts'
import { FIGURE_FORMATS, type FigureFormat } from '../../../core/schema/figures.ts'
import { Checkbox } from '../checkbox.tsx'
import { NumberField } from '../number-field.tsx'
import { RadioGroup } from '../radio-group.tsx'
import { TextArea } from '../text-area.tsx'
import { TextField } from '../text-field.tsx'

export interface ExportFormProps {
  recipe: FigureRecipe
  onChange: (recipe: FigureRecipe) => void
  format: FigureFormat
  onFormat: (format: FigureFormat) => void
  /** The automatic title, which an empty one stands for. */
  suggestedTitle: string
  releaseLabel: string
  /** What the server could not take, by part of the recipe. */
  errorOf: (part: string) => string | undefined
}

const FORMAT_WORDS: Readonly<Record<FigureFormat, string>> = { svg: 'SVG', pdf: 'PDF', png: 'PNG' }
const THEME_WORDS = { paper: 'Paper', night: 'Night', print: 'Print, on white' } as const
/** One and two columns of a journal. */
const WIDTHS = [88, 180] as const

/** Size, words and look of a figure that leaves the site. */
export function ExportForm({ recipe, onChange, format, onFormat, suggestedTitle, releaseLabel, errorOf }: ExportFormProps) {
  const change = (part: Partial<FigureRecipe>): void => onChange({ ...recipe, ...part })
  const preset = WIDTHS.find((width) => width === recipe.widthMm)
  return (
    <div className="grid gap-4">
      <RadioGroup look="chips" label="Format" value={format} options={FIGURE_FORMATS.map((id) => ({ id, label: FORMAT_WORDS[id] }))} onChange={onFormat} />
      <div className="grid gap-2">
        <RadioGroup look="chips" label="Width" value={preset ? String(preset) : null} options={WIDTHS.map((width) => ({ id: String(width), label: `${width} mm` }))} onChange={(width) => change({ widthMm: Number(width) })} />
        <NumberField label="Width in mm" hideLabel unit="mm" value={recipe.widthMm} min={WIDTH_MM.least} max={WIDTH_MM.most} decimals={1} onChange={(widthMm) => change({ widthMm: widthMm ?? 180 })} error={errorOf('widthMm')} />
      </div>
      {format === 'png' && <NumberField label="Resolution" unit="dpi" value={recipe.dpi} min={DPI.least} max={DPI.most} step={50} decimals={0} onChange={(dpi) => change({ dpi: dpi ?? 300 })} error={errorOf('dpi')} />}
      <RadioGroup look="chips" label="Theme" value={recipe.theme} options={FIGURE_THEMES.map((id) => ({ id, label: THEME_WORDS[id] }))} onChange={(theme) => change({ theme })} />
      <TextField label="Title" value={recipe.title} placeholder={suggestedTitle} onChange={(title) => change({ title: title.slice(0, 160) })} error={errorOf('title')} />
      <TextArea label="Caption" rows={3} value={recipe.caption} onChange={(caption) => change({ caption: caption.slice(0, 1200) })} error={errorOf('caption')} />
      <TextField label="Credit line" value={recipe.credit} onChange={(credit) => change({ credit: credit.slice(0, 240) })} help={`After it stands: Vicinage, ${releaseLabel}`} error={errorOf('credit')} />
      <div>
        <Checkbox isSelected={recipe.heading} onChange={(heading) => change({ heading })}>Title in the picture</Checkbox>
        <Checkbox isSelected={recipe.legend} onChange={(legend) => change({ legend })}>Legend</Checkbox>
      </div>
    </div>
  )
}
