/** The known word that a misspelt one was most likely meant to be: a letter or two off. */
export function nearest(word: string, known: Iterable<string>): string | undefined {
  const allowed = word.length <= 2 ? 0 : word.length <= 5 ? 1 : 2
  let best: string | undefined
  let least = allowed + 1
  for (const candidate of known) {
    if (Math.abs(candidate.length - word.length) > allowed) continue
    const distance = editDistance(word.toLowerCase(), candidate.toLowerCase())
    if (distance < least) [best, least] = [candidate, distance]
  }
  return best
}

/** "; is density meant?", or nothing where nothing is near. */
export function suggestion(word: string, known: Iterable<string>): string {
  const found = word.length > LONGEST ? undefined : nearest(word, known)
  return found === undefined ? '' : `; is ${found} meant?`
}

const LONGEST = 40

/** Letters to put in, take out, change, or swap with their neighbour to make one word of the other. */
function editDistance(a: string, b: string): number {
  let before: number[] = []
  let row = Array.from({ length: b.length + 1 }, (_, i) => i)
  for (let i = 1; i <= a.length; i++) {
    const next = [i]
    for (let j = 1; j <= b.length; j++) {
      const same = a[i - 1] === b[j - 1]
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]
      next[j] = Math.min(
        row[j] + 1,
        next[j - 1] + 1,
        row[j - 1] + (same ? 0 : 1),
        swapped ? before[j - 2] + 1 : Infinity,
      )
    }
    before = row
    row = next
  }
  return row[b.length]
}
