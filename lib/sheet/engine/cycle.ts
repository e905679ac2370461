/** What each cell of a ring reads, by cellKey. */
export type Needs = (key: string) => readonly string[]

/**
 * The ring that a cell stands in, in words: "cycle: T needs m, m needs T". Null where the cell only leads to a ring.
 * Breadth first, so the shortest ring is told.
 */
export function cycleReason(start: string, needs: Needs, nameOf: (key: string) => string): string | null {
  const cameFrom = new Map<string, string>()
  let front = [start]
  while (front.length > 0) {
    const next: string[] = []
    for (const key of front) {
      for (const needed of needs(key)) {
        if (needed === start) return ringWords([...pathTo(key, cameFrom), start], nameOf)
        if (cameFrom.has(needed)) continue
        cameFrom.set(needed, key)
        next.push(needed)
      }
    }
    front = next
  }
  return null
}

function pathTo(end: string, cameFrom: ReadonlyMap<string, string>): string[] {
  const path = [end]
  for (let at = cameFrom.get(end); at !== undefined; at = cameFrom.get(at)) path.unshift(at)
  return path
}

function ringWords(ring: readonly string[], nameOf: (key: string) => string): string {
  const steps = ring.slice(0, -1).map((key, i) => `${nameOf(key)} needs ${nameOf(ring[i + 1])}`)
  const told = steps.length > 6 ? [...steps.slice(0, 5), '…', steps[steps.length - 1]] : steps
  return `cycle: ${told.join(', ')}`
}
