import { vi } from 'vitest'

/** Tries until it holds: at once on an idle machine, and with patience on a busy one. */
export const eventually = <T>(attempt: () => T | Promise<T>): Promise<T> =>
  vi.waitFor(attempt, { timeout: 20_000, interval: 20 })

/** Waits until a number stays what it is; fails where it never does. */
export async function comesToRest(read: () => number): Promise<void> {
  let before = -1
  await vi.waitFor(
    () => {
      const now = read()
      const rests = now === before
      before = now
      if (!rests) throw new Error(`still growing: ${now}`)
    },
    { timeout: 20_000, interval: 500 },
  )
}
