import type { ReactNode } from 'react'

/** The inside of a plot, px. */
export interface Box {
  left: number
  right: number
  top: number
  bottom: number
}

export interface AxisMarks {
  ticks: readonly { at: number; text: string }[]
  /** With its unit: "Δv / km s⁻¹". */
  label: ReactNode
}

/** Frame, ticks and labels of a plot: the x axis below, the y axis at the left. */
export function Axes({ box, x, y }: { box: Box; x: AxisMarks; y: AxisMarks }) {
  const { left, right, top, bottom } = box
  return (
    <g>
      <rect x={left} y={top} width={right - left} height={bottom - top} fill="none" className="stroke-line" />
      {x.ticks.map((tick) => (
        <g key={tick.at}>
          <line x1={tick.at} x2={tick.at} y1={bottom} y2={bottom + 5} className="stroke-edge" />
          <text x={tick.at} y={bottom + 20} fontSize={13} textAnchor="middle" className="figures fill-muted">
            {tick.text}
          </text>
        </g>
      ))}
      {y.ticks.map((tick) => (
        <g key={tick.at}>
          <line x1={left - 5} x2={left} y1={tick.at} y2={tick.at} className="stroke-edge" />
          <text x={left - 9} y={tick.at + 4.5} fontSize={13} textAnchor="end" className="figures fill-muted">
            {tick.text}
          </text>
        </g>
      ))}
      <text x={(left + right) / 2} y={bottom + 40} fontSize={13.5} textAnchor="middle" className="fill-muted">
        {x.label}
      </text>
      <text transform={`translate(13 ${(top + bottom) / 2}) rotate(-90)`} fontSize={13.5} textAnchor="middle" className="fill-muted">
        {y.label}
      </text>
    </g>
  )
}

/** M with a lowered V, inside a text of a picture. */
export function AbsoluteV() {
  return (
    <>
      M
      <tspan dy={4} fontSize={10}>
        V
      </tspan>
      <tspan dy={-4}> / mag</tspan>
    </>
  )
}
