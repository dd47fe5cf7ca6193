import { method } from '../../../core/methods.ts'
import type { MethodPolicy } from '../../../core/scale/policy.ts'
import type { ScaleAnchor, ScaleAnswer } from '../../../core/schema/scale.ts'
import { GAP } from '../../../core/spaces.ts'
import { PlotFrame } from '../../components/plot-frame.tsx'
import { formatCount, formatNumber } from '../../lib/format.ts'
import { useWidth } from '../../lib/use-width.ts'

const ROW = 26
const TIER_GAP = 18
const TOP = 40
const NARROW_BELOW = 700
const ANCHOR_HEIGHT = 54

interface Rung {
  rule: MethodPolicy
  anchor: ScaleAnchor | undefined
  used: number
  held: number
  y: number
}

/** Anchors, the methods that hang on them in their tiers, and how many galaxies each carries; beside it the systematic error of each. */
export function ScaleTree({ scale }: { scale: ScaleAnswer }) {
  const [frame, width] = useWidth<HTMLDivElement>(960)
  const isNarrow = width < NARROW_BELOW
  const { rungs, tiers, height } = ladder(scale)
  const columns = isNarrow ? { anchors: 0, label: 24, bars: 190, end: width - 8 } : { anchors: 190, label: 262, bars: Math.min(500, width * 0.52), end: width - 150 }
  const most = Math.max(1, ...rungs.map((r) => r.held))
  const length = (n: number): number => (n / most) * (columns.end - columns.bars - 40)
  const systematicAt = (mag: number): number => width - 128 + (mag / Math.max(...rungs.map((r) => r.rule.systematic))) * 112
  const places = anchorPlaces(scale.anchors, rungs, height)
  const words = `${rungs.length} methods in ${tiers.length} tiers. ${scale.anchors.map((a) => `On ${a.label} hang ${a.methods.map((m) => method(m).label).join(', ')}`).join('. ')}. ${rungs.filter((r) => r.used > 0).map((r) => `${method(r.rule.method).label}: tier ${r.rule.tier}, used for ${r.used} of ${r.held} galaxies, systematic ${r.rule.systematic} mag`).join('; ')}.`
  return (
    <PlotFrame title="What hangs on what" fileName="scale" alt={words} note={<p className="text-sm text-muted">Filled: galaxies whose adopted distance uses the method. Open: galaxies with a value of it that is held and not used, since a better tier is there or it is excluded.{isNarrow ? '' : ' Lines lead from each anchor to the methods that hang on it; the others stand on their own.'}</p>}>
      <div ref={frame} className="w-full">
        <svg aria-hidden width={width} height={height} viewBox={`0 0 ${width} ${height}`} className="block max-w-full font-sans" fontSize={14}>
          {!isNarrow && <text x={columns.anchors} y={18} fontSize={13} textAnchor="end" className="fill-muted">anchor</text>}
          <text x={columns.label} y={18} fontSize={13} className="fill-muted">method</text>
          <text x={columns.bars} y={18} fontSize={13} className="fill-muted">galaxies</text>
          {!isNarrow && <text x={width - 128} y={18} fontSize={13} className="fill-muted">systematic / mag</text>}
          {tiers.map((t) => (
            <g key={t.tier}>
              <line x1={isNarrow ? 0 : columns.anchors + 32} x2={width} y1={t.top - 9} y2={t.top - 9} strokeWidth={1} className="stroke-line" />
              <text x={columns.label - 10} y={t.top + 17} fontSize={13} textAnchor="end" className="figures fill-muted">{t.tier}</text>
            </g>
          ))}
          {!isNarrow && rungs.map((r) => r.anchor && <Branch key={r.rule.method} from={[columns.anchors + 6, places.get(r.anchor.key) ?? 0]} to={[columns.label - 26, r.y]} isUsed={r.used > 0} />)}
          {!isNarrow && scale.anchors.map((a) => (
            <g key={a.key}>
              <circle cx={columns.anchors + 6} cy={places.get(a.key)} r={5} className="fill-accent" />
              <AnchorLabel anchor={a} x={columns.anchors - 6} y={places.get(a.key) ?? 0} />
            </g>
          ))}
          {rungs.map((r) => {
            const muted = r.held === 0
            return (
              <g key={r.rule.method}>
                <text x={columns.label} y={r.y + 5} className={muted ? 'fill-muted' : 'fill-ink'}>{shortLabel(r.rule.method, isNarrow)}</text>
                {r.held > 0 && <rect x={columns.bars} y={r.y - 7} width={Math.max(2, length(r.held))} height={14} rx={2} fill="none" strokeWidth={1} className="stroke-ramp-4" />}
                {r.used > 0 && <rect x={columns.bars} y={r.y - 7} width={Math.max(2, length(r.used))} height={14} rx={2} className="fill-ramp-4" />}
                <text x={columns.bars + length(r.held) + 7} y={r.y + 5} fontSize={13} className="figures fill-muted">{r.held === 0 ? 'none' : r.used === r.held ? formatCount(r.used) : `${formatCount(r.used)} of ${formatCount(r.held)}`}</text>
                {!isNarrow && (
                  <>
                    <line x1={systematicAt(0)} x2={systematicAt(r.rule.systematic)} y1={r.y} y2={r.y} strokeWidth={1.2} className="stroke-edge" />
                    <circle cx={systematicAt(r.rule.systematic)} cy={r.y} r={3.6} className={muted ? 'fill-edge' : 'fill-ink'} />
                  </>
                )}
              </g>
            )
          })}
        </svg>
      </div>
    </PlotFrame>
  )
}

