import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { STANDARD_FUNCTIONS, compile } from '@/lib/formula'
import type { Fault } from '@/lib/formula'
import { formatQuantity, quantityOf } from '@/lib/units'
import { AROUND, SCOPE, VOCABULARY, faultOf, valueOf } from './vocabulary'

const BROKEN: Fault = { fault: 'range', reason: 'out of range' }

/** As the function reference shows it. */
function shown(text: string): string {
  const compilation = compile(text, SCOPE, VOCABULARY)
  if (!compilation.ok) return compilation.fault.reason
  const value = compilation.run([], AROUND)
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value !== 'number' || compilation.type.kind !== 'quantity') return String(value)
  const { dimension, scale } = compilation.type
  return formatQuantity(value, { quantity: quantityOf(dimension, scale)?.id ?? '', ambient_Pa: AROUND.p_Pa })
}

describe('the standard functions', () => {
  it('should be there under the names of the open standard', () => {
    const asked =
      'sum average min max count if and or not iferror abs sqrt exp ln log10 power round roundup rounddown mod pi median sign isblank iserror'
    expect(STANDARD_FUNCTIONS.map(({ name }) => name).sort()).toEqual(asked.split(' ').sort())
  })

  it.each(STANDARD_FUNCTIONS.map((spec) => [spec.name, spec] as const))(
    '%s should give what its example says',
    (_, { example, help }) => {
      expect(shown(example.formula)).toBe(example.shown)
      expect(help).not.toBe('')
    },
  )

  it('should pass over empty cells and take whole columns with single values', () => {
    expect(valueOf('sum(m@all, 1 kg)', { cm: [1, null, 2] })).toBe(4)
    expect(valueOf('average(m@all)', { cm: [1, null, 2] })).toBe(1.5)
    expect(valueOf('count(m@all, step@all)', { cm: [1, null, BROKEN, 2], cs: ['a'] })).toBe(2)
    expect(valueOf('median(m@all)', { cm: [5, 1, 4, 2] })).toBe(3)
    expect(valueOf('sum(m@all)', { cm: [] })).toBe(0)
    expect(faultOf('max(m@all)', { cm: [null] }).reason).toBe('max has nothing to work on: every cell is empty')
  })

  it('should be what the mathematics say', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        fc.integer({ min: -30_000, max: 30_000 }).map((n) => n / 100),
        (x, y) => {
          const of = (text: string) => valueOf(text.replaceAll('x', `(${x})`).replaceAll('y', `(${y})`)) as number
          const close = (a: number, b: number) =>
            expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-12 * Math.max(1, Math.abs(a), Math.abs(b)))
          close(Math.exp(of('ln(x)')), x)
          close(of('ln(x) / ln(10)'), of('log10(x)'))
          close(of('sqrt(x)^2'), x)
          close(of('power(x, 2)'), x * x)
          close(of('abs(y) * sign(y)'), y)
          const remainder = of('mod(y, x)')
          expect(remainder).toBeGreaterThanOrEqual(0)
          expect(remainder).toBeLessThanOrEqual(x)
          close((y - remainder) / x, Math.round((y - remainder) / x))
        },
      ),
      { numRuns: 200 },
    )
  })

  it.each([
    ['round(2.5)', 3],
    ['round(-2.5)', -3],
    ['round(1.005, 2)', 1.01],
    ['round(1234, -2)', 1200],
    ['round(1e-7, 7)', 1e-7],
    ['round(1e-7, 2)', 0],
    ['round(1e21, 2)', 1e21],
    ['roundup(-3.1)', -4],
    ['roundup(3.21, 1)', 3.3],
    ['rounddown(-3.9)', -3],
    ['rounddown(0.3, 1)', 0.3],
    ['mod(-7, 3)', 2],
    ['mod(7, -3)', -2],
    ['mod(90 min, 1 h) / 1 min', 30],
    ['power(2, -1)', 0.5],
    ['not(1 = 2)', true],
    ['and(1 = 1, 2 = 3)', false],
    ['or(1 = 2, 2 = 2)', true],
    ['iserror(1/0)', true],
  ])('%s is %j', (text, value) => {
    expect(valueOf(text)).toBe(value)
  })

  it.each([
    ['sqrt(0 - 1)', 'a negative number has no square root'],
    ['ln(0)', 'ln takes a number above zero'],
    ['log10(0 - 1)', 'log10 takes a number above zero'],
    ['mod(1, 0)', 'division by zero'],
    ['round(1, 0.5)', 'round takes a whole number of digits, −15 to 15'],
  ])('%s: %s', (text, reason) => {
    expect(faultOf(text)).toMatchObject({ fault: 'range', reason })
  })
})
