import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { buildParserFile } from '@lezer/generator'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { LONGEST_FORMULA, bind, compile, complete, parse, print, show } from '@/lib/formula'
import type { Ast } from '@/lib/formula'
import { SCOPE, VOCABULARY } from './vocabulary'

const RUNS = process.env.SOAK ? 100_000 : 5_000

const problem = (text: string) => parse(text).problem

describe('the committed parser', () => {
  it('should be in step with the grammar', () => {
    const file = (name: string) =>
      readFileSync(fileURLToPath(new URL(`../../lib/formula/${name}`, import.meta.url)), 'utf8')
    const built = buildParserFile(file('formula.grammar'), {
      fileName: 'formula.grammar',
      typeScript: true,
      moduleStyle: 'es',
    })
    const tables = (text: string) => /parserData|states: *"(?:[^"\\]|\\.)*"/.exec(text)?.[0]
    expect(tables(file('parser.ts'))).toBe(tables(built.parser))
    expect(tables(built.parser)).toContain('states')
  })
})

describe('what cannot be read', () => {
  it.each([
    ['', 'there is no formula', 0],
    ['(1 + ', 'a value is missing after +', 5],
    ['f(a', 'a closing bracket is missing', 3],
    ['f(a))', 'there is a closing bracket too many', 4],
    ['"abc', 'a text is not closed: a quotation mark is missing', 0],
    ['[Header', 'a square bracket is not closed', 0],
    ['sum(1,)', 'a value is missing after the comma', 6],
    ['1 + * 2', 'a value is missing before *', 4],
    ['5 zorks', 'no unit is called “zorks”; a product is written with a sign: 5 * zorks', 2],
    ['1 200 kg', 'a number is written without blanks', 2],
    ['1,5 bar', 'a comma stands only between the arguments of a function; decimals are written with a point', 1],
    ['5 J/(kg K) + m', 'a compound unit is written in brackets: 5 [J/(kg K)]', 2],
    ['3 + 470 J/(kg', 'a closing bracket is missing', 13],
    ['5.', 'a digit is missing after the point', 2],
    ['p.', 'the name of a field is missing after the point', 2],
    ['p T', '“T” cannot stand here: an operator is missing before it', 2],
    ['sum(p T)', '“T” cannot stand here: an operator, a comma or a closing bracket is missing before it', 6],
    ['[a] [b]', '“[b]” cannot stand here: an operator is missing before it', 4],
    ['()', 'a value is missing between the brackets', 1],
    ['T@fill', 'after @ stands from, all, a state’s number, or its label in brackets: @[fill]', 1],
    ['T@)', 'after @ stands from, all, a state’s number, or its label in brackets', 2],
    ['T@', 'after @ stands from, all, a state’s number, or its label in brackets', 2],
    ['-2^2', 'a sign before a power can be read two ways: write (-2)^2 or -(2^2)', 0],
    ['$r:r1', 'a state cannot stand alone: it follows an @', 0],
  ])('should say of %j what is wrong and where', (text, reason, from) => {
    expect(problem(text)).toMatchObject({ reason, span: { from } })
  })

  it('should refuse what nobody could read, in bounded time', () => {
    expect(problem('('.repeat(300) + '1' + ')'.repeat(300))?.reason).toContain('nested too deeply')
    expect(problem(Array.from({ length: 3000 }, () => '1').join('+'))?.reason).toContain('more parts')
    expect(problem('1'.repeat(LONGEST_FORMULA + 1))?.reason).toContain(`${LONGEST_FORMULA} characters`)
    expect(problem('9'.repeat(400))?.reason).toBe('this number is too great to be worked with')
  })
})

/** Trees of every kind, with the spans left out of account. */
const name = fc.stringMatching(/^[a-zA-Z_][a-zA-Z0-9_]{0,6}$/)
const label = fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9 .+-]{0,10}[A-Za-z0-9]$/)
const number = fc.double({ min: 0, max: 1e12, noNaN: true, noDefaultInfinity: true }).map((value) => String(value))
const literal = fc.oneof(
  number,
  fc
    .tuple(number, fc.constantFrom('bar', '°C', 'kg', 'bar(g)', '[W/(m² K)]', '[kg/m³]'))
    .map(([value, unit]) => `${value} ${unit}`),
  fc.string({ maxLength: 8 }).map((text) => `"${text.replaceAll('"', '""')}"`),
)
const reference = fc.oneof(
  name,
  label.map((text) => `[${text}]`),
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
    tie('any').map((a) => `-(${a})`),
    fc.tuple(tie('any'), name).map(([a, field]) => `(${a}).${field}`),
    fc.tuple(name, fc.array(tie('any'), { maxLength: 3 })).map(([f, args]) => `${f}(${args.join(', ')})`),
    fc.tuple(name, name, tie('any')).map(([f, argument, value]) => `${f}(${argument}: ${value})`),
  ),
})).any

const withoutSpans = (ast: Ast | null): unknown =>
  JSON.parse(JSON.stringify(ast, (key, value: unknown) => (/span/i.test(key) ? undefined : value)))

describe('printing', () => {
  it('should print a tree that parses to the same tree', () => {
    fc.assert(
      fc.property(formula, (text) => {
        const { ast } = parse(text)
        if (!ast) return
        expect(withoutSpans(parse(print(ast)).ast)).toEqual(withoutSpans(ast))
      }),
      { numRuns: RUNS / 5 },
    )
  })

  it.each([
    ['(1+2)*3', '(1 + 2) * 3'],
    ['1+(2*3)', '1 + 2 * 3'],
    ['2-(3-4)', '2 - (3 - 4)'],
    ['(2^3)^4', '(2 ^ 3) ^ 4'],
    ['2^3^4', '2 ^ 3 ^ 4'],
    ['-5 °C', '-5 °C'],
    ['charge( from:run@from,until_p:200 bar ).T', 'charge(from: run@from, until_p: 200 bar).T'],
    ['5 [W/(m^2 K)]', '5 [W/(m² K)]'],
  ])('should write %j as %j', (text, printed) => {
    expect(print(parse(text).ast!)).toBe(printed)
  })
})

describe('any text at all', () => {
  const valid = [
    'charge(from: run@from, supply: s, until_p: 200 bar).T',
    'if(p > 5 bar(g), "over", "within")',
    'm - m@[Fill quick] + sum(m@all) %',
    '5 [W/(m^2 K)] * [Tank A].volume',
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

  it('should be answered without a throw, by every entry of the language', () => {
    fc.assert(
      fc.property(anything, (text) => {
        const { ast, problem: found } = parse(text)
        expect(ast === null).toBe(found !== null)
        const compilation = compile(text, SCOPE, VOCABULARY)
        if (compilation.ok)
          compilation.run(
            compilation.reads.map(() => null),
            { p_Pa: 1e5, T_K: 290 },
          )
        else expect(compilation.fault.reason).not.toBe('')
        complete(text, Math.floor(text.length / 2), SCOPE, VOCABULARY)
        expect(typeof show(bind(text, SCOPE), SCOPE)).toBe('string')
      }),
      { numRuns: RUNS },
    )
  })
})
