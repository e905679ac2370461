import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compile } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import { AROUND, VOCABULARY, quantityType } from './vocabulary'
import { seed } from '../support/seed'

const COLUMNS = {
  m: quantityType('mass'),
  V: quantityType('volume'),
  t: quantityType('time'),
  u: quantityType('specific_energy'),
  L: quantityType('length'),
  n: quantityType('dimensionless'),
}
const NAMES = Object.keys(COLUMNS) as (keyof typeof COLUMNS)[]
const SCOPE: Scope = {
  columns: NAMES.map((symbol) => ({ id: symbol, symbol, type: COLUMNS[symbol] })),
  rows: [],
  things: [],
}

const formula = fc.letrec<{ any: string }>((tie) => ({
  any: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    fc.constantFrom(...NAMES),
    fc.constantFrom('2', '0.5', '3.7'),
    fc.tuple(tie('any'), fc.constantFrom('*', '/'), tie('any')).map(([a, op, b]) => `(${a} ${op} ${b})`),
    fc
      .tuple(tie('any'), fc.constantFrom('+', '-'), fc.constantFrom('0.3', '1'))
      .map(([a, op, k]) => `(${a} ${op} ${k} * ${a})`),
    fc.tuple(tie('any'), fc.constantFrom('+', '-', '>', '='), tie('any')).map(([a, op, b]) => `(${a} ${op} ${b})`),
    fc.tuple(tie('any'), fc.constantFrom('2', '3', '-1', '0.5', '(1/3)')).map(([a, k]) => `abs(${a}) ^ ${k}`),
    tie('any').map((a) => `sqrt(abs(${a}))`),
    tie('any').map((a) => `-(${a})`),
    fc.tuple(tie('any'), tie('any')).map(([a, b]) => `max(${a}, ${b}, 0.2 * ${a})`),
    fc.tuple(tie('any'), tie('any')).map(([a, b]) => `sum(${a}, ${b})`),
    fc.tuple(tie('any'), tie('any'), tie('any')).map(([a, b, c]) => `if(${a} > ${b}, ${c}, 2 * ${c})`),
    tie('any').map((a) => `exp(${a} / (${a} + ${a}))`),
  ),
})).any

/** How a quantity's number changes when the base units are changed: λ to its exponents. */
const scaleOf = (dimension: readonly number[], lambda: readonly number[]) =>
  dimension.reduce((product, exponent, i) => product * lambda[i] ** exponent, 1)

describe('the dimension worked out for a formula', () => {
  it(`should be how its result changes when kilogram, metre and second are changed (seed ${seed})`, () => {
    let checked = 0
    fc.assert(
      fc.property(
        formula,
        fc.array(fc.double({ min: 0.5, max: 4, noNaN: true }), { minLength: NAMES.length, maxLength: NAMES.length }),
        (text, values) => {
          const compilation = compile(text, SCOPE, VOCABULARY)
          if (!compilation.ok) {
            expect(compilation.fault.fault).toBe('dimension')
            return
          }
          const { type, reads, run } = compilation
          const lambda = [3, 5, 7, 1, 1]
          const result = (scaled: boolean) =>
            run(
              reads.map((read) => {
                const name = (read as { column: keyof typeof COLUMNS }).column
                const column = COLUMNS[name]
                const factor = scaled && column.kind === 'quantity' ? scaleOf(column.dimension, lambda) : 1
                return values[NAMES.indexOf(name)] * factor
              }),
              AROUND,
            )
          const [before, after] = [result(false), result(true)]
          if (type.kind === 'quantity' && typeof before === 'number' && typeof after === 'number') {
            checked++
            const expected = before * scaleOf(type.dimension, lambda)
            // a difference of nearly equal numbers is rounding, and tells nothing
            if (Math.abs(before) > 1e-3) expect(Math.abs(after / expected - 1)).toBeLessThan(1e-6)
          }
        },
      ),
      { numRuns: 1_500, seed },
    )
    expect(checked).toBeGreaterThan(400)
  })
})