function AnchorLabel({ anchor, x, y }: { anchor: ScaleAnchor; x: number; y: number }) {
  const words = anchor.label.split(' ')
  const half = Math.ceil(words.length / 2)
  const lines = anchor.label.length > 20 ? [words.slice(0, half).join(' '), words.slice(half).join(' ')] : [anchor.label]
  return (
    <text x={x} y={y - (lines.length - 1) * 9} textAnchor="end" className="fill-ink">
      {lines.map((line, i) => <tspan key={line} x={x} dy={i === 0 ? 0 : 18} className="font-semibold">{line}</tspan>)}
      <tspan x={x} dy={18} fontSize={13} className="figures fill-muted">{`${formatNumber(anchor.value, 3)}${GAP}±${GAP}${formatNumber(anchor.err, 3)}`}</tspan>
    </text>
  )
}

/** A line from an anchor to a method, level at both ends. */
function Branch({ from: [x1, y1], to: [x2, y2], isUsed }: { from: [number, number]; to: [number, number]; isUsed: boolean }) {
  const middle = (x1 + x2) / 2
  return <path d={`M${x1} ${y1}C${middle} ${y1} ${middle} ${y2} ${x2} ${y2}`} fill="none" strokeWidth={isUsed ? 1.6 : 1} strokeDasharray={isUsed ? undefined : '3 3'} className={isUsed ? 'stroke-accent' : 'stroke-edge'} />
}

const SHORT: Readonly<Record<string, string>> = { 'sbf': 'Brightness fluctuations', 'pnlf': 'Planetary nebulae', 'gclf': 'Globular clusters', 'compilation': 'Compilation', 'hubble-flow': 'Hubble flow', 'eclipsing-binaries': 'Eclipsing binaries', 'supergiants': 'Supergiants', 'geometric': 'Stellar orbits' }

function shortLabel(key: string, isNarrow: boolean): string {
  return (isNarrow || ['sbf', 'pnlf', 'gclf', 'compilation', 'hubble-flow'].includes(key) ? SHORT[key] : undefined) ?? method(key).label
}

/** Rungs from the best tier down; within one, those that carry most first. */
function ladder(scale: ScaleAnswer): { rungs: Rung[]; tiers: { tier: number; top: number }[]; height: number } {
  const rules = scale.policy.methods.map((rule) => {
    const count = scale.methods.find((c) => c.method === rule.method)
    return { rule, anchor: scale.anchors.find((a) => a.methods.includes(rule.method)), used: count?.galaxiesUsed ?? 0, held: count?.galaxies ?? 0 }
  })
  // Methods of one anchor side by side, so that its lines do not cross others'.
  const order = (a: (typeof rules)[number]): number => (a.anchor ? scale.anchors.indexOf(a.anchor) : scale.anchors.length)
  rules.sort((a, b) => a.rule.tier - b.rule.tier || order(a) - order(b) || b.held - a.held)
  const rungs: Rung[] = []
  const tiers: { tier: number; top: number }[] = []
  let y = TOP
  for (const rule of rules) {
    if (tiers.at(-1)?.tier !== rule.rule.tier) {
      if (tiers.length > 0) y += TIER_GAP
      tiers.push({ tier: rule.rule.tier, top: y })
    }
    rungs.push({ ...rule, y: y + ROW / 2 })
    y += ROW
  }
  return { rungs, tiers, height: y + 8 }
}

/** Each anchor at the middle of its methods, as far as the one above leaves room. */
function anchorPlaces(anchors: readonly ScaleAnchor[], rungs: readonly Rung[], height: number): Map<string, number> {
  const wanted = anchors.map((a) => {
    const own = rungs.filter((r) => r.anchor === a)
    return { key: a.key, y: own.length === 0 ? height / 2 : own.reduce((sum, r) => sum + r.y, 0) / own.length }
  })
  wanted.sort((a, b) => a.y - b.y)
  let least = TOP + ANCHOR_HEIGHT / 2
  return new Map(wanted.map(({ key, y }) => {
    const at = Math.max(y, least)
    least = at + ANCHOR_HEIGHT + 10
    return [key, at]
  }))
}
