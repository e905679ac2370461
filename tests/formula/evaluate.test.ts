import { describe, expect, it } from 'vitest'
import { STARTS_FROM_NONE, bind, compile, isFault, isThing } from '@/lib/formula'
import type { Fault } from '@/lib/formula'
import { AROUND, SCOPE, VOCABULARY, callsOfCostly, faultOf, tankOf, valueOf } from './vocabulary'

const readsOf = (text: string) => {
  const compilation = compile(text, SCOPE, VOCABULARY)
  if (!compilation.ok) throw new Error(compilation.fault.reason)
  return compilation.reads
}
const BROKEN: Fault = { fault: 'range', reason: 'out of range' }

describe('what a formula gives', () => {
  it.each([
    ['1 + 2 * 3', 7],
    ['(1 + 2) * 3', 9],
    ['2 ^ 3 ^ 2', 512],
    ['2 - 3 - 4', -5],
    ['8 / 4 / 2', 1],
    ['2 * -3', -6],
    ['(-2)^2', 4],
    ['50 % * 4', 2],
    ['(1 + 1) %', 0.02],
    ['.5 + 1e-1', 0.6],
    ['3 × 4 ÷ 2', 6],
    ['7 − 5', 2],
    ['1 ≤ 2', true],
    ['1 <> 1', false],
    ['"Over" = "over"', true],
    ['"a" < "b"', true],
    ['"say ""no"""', 'say "no"'],
    ['"fill " & "quick"', 'fill quick'],
    ['true', true],
    ['1 L = 0.001 [m^3]', true],
    ['57 mm = 0.057 m', true],
    ['5 kN / (2 [cm^2]) = 25 MPa', true],
  ])('%s gives %j', (text, value) => {
    expect(valueOf(text)).toBe(value)
  })

  it('should read cells and things, each once, by identity', () => {
    expect(readsOf('p - p@from + 0 * p')).toEqual([
      { kind: 'cell', column: 'cp', row: { at: 'self' } },
      { kind: 'cell', column: 'cp', row: { at: 'from' } },
    ])
    expect(readsOf('max(p@all) * [Tank A].volume')).toEqual([
      { kind: 'cell', column: 'cp', row: { at: 'all' } },
      { kind: 'thing', thing: 'tA' },
    ])
    expect(readsOf('p@3 * p@[Fill quick] / $c:cp@$r:r2')).toEqual([
      { kind: 'cell', column: 'cp', row: { at: 'row', row: 'r3' } },
      { kind: 'cell', column: 'cp', row: { at: 'row', row: 'r2' } },
    ])
  })

  it('should reach into things', () => {
    expect(valueOf('[Tank A].volume * 2', { tA: tankOf(0.05) })).toBe(0.1)
    expect(valueOf('tank(volume: 5 L, mode: stirred).mode')).toBe('stirred')
    expect(valueOf('tank(5 L).mode')).toBe('still')
    expect(isThing(valueOf('tank(5 L, p: 2 bar)'))).toBe(true)
    expect(valueOf('vessel = [Tank A]', { cv: tankOf(1), tA: tankOf(1) })).toBe(true)
  })

  it('should be compiled once for any number of rows', () => {
    const compilation = compile('p * m', SCOPE, VOCABULARY)
    if (!compilation.ok) throw new Error(compilation.fault.reason)
    for (let row = 0; row < 1000; row++) expect(compilation.run([row, 2], AROUND)).toBe(2 * row)
  })

  it('should know a value that is only typed from one that is worked out', () => {
    const literal = (text: string) => {
      const compilation = compile(text, SCOPE, VOCABULARY)
      return compilation.ok && compilation.literal
    }
    for (const text of ['5', '-5 °C', '5 %', '"fill"', 'argon', '[Tank A]', 'p']) expect(literal(text)).toBe(true)
    for (const text of ['5 + 1', 'p@from', 'tank(5 L)', '-p', '(1 + 1) %', 'vessel.volume'])
      expect(literal(text)).toBe(false)
  })
})

