/** `Ada Brook` -> `AB`, `Ada` -> `A`: first letters of the first and the last word. */
export function initialsOf(name: string): string {
  const words = name.trim().split(/\s+/).filter(Boolean)
  const ends = words.length > 1 ? [words[0], words[words.length - 1]] : words
  return ends.map((word) => [...(word ?? '')][0]?.toUpperCase() ?? '').join('')
}
