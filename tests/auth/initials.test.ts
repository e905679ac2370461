import { expect, it } from 'vitest'
import { initialsOf } from '@/lib/auth/initials'

it.each([
  ['Isolde Carrow', 'IC'],
  ['  per  van der  Vane ', 'PV'],
  ['Öznur', 'Ö'],
  ['𝒜da Brook', '𝒜B'],
  ['', ''],
])('takes the initials of %j: %j', (name, initials) => expect(initialsOf(name)).toBe(initials))