describe('arguments', () => {
  it.each([
    ['tank()', 'tank needs volume: its volume'],
    ['tank(5 L, 3)', 'tank does not take this argument: name it, p, mode'],
    ['tank(5 L, volume: 3 L)', 'tank is given volume twice'],
    ['tank(5 L, P: 3 bar)', 'tank has no argument P; is p meant?'],
    ['tank(5 L, colour: 3 bar)', 'tank has no argument colour; it takes volume, p, mode'],
    ['tank(5 L, mode: shaken)', 'mode of tank is one of still, stirred, not “shaken”'],
    ['tank(5 L, mode: "shaken")', 'mode of tank is one of still, stirred, not “shaken”'],
    ['state(argon, p: 1 bar)', 'state takes two of p, T and rho'],
    ['tnak(5 L)', 'there is no function tnak; is tank meant?'],
    ['wholly_unknown(5 L)', 'there is no function wholly_unknown'],
    ['pi(3)', 'pi does not take this argument'],
  ])('%s: %s', (text, reason) => {
    expect(faultOf(text).reason).toBe(reason)
  })

  it('should be found by their order or by their names, functions in any case', () => {
    expect(valueOf('TANK(mode: still, volume: 5 L).volume')).toBe(0.005)
    expect(valueOf('Sum(1, 2) + SUM(3)')).toBe(6)
  })

  it('should count an empty cell as an argument that was left out', () => {
    expect(valueOf('state(argon, p: p, T: T)', { cp: 1e5, cT: 300 })).toBe(3)
    expect(valueOf('state(argon, p: p, T: T, rho: m / (1 L))', { cp: null, cT: 300, cm: 1 })).toMatchObject({
      fault: 'argument',
    })
    expect(faultOf('state(argon, p: p, T: T)', { cT: 300 })).toMatchObject({
      fault: 'argument',
      reason: 'state takes two of p, T and rho; p is empty',
    })
    expect(valueOf('tank(5 L, mode: step).mode')).toBe('still')
    expect(faultOf('tank(m / (1 [kg/m^3]))').reason).toBe('m is empty')
    expect(faultOf('tank(vessel.volume)').reason).toBe('vessel is empty')
  })

  it('should be checked where they are known only when it is run', () => {
    expect(valueOf('tank(5 L, mode: step).mode', { cs: 'stirred' })).toBe('stirred')
    expect(faultOf('tank(5 L, mode: step)', { cs: 'shaken' }).reason).toBe(
      'mode of tank is one of still, stirred, not “shaken”',
    )
  })
})

describe('mistakes as values', () => {
  it('should carry the place of the call that found them', () => {
    expect(faultOf('1 + 0 * tank(m / (1 [kg/m^3])).volume / (1 L)', { cm: -1 })).toEqual({
      fault: 'range',
      reason: 'a tank has to have a volume',
      span: { from: 8, to: 30 },
    })
    expect(faultOf('m / (m - m)', { cm: 1 })).toMatchObject({ fault: 'range', reason: 'division by zero' })
    expect(faultOf('(0 - 8) ^ 0.5')).toMatchObject({ fault: 'range', reason: 'a broken power of a negative number' })
    expect(faultOf('9e307 * 100')).toMatchObject({ fault: 'range', reason: 'the result is no finite number' })
    expect(faultOf('exp(1e6)')).toMatchObject({ fault: 'range' })
    expect(faultOf('p * 2')).toMatchObject({ fault: 'argument', reason: 'p is empty' })
  })

  it('should say which cell an error came from, and not repeat what is wrong there', () => {
    expect(faultOf(bind('p@3 + 1 bar', SCOPE), { cp: BROKEN })).toEqual({
      fault: 'dependency',
      reason: 'needs p@[stand], which has an error',
      span: { from: 0, to: 11 },
    })
    expect(faultOf('1 L + $t:tA.volume', { tA: BROKEN }).reason).toBe('needs [Tank A], which has an error')
    expect(faultOf('max(p@all)', { cp: [1, BROKEN] }).reason).toBe('needs p@all, in which there is an error')
    expect(faultOf('p@from * 2', { cp: STARTS_FROM_NONE })).toMatchObject({
      fault: 'state',
      reason: 'p@from: this state starts from none',
    })
  })

  it.each([
    ['q', 'name', 'q is not known here: no column, no thing of the rig and no word of the language is called so'],
    [
      'arg0n',
      'name',
      'arg0n is not known here: no column, no thing of the rig and no word of the language is called so; is argon meant?',
    ],
    ['pi', 'name', 'pi is not known here without arguments: write pi(…)'],
    ['5 kJ/kg', 'syntax', 'a compound unit is written in brackets: 5 [kJ/kg]'],
    ['p * 5 W/(m^2 K)', 'syntax', 'a compound unit is written in brackets: 5 [W/(m² K)]'],
    ['2 * kg', 'name', 'kg is not known here; a unit stands behind a number: 5 kg'],
    ['p@9', 'name', 'there is no state 9'],
    ['p@[nowhere]', 'name', 'no state is called “nowhere”'],
    ['[Tank A]@3', 'name', '[Tank A] is no column: only a column can be asked for another state'],
    ['$c:gone', 'deleted', 'the column this formula read was deleted'],
    ['$t:gone.volume', 'deleted', 'the thing of the rig this formula read was deleted'],
    ['p@$r:gone', 'deleted', 'the state this formula read was deleted'],
  ] as const)('%s: %s', (text, code, reason) => {
    expect(faultOf(text)).toMatchObject({ fault: code, reason })
  })

  it('should refuse a name that two people gave at the same moment, by name and by identity', () => {
    const scope = {
      ...SCOPE,
      columns: [...SCOPE.columns, { ...SCOPE.columns[0], id: 'other' }],
      rows: [...SCOPE.rows, { id: 'r4', label: 'stand' }],
      things: [...SCOPE.things, { ...SCOPE.things[0], id: 'tT', name: 'T' }],
    }
    const reason = (text: string) => {
      const compilation = compile(text, scope, VOCABULARY)
      return compilation.ok ? null : compilation.fault.reason
    }
    expect(reason('p')).toBe('two columns are called p: rename one of them')
    expect(reason('$c:cp')).toBe('two columns are called p: rename one of them')
    expect(reason('T')).toBe('a column and a thing of the rig are called T: rename one of them')
    expect(reason('m@[stand]')).toBe('2 states are called “stand”: name it by its number')
    expect(reason('m@3')).toBeNull()
  })

  it('should let a programmer’s mistake through: it is no value', () => {
    const broken = {
      ...VOCABULARY.functions.get('pi')!,
      evaluate: () => {
        throw new TypeError('ours')
      },
    }
    const compilation = compile('pi()', SCOPE, { ...VOCABULARY, functions: new Map([['pi', broken]]) })
    expect(() => compilation.ok && compilation.run([], AROUND)).toThrow('ours')
  })
})

