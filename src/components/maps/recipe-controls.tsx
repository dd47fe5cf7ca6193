import { ChevronRight } from 'lucide-react'
import type { ReactNode } from 'react'
import { FRAMES } from '../../../core/astro/frames.ts'
import { PLANE_AXES, PROJECTIONS, USUAL_CENTRE_DEG, type FigureRecipe, type PlaneAxes } from '../../../core/figure/recipe.ts'
import { Checkbox } from '../checkbox.tsx'
import { NumberField } from '../number-field.tsx'
import { RadioGroup } from '../radio-group.tsx'
import { Select } from '../select.tsx'

export interface RecipeControlsProps {
  recipe: FigureRecipe
  onChange: (recipe: FigureRecipe) => void
  /** Which section is drawn; false where all are shown side by side. */
  withAxes?: boolean
  /** Between what is changed often and what is folded away. */
  children?: ReactNode
}

const PROJECTION_WORDS = { hammer: 'Hammer', aitoff: 'Aitoff', mollweide: 'Mollweide' } as const
export const AXES_WORDS: Readonly<Record<PlaneAxes, string>> = { 'sgx-sgy': 'SGX–SGY', 'sgx-sgz': 'SGX–SGZ', 'sgy-sgz': 'SGY–SGZ' }
const LABEL_COUNTS = { none: 0, few: 12, some: 24, many: 90 } as const
type LabelChoice = keyof typeof LABEL_COUNTS
const RADII = ['0.5', '1.5', '4', '11'] as const

/** How a map is drawn: everything of a recipe that changes the map itself; what is seldom changed is folded away. */
export function RecipeControls({ recipe, onChange, withAxes = true, children }: RecipeControlsProps) {
  const isSky = recipe.view === 'sky'
  return (
    <div className="grid gap-4">
      {isSky ? <FrameControl recipe={recipe} onChange={onChange} /> : <PlaceControls recipe={recipe} onChange={onChange} withAxes={withAxes} />}
      {children}
      <details className="group">
        <summary className="flex min-h-8 cursor-pointer list-none items-center gap-1.5 rounded-sm text-muted hover:text-ink [&::-webkit-details-marker]:hidden">
          <ChevronRight size={14} aria-hidden className="transition-transform group-open:rotate-90" />
          {isSky ? 'Projection, names, marks' : 'Lengths, names, marks'}
        </summary>
        <div className="grid gap-4 pt-2">
          {isSky ? <SkyControls recipe={recipe} onChange={onChange} /> : <PlaneControls recipe={recipe} onChange={onChange} />}
          <MarkControls recipe={recipe} onChange={onChange} />
        </div>
      </details>
    </div>
  )
}

function MarkControls({ recipe, onChange }: RecipeControlsProps) {
  return (
    <>
      <RadioGroup
        look="chips"
        label="Names"
        value={labelChoice(recipe.labels.count)}
        options={[{ id: 'none', label: 'none' }, { id: 'few', label: 'few' }, { id: 'some', label: 'some' }, { id: 'many', label: 'many' }]}
        onChange={(choice) => onChange({ ...recipe, labels: { ...recipe.labels, count: LABEL_COUNTS[choice] } })}
      />
      <RadioGroup look="chips" label="Colour" value={recipe.colour} options={[{ id: 'class', label: 'by class' }, { id: 'one-ink', label: 'one ink' }]} onChange={(colour) => onChange({ ...recipe, colour })} />
      <RadioGroup look="chips" label="Size" value={recipe.size} options={[{ id: 'luminosity', label: 'by luminosity' }, { id: 'fixed', label: 'all equal' }]} onChange={(size) => onChange({ ...recipe, size })} />
    </>
  )
}

function labelChoice(count: number): LabelChoice {
  if (count === 0) return 'none'
  return count <= 12 ? 'few' : count <= 24 ? 'some' : 'many'
}

function FrameControl({ recipe, onChange }: RecipeControlsProps) {
  return (
    <RadioGroup
      look="chips"
      label="Frame"
      value={recipe.sky.frame}
      options={FRAMES.map((id) => ({ id, label: id }))}
      onChange={(frame) => onChange({ ...recipe, sky: { ...recipe.sky, frame, centreLon: USUAL_CENTRE_DEG[frame] } })}
    />
  )
}

function SkyControls({ recipe, onChange }: RecipeControlsProps) {
  const { sky } = recipe
  const change = (part: Partial<FigureRecipe['sky']>): void => onChange({ ...recipe, sky: { ...sky, ...part } })
  return (
    <>
      <Select label="Projection" value={sky.projection} options={PROJECTIONS.map((id) => ({ id, label: PROJECTION_WORDS[id] }))} onChange={(projection) => change({ projection })} />
      <NumberField label="Longitude in the middle" unit="°" value={sky.centreLon} min={-360} max={360} step={15} decimals={1} onChange={(centreLon) => change({ centreLon: centreLon ?? USUAL_CENTRE_DEG[sky.frame] })} />
      <div>
        <Checkbox isSelected={sky.zoneOfAvoidance} onChange={(zoneOfAvoidance) => change({ zoneOfAvoidance })}>Zone of avoidance</Checkbox>
        <Checkbox isSelected={sky.supergalacticPlane} onChange={(supergalacticPlane) => change({ supergalacticPlane })}>Supergalactic plane</Checkbox>
      </div>
    </>
  )
}

function PlaceControls({ recipe, onChange, withAxes }: RecipeControlsProps) {
  const { plane } = recipe
  const change = (part: Partial<FigureRecipe['plane']>): void => onChange({ ...recipe, plane: { ...plane, ...part } })
  const radius = String(plane.radius)
  const options = [...(RADII.some((one) => one === radius) ? [] : [radius]), ...RADII].map((id) => ({ id, label: id }))
  return (
    <>
      {withAxes && <RadioGroup look="chips" label="Seen" value={plane.axes} options={PLANE_AXES.map((id) => ({ id, label: AXES_WORDS[id] }))} onChange={(axes) => change({ axes })} />}
      <RadioGroup look="chips" label="Out to / Mpc" value={radius} options={options} onChange={(chosen) => change({ radius: Number(chosen) })} />
    </>
  )
}

function PlaneControls({ recipe, onChange }: RecipeControlsProps) {
  const { plane } = recipe
  const change = (part: Partial<FigureRecipe['plane']>): void => onChange({ ...recipe, plane: { ...plane, ...part } })
  return (
    <>
      <RadioGroup look="chips" label="Lengths in" value={recipe.units} options={[{ id: 'Mpc', label: 'Mpc' }, { id: 'Mly', label: 'million light-years' }]} onChange={(units) => onChange({ ...recipe, units })} />
      <div>
        <Checkbox isSelected={plane.zoneOfAvoidance} onChange={(zoneOfAvoidance) => change({ zoneOfAvoidance })}>Zone of avoidance</Checkbox>
        <Checkbox isSelected={plane.rings} onChange={(rings) => change({ rings })}>Rings of distance</Checkbox>
      </div>
    </>
  )
}
