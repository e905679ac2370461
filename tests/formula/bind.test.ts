import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bind, compile, parse, print, show, shownSpan } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import { SCOPE, VOCABULARY, quantityType } from './vocabulary'

describe('a formula as it is kept', () => {
  it.each([
    ['m-m@from', '$c:cm-$c:cm@from'],
    ['  m  -  m@3 ', '  $c:cm  -  $c:cm@$r:r3 '],
    ['T@[Fill quick] + 5 K', '$c:cT@$r:r2 + 5 K'],
    ['max(p@all)', 'max($c:cp@all)'],
    ['[Tank A].volume', '$t:tA.volume'],
    ['tank(volume: 5 L, p: p)', 'tank(volume: 5 L, p: $c:cp)'],
    ['p * q', '$c:cp * q'],
    ['argon', 'argon'],
    ['"p and T"', '"p and T"'],
    ['5 [kg/m^3] * m', '5 [kg/m^3] * $c:cm'],
    ['p@9', '$c:cp@9'],
    ['sum(p,', 'sum($c:cp,'],
    ['p * 5 zorks', '$c:cp * 5 zorks'],
  ])('should hold identities for names, and all else as it was written: %j', (text, stored) => {
    expect(bind(text, SCOPE)).toBe(stored)
  })

  it.each([
    ['$c:cm-$c:cm@from', 'm-m@from'],
    ['$c:cT@$r:r2', 'T@[Fill quick]'],
    ['$t:tA.volume', '[Tank A].volume'],
    ['  $c:cp  ', '  p  '],
  ])('should be shown in today’s names: %j', (stored, shown) => {
    expect(show(stored, SCOPE)).toBe(shown)
  })

  it('should show what was deleted, and keep the identity of it', () => {
    const shown = show('$c:gone + $t:lost.volume * p@$r:away', SCOPE)
    expect(shown).toBe('[deleted $c:gone] + [deleted $t:lost].volume * p@[deleted $r:away]')
    expect(bind(shown, SCOPE)).toBe('$c:gone + $t:lost.volume * $c:cp@$r:away')
    const compilation = compile(shown, SCOPE, VOCABULARY)
    expect(!compilation.ok && compilation.fault.fault).toBe('deleted')
  })

  it('should keep apart what two people called the same', () => {
    const scope: Scope = {
      ...SCOPE,
      columns: [...SCOPE.columns, { id: 'c9', symbol: 'p', type: quantityType('mass') }],
    }
    expect(show('$c:cp + $c:c9', scope)).toBe('[p $c:cp] + [p $c:c9]')
    expect(bind('[p $c:cp] + [p $c:c9] + p', scope)).toBe('$c:cp + $c:c9 + p')
  })

  it('should show a state by its number where its label leads to no one place', () => {
    const label = (text: string) =>
      show('p@$r:r1', { ...SCOPE, rows: [{ id: 'r1', label: text }, ...SCOPE.rows.slice(1)] })
    expect(label('as received')).toBe('p@[as received]')
    for (const text of ['', '  ', 'stand', 'a\nb', 'x'.repeat(60), 'tricky $r:r2']) expect(label(text)).toBe('p@1')
    expect(label('odd ] name')).toBe('p@[odd ]] name]')
  })

  it('should write a word of the language in brackets where a thing of the sheet is called so', () => {
    const scope: Scope = { ...SCOPE, things: [{ id: 'tx', name: 'argon', type: SCOPE.things[0].type }] }
    expect(bind('argon + [argon].volume', scope)).toBe('argon + $t:tx.volume')
    expect(show('argon + $t:tx.volume', scope)).toBe('argon + [argon].volume')
  })

  it('should take two spellings of one letter, and blanks around a name, as no difference', () => {
    const scope: Scope = { ...SCOPE, things: [{ id: 'tx', name: 'Behälter', type: SCOPE.things[0].type }] }
    expect(bind('Beha\u0308lter.volume', scope)).toBe('$t:tx.volume')
    expect(bind('[ Behälter ].volume', scope)).toBe('$t:tx.volume')
  })

  it('should point at the same stretch when it is shown', () => {
    const stored = '$c:cT@$r:r2 + tank($t:tA.volume)'
    const at = (part: string) => ({ from: stored.indexOf(part), to: stored.indexOf(part) + part.length })
    const shown = show(stored, SCOPE)
    const stretch = (part: string) => {
      const { from, to } = shownSpan(stored, at(part), SCOPE)
      return shown.slice(from, to)
    }
    expect(shown).toBe('T@[Fill quick] + tank([Tank A].volume)')
    expect(stretch('$c:cT@$r:r2')).toBe('T@[Fill quick]')
    expect(stretch('$c:cT')).toBe('T')
    expect(stretch('tank($t:tA.volume)')).toBe('tank([Tank A].volume)')
    expect(stretch('.volume')).toBe('.volume')
    expect(stretch(' + ')).toBe(' + ')
  })
})

