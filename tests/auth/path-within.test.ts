import { expect, it } from 'vitest'
import { pathWithin } from '@/app/(auth)/sign-in/path-within'

it.each([
  ['/sheets/1?x=2#y', '/sheets/1?x=2#y'],
  [undefined, '/'],
  [['/a', '/b'], '/'],
  ['https://evil.example/x', '/'],
  ['//evil.example/x', '/'],
  ['/\\evil.example', '/'],
  ['\t//evil.example', '/'],
  ['javascript:alert(1)', '/'],
  ['http://site.invalid//evil.example', '/'],
  ['/.//evil.example', '/'],
  ['//', '/'],
])('goes on from %j to %j', (asked, path) => expect(pathWithin(asked)).toBe(path))
