import { readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { buildParserFile } from '@lezer/generator'
import { describe, expect, it } from 'vitest'
import { LONGEST_FORMULA, parse } from '@/lib/formula'

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
