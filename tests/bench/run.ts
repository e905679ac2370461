import { CASES as FLUIDS } from './fluids.bench'
import { CASES as VESSELS } from './vessel.bench'

/*
 * npm run bench: each figure is the median of several repetitions, warm, with the spread of the middle half of them.
 * Nothing here fails: on a busy machine times say little.
 */
const REPETITIONS = 21
const WARM_UP = 5

function measure(run: () => unknown, calls: number): { readonly median: number; readonly spread: number } {
  for (let i = 0; i < WARM_UP; i++) run()
  const times = Array.from({ length: REPETITIONS }, () => {
    const started = performance.now()
    run()
    return (performance.now() - started) / calls
  }).sort((a, b) => a - b)
  const at = (share: number) => times[Math.round(share * (REPETITIONS - 1))]
  return { median: at(0.5), spread: at(0.75) - at(0.25) }
}

function print(name: string, median: number, spread: number, most: number, unit: string): void {
  const figure = (value: number) => value.toPrecision(3).padStart(8)
  const verdict = median <= most ? '' : '  over'
  console.log(`${name.padEnd(48)}${figure(median)} ±${figure(spread / 2)} ${unit}, at most ${most} ${unit}${verdict}`)
}

for (const { name, most_us, calls, run } of FLUIDS) {
  const { median, spread } = measure(run, calls)
  print(name, median * 1000, spread * 1000, most_us, 'µs')
}
for (const { name, most_ms, run } of VESSELS) {
  const { median, spread } = measure(run, 1)
  print(name, median, spread, most_ms, 'ms')
}
