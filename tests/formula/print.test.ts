import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parse, print } from '@/lib/formula'
import type { Ast } from '@/lib/formula'
import { seed } from '../support/seed'

const RUNS = process.env.SOAK ? 50_000 : 2_000

/** Trees of every kind, with the spans left out of account. */
const name = fc.stringMatching(/^[a-zA-Z_][a-zA-Z0-9_]{0,6}$/)
const label = fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9 .+-]{0,10}[A-Za-z0-9]$/)
const number = fc.double({ min: 0, max: 1e12, noNaN: true, noDefaultInfinity: true }).map((value) => String(value))
const literal = fc.oneof(
  number,
  fc
    .tuple(number, fc.constantFrom('bar', '°C', 'kg', 'bar(g)', '[W/(m² K)]', '[kg/m³]', '[%]', '%', '[1]', 'm³'))
    .map(([value, unit]) => `${value} ${unit}`),
  fc.string({ maxLength: 8 }).map((text) => `"${text.replaceAll('"', '""')}"`),
)
const reference = fc.oneof(
  name,
  label.map((text) => `[${text}]`),
  fc.constantFrom('[odd ]] name]', '[a ]] b].volume', '[p $c:c1]', 'T@[deleted $r:r9]', '[argon]'),
  fc.tuple(name, fc.constantFrom('@from', '@all', '@3', '@[Fill quick]', '@$r:r1')).map(([text, row]) => text + row),
  fc.constantFrom('$c:c1', '$t:t1@from', '$c:c1@$r:r2'),
)
const formula = fc.letrec<{ any: string }>((tie) => ({
  any: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    literal,
    reference,
    fc
      .tuple(tie('any'), fc.constantFrom('+', '-', '*', '/', '^', '&', '=', '<>', '<', '>=', ' × ', '−'), tie('any'))
      .map(([a, op, b]) => `(${a}) ${op} (${b})`),
    tie('any').map((a) => `(${a}) %`),
    tie('any').map((a) => `${a} %`),
    tie('any').map((a) => `-(${a})`),
    tie('any').map((a) => `-${a}`),
    fc.tuple(tie('any'), fc.constantFrom('+', '*', '^', '&', '<'), tie('any')).map((parts) => parts.join('')),
    fc.tuple(tie('any'), name).map(([a, field]) => `(${a}).${field}`),
    fc.tuple(name, fc.array(tie('any'), { maxLength: 3 })).map(([f, args]) => `${f}(${args.join(', ')})`),
    fc.tuple(name, name, tie('any')).map(([f, argument, value]) => `${f}(${argument}: ${value})`),
  ),
})).any

const withoutSpans = (ast: Ast | null): unknown =>
  JSON.parse(JSON.stringify(ast, (key, value: unknown) => (/span/i.test(key) ? undefined : value)))

describe('printing', () => {
  it(`should print a tree that parses to the same tree (seed ${seed})`, () => {
    let read = 0
    fc.assert(
      fc.property(formula, (text) => {
        const { ast } = parse(text)
        if (!ast) return
        read++
        expect(withoutSpans(parse(print(ast)).ast)).toEqual(withoutSpans(ast))
        expect(print(parse(print(ast)).ast!)).toBe(print(ast))
      }),
      { numRuns: RUNS, seed },
    )
    expect(read).toBeGreaterThan(RUNS / 2)
  })

  it.each([
    ['(1+2)*3', '(1 + 2) * 3'],
    ['1+(2*3)', '1 + 2 * 3'],
    ['2-(3-4)', '2 - (3 - 4)'],
    ['(2^3)^4', '(2 ^ 3) ^ 4'],
    ['2^3^4', '2 ^ 3 ^ 4'],
    ['-5 °C', '-5 °C'],
    ['- (5 °C)', '-(5 °C)'],
    ['5%', '5 %'],
    ['5 [%]', '5 %'],
    ['(5)%', '(5) %'],
    ['[argon].volume', '[argon].volume'],
    ['a≤b', 'a <= b'],
    ['charge( from:run@from,until_p:200 bar ).T', 'charge(from: run@from, until_p: 200 bar).T'],
    ['5 [W/(m^2 K)]', '5 [W/(m² K)]'],
  ])('should write %j as %j', (text, printed) => {
    expect(print(parse(text).ast!)).toBe(printed)
  })
})