/** A sheet whose names anybody may have chosen, and formulas over it. */
const anyName = fc.oneof(
  fc.constantFrom(
    'p',
    'T',
    'm_dot',
    'Tank A',
    'argon',
    'true',
    'still',
    'a]b',
    '[x]',
    ' spaced ',
    'ü',
    '5 bar',
    'x $c:c1',
    '',
    'from',
    'line\nbreak',
    '"q"',
    '\u202emirrored',
  ),
  fc.string({ maxLength: 8, unit: 'grapheme' }),
)
const scope = fc
  .record({
    columns: fc.array(anyName, { minLength: 1, maxLength: 4 }),
    things: fc.array(anyName, { minLength: 1, maxLength: 3 }),
    rows: fc.array(anyName, { minLength: 1, maxLength: 4 }),
  })
  .map(({ columns, things, rows }): Scope => ({
    columns: columns.map((symbol, i) => ({ id: `c${i}`, symbol, type: quantityType('dimensionless') })),
    things: things.map((name, i) => ({ id: `t${i}`, name, type: SCOPE.things[0].type })),
    rows: rows.map((label, i) => ({ id: `r${i}`, label })),
    words: SCOPE.words,
  }))
const column = fc.constantFrom('$c:c0', '$c:c1', '$c:c2', '$c:gone')
const stored = fc
  .array(
    fc.oneof(
      column,
      fc.tuple(column, fc.constantFrom('@from', '@all', '@$r:r0', '@$r:r1', '@$r:gone')).map(([a, b]) => a + b),
      fc.constantFrom('$t:t0.volume', '$t:t1.volume', 'argon', '5 bar', '"p"', 'unknown', '3'),
    ),
    { minLength: 1, maxLength: 5 },
  )
  .chain((parts) =>
    fc.constantFrom('-', ' - ', '*', ',').map((sign) => (sign === ',' ? `sum(${parts.join(', ')})` : parts.join(sign))),
  )

describe('references by identity', () => {
  it('should be the same after showing and binding, whatever things are called', () => {
    fc.assert(
      fc.property(stored, scope, (text, names) => {
        const kept = text.replace('unknown', 'unknown_to_all')
        expect(bind(show(kept, names), names)).toBe(kept)
        expect(parse(show(kept, names)).problem).toBeNull()
      }),
      { numRuns: process.env.SOAK ? 50_000 : 1_500 },
    )
  })

  it('should mean the same after renaming, reordering, inserting and deleting', () => {
    const readsOf = (text: string, names: Scope) => {
      const compilation = compile(text, names, { ...VOCABULARY, words: new Map() })
      return compilation.ok ? JSON.stringify(compilation.reads) : compilation.fault.fault
    }
    const before: Scope = {
      columns: [0, 1, 2].map((i) => ({ id: `c${i}`, symbol: `s${i}`, type: quantityType('dimensionless') })),
      things: [0, 1].map((i) => ({ id: `t${i}`, name: `Thing ${i}`, type: SCOPE.things[0].type })),
      rows: [0, 1, 2].map((i) => ({ id: `r${i}`, label: `state ${i}` })),
    }
    const formula = fc.constantFrom(
      's0 - s0@from',
      's1@2 * s2',
      's0@[state 1] + s1',
      'max(s2@all) * s0',
      '[Thing 0].volume / [Thing 1].volume',
      's0@1-s0@3',
    )
    const renamed = fc.record({
      order: fc.shuffledSubarray([0, 1, 2], { minLength: 3 }),
      names: fc.uniqueArray(fc.stringMatching(/^[a-z]{3,6}$/), { minLength: 8, maxLength: 8 }),
      inserted: fc.nat(3),
    })
    fc.assert(
      fc.property(formula, renamed, (text, { order, names, inserted }) => {
        const kept = bind(text, before)
        const rows = order.map((i) => ({ id: `r${i}`, label: names[i] }))
        rows.splice(inserted, 0, { id: 'new', label: 'state 1' })
        const after: Scope = {
          columns: order.map((i) => ({ ...before.columns[i], symbol: names[3 + i] })),
          things: before.things.map((thing, i) => ({ ...thing, name: names[6 + i] })),
          rows,
        }
        expect(readsOf(kept, after)).toBe(readsOf(text, before))
        expect(bind(show(kept, after), after)).toBe(kept)
        const without: Scope = { ...after, columns: after.columns.filter(({ id }) => id !== 'c0') }
        expect(readsOf(kept, without)).toBe(kept.includes('$c:c0') ? 'deleted' : readsOf(text, before))
      }),
      { numRuns: 500 },
    )
  })

  it('should leave a tree as it is, but for the names', () => {
    fc.assert(
      fc.property(stored, (text) => {
        const { ast } = parse(text)
        expect(parse(print(ast!)).problem).toBeNull()
        expect(bind(show(print(ast!), SCOPE), SCOPE)).toBe(print(ast!))
      }),
      { numRuns: 300 },
    )
  })
})
