/**
 * Where each row, column and thing stands in the dependency graph's own grid. A place is given once and kept while its
 * owner lives, whatever order people see: moving a state or a column moves nothing here, so no formula changes.
 */
export class Places {
  private readonly byId = new Map<string, number>()
  private readonly free: number[] = []
  private next = 0

  of(id: string): number | undefined {
    return this.byId.get(id)
  }

  /** Gives places to newcomers, takes back those of the departed, and returns those taken back. */
  settle(ids: readonly string[]): ReadonlySet<number> {
    const living = new Set(ids)
    const left = new Set<number>()
    for (const [id, place] of this.byId) {
      if (living.has(id)) continue
      this.byId.delete(id)
      left.add(place)
    }
    this.free.push(...left)
    for (const id of ids) if (!this.byId.has(id)) this.byId.set(id, this.free.pop() ?? this.next++)
    return left
  }

  /** Places ever given: a range over all of them covers every owner. */
  get extent(): number {
    return this.next
  }

  entries(): IterableIterator<[string, number]> {
    return this.byId.entries()
  }
}

/** Zero-based place to the graph's letters: 0 is A, 26 is AA. */
export function letters(place: number): string {
  let left = place + 1
  let text = ''
  while (left > 0) {
    const digit = (left - 1) % 26
    text = String.fromCharCode(65 + digit) + text
    left = (left - 1 - digit) / 26
  }
  return text
}
