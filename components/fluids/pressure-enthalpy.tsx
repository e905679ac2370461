import type { State } from '@/lib/fluids'
import type { DomePoint } from './dome'

interface PressureEnthalpyProps {
  readonly name: string
  readonly dome: readonly DomePoint[] | null
  readonly state: State | null
}

const SIZE = { width: 520, height: 340, left: 58, right: 12, top: 12, bottom: 40 }

/** Pressure over enthalpy, with the two-phase region and the state that is asked for. */
export function PressureEnthalpy({ name, dome, state }: PressureEnthalpyProps) {
  const points: readonly DomePoint[] = [...(dome ?? []), ...(state ? [{ h_J_kg: state.h_J_kg, p_Pa: state.p_Pa }] : [])]
  if (points.length === 0) return null
  const h = span(points.map((point) => point.h_J_kg / 1e3))
  const logP = span(points.map((point) => Math.log10(point.p_Pa / 1e5)))
  const x = (h_kJ: number) => SIZE.left + ((h_kJ - h.low) / (h.high - h.low)) * (SIZE.width - SIZE.left - SIZE.right)
  const y = (log: number) =>
    SIZE.height - SIZE.bottom - ((log - logP.low) / (logP.high - logP.low)) * (SIZE.height - SIZE.top - SIZE.bottom)
  const place = (point: DomePoint) =>
    `${x(point.h_J_kg / 1e3).toFixed(1)},${y(Math.log10(point.p_Pa / 1e5)).toFixed(1)}`
  const decades = Array.from(
    { length: Math.floor(logP.high) - Math.ceil(logP.low) + 1 },
    (_, i) => Math.ceil(logP.low) + i,
  )
  const step = niceStep((h.high - h.low) / 5)
  const marks = Array.from({ length: 8 }, (_, i) => (Math.ceil(h.low / step) + i) * step).filter(
    (mark) => mark < h.high,
  )
  return (
    <svg
      viewBox={`0 0 ${SIZE.width} ${SIZE.height}`}
      className="w-full"
      role="img"
      aria-label={`Pressure over enthalpy of ${name}, with its two-phase region`}
    >
      {decades.map((decade) => (
        <g key={decade}>
          <path d={`M${SIZE.left} ${y(decade)}H${SIZE.width - SIZE.right}`} stroke="#E7ECEE" />
          <text x={SIZE.left - 6} y={y(decade) + 4} textAnchor="end" fontSize="11" fill="#53646E">
            {decade >= -3 && decade <= 4 ? Number((10 ** decade).toPrecision(1)) : `1e${decade}`}
          </text>
        </g>
      ))}
      {marks.map((mark) => (
        <text
          key={mark}
          x={x(mark)}
          y={SIZE.height - SIZE.bottom + 16}
          textAnchor="middle"
          fontSize="11"
          fill="#53646E"
        >
          {mark}
        </text>
      ))}
      <text x={SIZE.left} y={SIZE.height - 6} fontSize="11" fill="#53646E">
        specific enthalpy, kJ/kg
      </text>
      <text x={4} y={SIZE.top + 2} fontSize="11" fill="#53646E">
        bar
      </text>
      {dome && <polyline points={dome.map(place).join(' ')} fill="#E4F0F8" stroke="#0C3F4D" strokeWidth="2" />}
      {state && (
        <g>
          <circle
            cx={x(state.h_J_kg / 1e3)}
            cy={y(Math.log10(state.p_Pa / 1e5))}
            r="6"
            fill="#F2B705"
            stroke="#10222C"
            strokeWidth="1.5"
          />
        </g>
      )}
    </svg>
  )
}

function span(values: readonly number[]): { readonly low: number; readonly high: number } {
  const [low, high] = [Math.min(...values), Math.max(...values)]
  const room = (high - low || 1) * 0.08
  return { low: low - room, high: high + room }
}

function niceStep(rough: number): number {
  const decade = 10 ** Math.floor(Math.log10(rough))
  return [1, 2, 5, 10].map((factor) => factor * decade).find((step) => step >= rough)!
}
