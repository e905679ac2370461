import { describe, expect, it } from 'vitest'
import { analyse, callAt, complete, highlightedParser, signature } from '@/lib/formula'
import { highlightTree, tagHighlighter, tags } from '@lezer/highlight'
import { SCOPE, VOCABULARY, quantityType } from './vocabulary'

/** `|` stands for the cursor. */
function at(marked: string) {
  const position = marked.indexOf('|')
  return { text: marked.replace('|', ''), position }
}
const options = (marked: string) => {
  const { text, position } = at(marked)
  return complete(text, position, SCOPE, VOCABULARY)
}
const labels = (marked: string) => options(marked).options.map(({ label }) => label)

describe('what may stand at the cursor', () => {
  it('should be names, functions and words at the start of a value', () => {
    const all = labels('2 * |')
    for (const label of ['p', 'dT', 'Tank A', 'sum', 'tank', 'argon', 'true']) expect(all).toContain(label)
    expect(options('2 * Ta|').from).toBe(4)
    expect(options('2 * |').options.find(({ label }) => label === 'Tank A')?.apply).toBe('[Tank A]')
  })

  it('should be states after an @', () => {
    expect(labels('p@|')).toEqual(['from', 'all', '1', '2', '3'])
    expect(options('p@[Fi|').options.map(({ apply }) => apply)).toEqual(['[as received]', '[Fill quick]', '[stand]'])
    expect(options('p@[Fi|').from).toBe(2)
  })

  it('should be units behind a number, and not behind the digits of a name', () => {
    expect(labels('5 |')).toContain('bar(g)')
    expect(labels('5 ba|')).toContain('bar')
    expect(labels('(1.5e3 |')).toContain('°C')
    expect(labels('5 [W|')).toContain('W/(m² K)')
    expect(options('5 |').options.find(({ label }) => label === 'W/(m² K)')?.apply).toBe('[W/(m² K)]')
    expect(labels('A1 |')).not.toContain('bar')
    expect(labels('5|')).not.toContain('bar')
  })

  it('should be the fields of what stands before the point', () => {
    expect(labels('vessel.|')).toEqual(['volume', 'mode'])
    expect(labels('2 * vessel@from.vo|')).toEqual(['volume', 'mode'])
    expect(labels('[Tank A].|')).toEqual(['volume', 'mode'])
    expect(labels('1 + tank(5 L, p: 3 bar).|')).toEqual(['volume', 'mode'])
    expect(labels('m.|')).toEqual([])
  })

  it('should be the arguments that are left, and first what suits the one that the cursor is in', () => {
    expect(labels('tank(5 L, p: 2 bar, |').slice(0, 1)).toEqual(['mode:'])
    expect(labels('tank(5 L, mode: |').slice(0, 2)).toEqual(['still', 'stirred'])
    const forPressure = labels('tank(5 L, p: |').filter((label) => ['p', 'T', 'm', 'Tank A'].includes(label))
    expect(forPressure[0]).toBe('p')
    expect(labels('[|')).toContain('Tank A')
  })

  it('should be nothing within a text, nor in a text of any length', () => {
    expect(labels('"half a |')).toEqual([])
    expect(labels(`${'x'.repeat(20_000)}|`)).toEqual([])
  })
})

describe('the call at the cursor', () => {
  it.each([
    ['tank(|', 'tank', 'volume', []],
    ['tank(5 L, p: |', 'tank', 'p', ['p']],
    ['tank(5 L, p: 2 bar|, mode: still)', 'tank', 'p', ['p', 'mode']],
    ['tank(5 L, |', 'tank', null, []],
    ['sum(1, 2, |)', 'sum', 'values', []],
    ['1 + if(p > 1 bar, tank(|', 'tank', 'volume', []],
    ['if(sum(1, 2), |', 'if', 'then', []],
  ])('%s', (marked, name, parameter, given) => {
    const { text, position } = at(marked)
    const call = callAt(text, position, VOCABULARY)
    expect(call && { name: call.spec.name, parameter: call.parameter, given: call.given }).toEqual({
      name,
      parameter,
      given,
    })
  })

  it.each(['1 + |', 'tank(5 L)|', 'nobody(|', '|tank(5 L)'])('should be none at %s', (marked) => {
    const { text, position } = at(marked)
    expect(callAt(text, position, VOCABULARY)).toBeNull()
  })

  it('should be explained part by part', () => {
    expect(signature(VOCABULARY.functions.get('tank')!).map(({ text, optional }) => [text, optional])).toEqual([
      ['volume', false],
      ['p:', true],
      ['mode:', true],
    ])
    expect(signature(VOCABULARY.functions.get('sum')!)[0].text).toBe('values …')
  })
})

describe('what is wrong, for the editor', () => {
  it('should have its place in the text', () => {
    expect(analyse('1 kg + p', SCOPE, VOCABULARY)).toEqual([
      { span: { from: 0, to: 8 }, reason: '1 kg is a mass and p is a pressure: they cannot be added' },
    ])
    expect(
      analyse('p', SCOPE, VOCABULARY, { expected: quantityType('mass'), expectedWords: 'the column Mass' }),
    ).toHaveLength(1)
    expect(analyse('p * 2', SCOPE, VOCABULARY)).toEqual([])
  })
})

describe('colours', () => {
  it('should tell numbers, units, names, functions, arguments and texts apart', () => {
    const text = 'tank(5 L, mode: "x").volume + T@from'
    const found: [string, string][] = []
    const highlighter = tagHighlighter([
      { tag: tags.number, class: 'number' },
      { tag: tags.unit, class: 'unit' },
      { tag: tags.variableName, class: 'name' },
      { tag: tags.function(tags.name), class: 'function' },
      { tag: tags.propertyName, class: 'argument' },
      { tag: tags.attributeName, class: 'field' },
      { tag: tags.labelName, class: 'row' },
      { tag: tags.string, class: 'text' },
    ])
    highlightTree(highlightedParser.parse(text), highlighter, (from, to, style) =>
      found.push([text.slice(from, to), style]),
    )
    expect(found).toEqual([
      ['tank', 'function'],
      ['5', 'number'],
      ['L', 'unit'],
      ['mode', 'argument'],
      ['"x"', 'text'],
      ['volume', 'field'],
      ['T', 'name'],
      ['@from', 'row'],
    ])
  })
})
