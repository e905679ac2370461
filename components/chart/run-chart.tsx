'use client'

import { useEffect, useRef } from 'react'
import uPlot from 'uplot'
import 'uplot/dist/uPlot.min.css'
import './chart.css'

export interface ChartSeries {
  readonly label: string
  readonly unit: string
  readonly colour: string
  readonly values: readonly number[]
  readonly dashed?: boolean
  /** Which axis: left, or right where a second unit is drawn. */
  readonly scale: 'left' | 'right'
}

export interface LimitLine {
  readonly label: string
  readonly value: number
}

interface RunChartProps {
  readonly title: string
  readonly time: readonly number[]
  readonly timeUnit: string
  readonly series: readonly ChartSeries[]
  readonly limits?: readonly LimitLine[]
}

const HEIGHT = 176
const AXIS = {
  stroke: '#53646E',
  font: '11px "Atkinson Hyperlegible Next Variable"',
  grid: { stroke: '#E7ECEE', width: 1 },
  ticks: { show: false },
}

/** Curves over time, with limits as dotted lines and a read-out under the cursor. */
export function RunChart({ title, time, timeUnit, series, limits = [] }: RunChartProps) {
  const host = useRef<HTMLDivElement>(null)
  useEffect(() => {
    const parent = host.current
    if (!parent) return
    const chart = new uPlot(
      options(parent.clientWidth, timeUnit, series, limits),
      [[...time], ...series.map((one) => [...one.values])],
      parent,
    )
    const resize = new ResizeObserver(() => chart.setSize({ width: parent.clientWidth, height: HEIGHT }))
    resize.observe(parent)
    return () => {
      resize.disconnect()
      chart.destroy()
    }
  }, [time, timeUnit, series, limits])
  const spoken = series
    .map((one) => `${one.label} from ${round(one.values[0])} to ${round(one.values.at(-1))} ${one.unit}`)
    .join('; ')
  return (
    <figure className="min-w-0 flex-1">
      <figcaption className="flex flex-wrap justify-between gap-x-3 text-[13px]">
        <b>{title}</b>
        <span className="text-dim">
          {series.map((one) => (
            <span key={one.label} className="ml-3 inline-flex items-center gap-1">
              <svg width="16" height="6" aria-hidden="true">
                <path
                  d="M0 3h16"
                  stroke={one.colour}
                  strokeWidth="2.4"
                  strokeDasharray={one.dashed ? '4 3' : undefined}
                />
              </svg>
              {one.label}, {one.unit}
            </span>
          ))}
        </span>
      </figcaption>
      <div ref={host} role="img" aria-label={`${title} over ${round(time.at(-1))} ${timeUnit}: ${spoken}`} />
    </figure>
  )
}

const round = (value: number | undefined) => Number((value ?? 0).toPrecision(4))

function options(
  width: number,
  timeUnit: string,
  series: readonly ChartSeries[],
  limits: readonly LimitLine[],
): uPlot.Options {
  const right = series.some((one) => one.scale === 'right')
  return {
    width,
    height: HEIGHT,
    legend: { live: true, markers: { show: false } },
    cursor: { points: { size: 6 } },
    scales: {
      x: { time: false },
      left: {
        range: (_chart, low, high) =>
          padded(
            Math.min(low, ...limits.map((line) => line.value)),
            Math.max(high, ...limits.map((line) => line.value)),
          ),
      },
      ...(right && { right: { range: (_chart, low, high) => padded(Math.min(0, low), high) } }),
    },
    axes: [
      { ...AXIS, size: 26, values: (_chart, marks) => marks.map((mark) => `${mark} ${timeUnit}`) },
      { ...AXIS, scale: 'left', size: 46 },
      ...(right ? [{ ...AXIS, scale: 'right', side: 1 as const, size: 46, grid: { show: false } }] : []),
    ],
    series: [
      { label: 'time', value: (_chart, value) => (value === null ? '–' : `${round(value)} ${timeUnit}`) },
      ...series.map((one) => ({
        label: one.label,
        scale: one.scale,
        stroke: one.colour,
        width: 2,
        ...(one.dashed && { dash: [5, 4] }),
        points: { show: false },
        value: (_chart: uPlot, value: number | null) => (value === null ? '–' : `${round(value)} ${one.unit}`),
      })),
    ],
    hooks: { draw: [(chart) => limits.forEach((line) => drawLimit(chart, line))] },
  }
}

function padded(low: number, high: number): [number, number] {
  const room = (high - low || Math.abs(high) || 1) * 0.06
  return [low >= 0 && low - room < 0 ? 0 : low - room, high + room]
}

function drawLimit({ ctx, bbox, valToPos }: uPlot, { label, value }: LimitLine): void {
  const y = valToPos(value, 'left', true)
  ctx.save()
  ctx.strokeStyle = '#B8320F'
  ctx.fillStyle = '#8E2410'
  ctx.setLineDash([2, 4])
  ctx.lineWidth = 1.5
  ctx.beginPath()
  ctx.moveTo(bbox.left, y)
  ctx.lineTo(bbox.left + bbox.width, y)
  ctx.stroke()
  ctx.textAlign = 'left'
  ctx.textBaseline = 'bottom'
  ctx.font = `${11 * devicePixelRatio}px "Atkinson Hyperlegible Next Variable"`
  ctx.fillText(label, bbox.left + 6, y - 2 * devicePixelRatio)
  ctx.restore()
}
