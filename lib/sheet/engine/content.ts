import { sha256 } from '@noble/hashes/sha2.js'
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js'
import { isThing } from '@/lib/formula'
import type { Thing, ThingKind, Value } from '@/lib/formula'

/**
 * Content addressing: a thing's key is made of what it is made from, so that equal things are one, a run is worked out
 * once for every column that reads it, and a cell whose thing did not change wakes none of its readers.
 */
export function contentKey(name: string, args: Readonly<Record<string, Value | undefined>>): string {
  return bytesToHex(sha256(utf8ToBytes(`${name}(${canonical(args)})`))).slice(0, 32)
}

const things = new WeakMap<object, Thing>()

export function thing(kind: ThingKind, key: string, shown: string, value: object): Thing {
  const made = { thing: kind, key, shown, value }
  things.set(value, made)
  return made
}

/** The thing that a value was made as: a run's vessel is the very vessel that it was started with. */
export function thingOf(value: object): Thing {
  const known = things.get(value)
  if (!known) throw new Error('this value was never made a thing')
  return known
}

function canonical(args: Readonly<Record<string, Value | undefined>>): string {
  return Object.keys(args)
    .filter((name) => args[name] !== undefined)
    .sort()
    .map((name) => `${name}:${content(args[name] as Value)}`)
    .join(',')
}

function content(value: Value): string {
  if (isThing(value)) return `#${value.key}`
  if (Array.isArray(value)) return `[${value.map(content).join(',')}]`
  // numbers print to the shortest decimals that read back the same, so equal text is equal content
  return JSON.stringify(value)
}
