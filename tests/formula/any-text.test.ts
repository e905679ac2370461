import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { bind, callAt, compile, complete, parse, show } from '@/lib/formula'
import type { Fault, Read, Value } from '@/lib/formula'
import { AROUND, SCOPE, VOCABULARY, tankOf } from './vocabulary'
import { seed } from '../support/seed'

const RUNS = process.env.SOAK ? 100_000 : 10_000
const BROKEN: Fault = { fault: 'range', reason: 'out of range' }

/** A value of the kind that a column or thing holds. */
function sample(read: Read): Value {
  if (read.kind === 'thing') return tankOf(1)
  const { type } = SCOPE.columns.find(({ id }) => id === read.column)!
  const one = type.kind === 'quantity' ? 300 : type.kind === 'text' ? 'fill' : tankOf(2)
  return read.row.at === 'all' ? [one, null, one] : one
}

describe('any text at all', () => {
  const valid = [
    'charge(from: run@from, supply: s, until_p: 200 bar).T',
    'if(p > 5 bar(g), "over", "within")',
    'm - m@[Fill quick] + sum(m@all) %',
    '5 [W/(m^2 K)] * [Tank A].volume',
    'tank(volume: 50 L, p: p@3, mode: stirred).volume / $t:tA.volume',
    '$c:cp-$c:cp@$r:r2',
    'sqrt(p / (1 [kg/m^3])) > 3 [m/s]',
  ]
  const mutated = fc
    .tuple(
      fc.constantFrom(...valid),
      fc.array(fc.tuple(fc.nat(60), fc.nat(3), fc.string({ maxLength: 3, unit: 'grapheme' })), { maxLength: 6 }),
    )
    .map(([text, cuts]) => cuts.reduce((so, [at, length, put]) => so.slice(0, at) + put + so.slice(at + length), text))
  const anything = fc.oneof(
    mutated,
    fc.string({ maxLength: 80, unit: 'grapheme' }),
    fc.string({ maxLength: 80, unit: 'binary' }),
  )

  it(`should be answered without a throw, by every entry of the language (seed ${seed})`, () => {
    fc.assert(
      fc.property(anything, (text) => {
        const { ast, problem: found } = parse(text)
        expect(ast === null).toBe(found !== null)
        const compilation = compile(text, SCOPE, VOCABULARY)
        if (compilation.ok) {
          for (const worth of [() => null, () => BROKEN, sample]) compilation.run(compilation.reads.map(worth), AROUND)
        } else {
          const { reason, span } = compilation.fault
          expect(reason).not.toBe('')
          expect(span!.from).toBeGreaterThanOrEqual(0)
          expect(span!.to).toBeLessThanOrEqual(text.length)
        }
        complete(text, Math.floor(text.length / 2), SCOPE, VOCABULARY)
        callAt(text, text.length, VOCABULARY)
        const kept = bind(text, SCOPE)
        expect(bind(show(kept, SCOPE), SCOPE)).toBe(kept)
      }),
      { numRuns: RUNS, seed },
    )
  })

  it.each([
    ['brackets', '('.repeat(10_000)],
    ['calls', 'f('.repeat(5_000)],
    ['calls within the measure', 'f('.repeat(900)],
    ['names', 'a '.repeat(5_000)],
    ['numbers', '1 '.repeat(5_000)],
    ['quotes', 'a"'.repeat(5_000)],
    ['labels', '[a] '.repeat(900)],
    ['states', 'a@'.repeat(999)],
    ['signs', '-'.repeat(999) + '1'],
    ['percents', `1${' %'.repeat(999)}`],
    ['fields', `a${'.b'.repeat(999)}`],
    ['a long sum', Array.from({ length: 1_000 }, () => 'm').join('+')],
    ['a tower of powers', Array.from({ length: 1_000 }, () => '1').join('^')],
    ['a long word', 'ü'.repeat(10_000)],
    ['letters of the right', 'מכל + خزان × ٣'.repeat(600).slice(0, 9_999)],
    ['marks of direction', '\u202e\u2066p\u2069 + \u200fm'.repeat(500)],
    ['halves of characters', '\ud83d'.repeat(9_000)],
    ['huge numbers', `${'9'.repeat(300)} * ${'9'.repeat(300)}`],
    ['a huge power', '10 ^ 1e308'],
    ['a text', `"${'It’s 5 % - or (so). '.repeat(490)}"`],
  ])('should be answered however long and deep it is: %s', (_, text) => {
    const { ast, problem } = parse(text)
    expect(ast === null).toBe(problem !== null)
    const compilation = compile(text, SCOPE, VOCABULARY)
    if (compilation.ok) compilation.run(compilation.reads.map(sample), AROUND)
    expect(bind(show(text, SCOPE), SCOPE)).toHaveLength(bind(text, SCOPE).length)
    complete(text, text.length, SCOPE, VOCABULARY)
  })

  it('should not count what stands in a text as parts of a formula', () => {
    expect(parse(`"${'- '.repeat(3_000)}"`).problem).toBeNull()
  })
})
