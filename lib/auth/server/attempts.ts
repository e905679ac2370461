import { LRUCache } from 'lru-cache'

/**
 * Counts failures by key and says when there were too many within the window, which starts with the first failure.
 * Counts live in this process and are bounded in number.
 */
export class Attempts {
  private readonly counts: LRUCache<string, number>
  constructor(
    private readonly allowed: number,
    window_ms: number,
  ) {
    // noUpdateTTL: a person who goes on trying does not push the end of the window away.
    this.counts = new LRUCache({ max: 50_000, ttl: window_ms, noUpdateTTL: true })
  }

  exhausted(key: string): boolean {
    return (this.counts.get(key) ?? 0) >= this.allowed
  }

  failed(key: string): void {
    this.counts.set(key, (this.counts.get(key) ?? 0) + 1)
  }

  succeeded(key: string): void {
    this.counts.delete(key)
  }
}
