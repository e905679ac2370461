'use client'

import { useEffect, useMemo, useState } from 'react'
import type { RunCurves } from '@/lib/sheet/engine/runs'
import { fromSI, unitOf } from '@/lib/units'
import { RunChart } from './run-chart'
import type { ChartSeries, LimitLine } from './run-chart'

interface RunPlotsProps {
  /** The state's label. */
  readonly label: string
  /** Asked again whenever this changes: the run's content key. */
  readonly runKey: string
  readonly load: () => Promise<RunCurves | null>
}

/** Pressure and flow, and the temperatures of gas and shell, over the course of one run. */
export function RunPlots({ label, runKey, load }: RunPlotsProps) {
  const [shown, setShown] = useState<{ readonly key: string; readonly curves: RunCurves | null } | null>(null)
  useEffect(() => {
    let current = true
    void load().then((curves) => current && setShown({ key: runKey, curves }))
    return () => {
      current = false
    }
    // `load` asks for the run of this key
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [runKey])
  const plots = useMemo(() => (shown?.curves ? plotsOf(shown.curves) : null), [shown])

  if (!shown) return <Quiet>Fetching the course of {label} …</Quiet>
  if (!plots) return <Quiet>{label} is a balance alone: it has no course over time to draw.</Quiet>
  return (
    <div className="flex flex-col gap-4 md:flex-row">
      <RunChart
        title={`Pressure and flow, ${label}`}
        time={plots.time}
        timeUnit={plots.timeUnit}
        series={plots.flow}
        limits={plots.pressureLimits}
      />
      <RunChart
        title="Gas and shell temperature"
        time={plots.time}
        timeUnit={plots.timeUnit}
        series={plots.temperatures}
        limits={plots.temperatureLimits}
      />
    </div>
  )
}

const Quiet = ({ children }: { readonly children: React.ReactNode }) => (
  <p className="py-6 text-center text-dim">{children}</p>
)

function plotsOf({ trace, limits }: RunCurves) {
  const timeUnit = trace.t_s[trace.t_s.length - 1] > 600 ? 'min' : 's'
  const inUnit = (values: readonly number[], unit: string) => values.map((si) => fromSI(si, unitOf(unit), 0))
  const limit = (si: number | undefined, unit: string, words: string): LimitLine[] => {
    if (si === undefined) return []
    const value = fromSI(si, unitOf(unit), 0)
    return [{ label: `${words} ${Number(value.toPrecision(4))}`, value }]
  }
  const flow: ChartSeries[] = [
    { label: 'pressure', unit: 'bar', colour: '#0C3F4D', values: inUnit(trace.p_Pa, 'bar'), scale: 'left' },
    {
      label: 'mass flow',
      unit: 'g/s',
      colour: '#53646E',
      values: inUnit(trace.flow_kg_s, 'g/s'),
      dashed: true,
      scale: 'right',
    },
  ]
  const temperatures: ChartSeries[] = [
    { label: 'gas', unit: '°C', colour: '#B8320F', values: inUnit(trace.T_K, '°C'), scale: 'left' },
    {
      label: 'shell',
      unit: '°C',
      colour: '#8A5A00',
      values: inUnit(trace.shellMean_K, '°C'),
      dashed: true,
      scale: 'left',
    },
  ]
  return {
    time: inUnit(trace.t_s, timeUnit),
    timeUnit,
    flow,
    temperatures: temperatures.filter((series) => series.values.every(Number.isFinite)),
    pressureLimits: limit(limits.p_high_Pa, 'bar', 'limit'),
    temperatureLimits: [
      ...limit(limits.shell_high_K, '°C', 'shell limit'),
      ...limit(limits.shell_low_K, '°C', 'shell limit'),
    ],
  }
}