describe('words of the language', () => {
  const named = (name: string) => ({
    ...SCOPE,
    things: [...SCOPE.things, { id: 'tx', name, type: SCOPE.things[0].type }],
  })

  it('should go before a sheet’s own name, which is then written in brackets', () => {
    const scope = named('argon')
    const typeOf = (text: string) => {
      const compilation = compile(text, scope, VOCABULARY)
      return compilation.ok ? compilation.type : compilation.fault.reason
    }
    expect(typeOf('argon')).toEqual({ kind: 'thing', thing: 'gas' })
    expect(typeOf('[argon]')).toEqual({ kind: 'thing', thing: 'tank' })
  })

  it('should be known in any case where no name of the sheet is written so', () => {
    expect(isThing(valueOf('Argon'))).toBe(true)
    expect(compile('Argon', named('Argon'), VOCABULARY)).toMatchObject({ type: { thing: 'tank' } })
  })
})

describe('work that is not asked for', () => {
  it('should not be done by if and iferror', () => {
    const before = callsOfCostly()
    expect(valueOf('if(1 > 2, costly(), 5)')).toBe(5)
    expect(valueOf('iferror(6, costly())')).toBe(6)
    expect(callsOfCostly()).toBe(before)
    expect(valueOf('if(1 < 2, costly(), 5)')).toBe(before + 1)
  })

  it('should not hide an error in the branch that is taken, nor in the condition', () => {
    expect(valueOf('if(1 < 2, 5, 1/0)')).toBe(5)
    expect(faultOf('if(1 < 2, 1/0, 5)').reason).toBe('division by zero')
    expect(faultOf('if(p > 1 bar, 1, 2)', { cp: BROKEN }).fault).toBe('dependency')
    expect(faultOf('if(p > 1 bar, 1, 2)').reason).toBe('p is empty')
    expect(valueOf('iferror(p, 1 bar)', { cp: BROKEN })).toBe(1e5)
    expect(isFault(valueOf('iferror(1/0, 1/0)'))).toBe(true)
  })

  it('should leave a cell empty where the branch taken is', () => {
    expect(valueOf('if(1 > 2, 5)')).toBeNull()
    expect(valueOf('if(1 < 2, p, 1 bar)')).toBeNull()
    expect(valueOf('if(isblank(p), 1 bar, p)')).toBe(1e5)
  })
})
