'use client'

import { useId } from 'react'
import { analyse } from '@/lib/formula'
import type { Parameter, Scope } from '@/lib/formula'
import { VOCABULARY } from '@/lib/sheet/engine/vocabulary'
import { QUANTITIES, readQuantity, sameDimension } from '@/lib/units'
import { Field, TextField } from '../ui/field'
import { Button } from '../ui/button'
import { callText, constructorNamed, constructorsOf, nestedKind, partsOfCall, typesOf } from './constructors'

interface ArgumentFieldProps {
  readonly parameter: Parameter
  readonly value: string
  readonly scope: Scope
  readonly onChange: (value: string) => void
}

/** One argument of a constructor: a quantity or a formula as text, or a constructor of its own with its fields. */
export function ArgumentField(props: ArgumentFieldProps) {
  const kind = nestedKind(props.parameter)
  const isText = props.value !== '' && partsOfCall(props.value) === null
  return kind !== null && !isText ? <NestedField {...props} kind={kind} /> : <TextArgument {...props} />
}

/** "p_high" is shown as "p high": symbols that people know, spaced. */
const labelOf = (parameter: Parameter) =>
  `${parameter.name.replaceAll('_', ' ')}${parameter.optional || parameter.default !== undefined ? '' : ' *'}`

function TextArgument({ parameter, value, scope, onChange }: ArgumentFieldProps) {
  const list = useId()
  const isGas = typesOf(parameter).some((type) => type.kind === 'thing' && type.thing === 'gas')
  return (
    <>
      <TextField
        label={labelOf(parameter)}
        hint={`${parameter.help}${example(parameter)}`}
        error={mistakeIn(value, parameter, scope)}
        mono
        value={value}
        list={isGas ? list : undefined}
        onChange={(event) => onChange(event.target.value)}
        onBlur={() => onChange(tidy(value, parameter))}
      />
      {isGas && (
        <datalist id={list}>
          {[...VOCABULARY.words].flatMap(([word, { type, help }]) =>
            type.kind === 'thing' && type.thing === 'gas' ? [<option key={word} value={word} label={help} />] : [],
          )}
        </datalist>
      )}
    </>
  )
}

function quantityOfParameter(parameter: Parameter) {
  const type = typesOf(parameter).find((candidate) => candidate.kind === 'quantity')
  if (type?.kind !== 'quantity') return undefined
  return QUANTITIES.find(
    (quantity) => sameDimension(quantity.dimension, type.dimension) && quantity.scale === type.scale,
  )
}

function example(parameter: Parameter): string {
  if (parameter.default !== undefined) return `; left out: ${parameter.default}`
  const quantity = quantityOfParameter(parameter)
  return quantity && quantity.units[0] !== '1' ? `, in ${quantity.units[0]} or with its unit` : ''
}

/** What is read as a quantity (3/8 in, a plain number) is written as the formula that it means. */
export function tidy(value: string, parameter: Parameter): string {
  const quantity = quantityOfParameter(parameter)
  if (!quantity || value.trim() === '') return value
  const reading = readQuantity(value, { quantity: quantity.id, unit: quantity.units[0], ambient_Pa: 101_325 })
  return reading.ok ? reading.formula : value
}

export function mistakeIn(value: string, parameter: Parameter, scope: Scope): string | null {
  if (value.trim() === '') return null
  const types = typesOf(parameter)
  const text = tidy(value, parameter)
  const all = types.map((expected) =>
    analyse(text, scope, VOCABULARY, { expected, expectedWords: parameter.name.replaceAll('_', ' ') }),
  )
  return all.some((mistakes) => mistakes.length === 0) ? null : all[0][0].reason
}

function NestedField({ parameter, value, scope, onChange, kind }: ArgumentFieldProps & { readonly kind: string }) {
  const parts = value === '' ? null : partsOfCall(value)
  const options = constructorsOf(kind)
  const takesNumber = typesOf(parameter).some((type) => type.kind === 'quantity')
  const spec = parts && constructorNamed(parts.make)
  const repeating = spec?.parameters.find((candidate) => candidate.repeats)
  return (
    <fieldset className="flex flex-col gap-3 rounded-lg border border-line p-3 sm:col-span-2">
      <Field label={labelOf(parameter)} hint={parameter.help}>
        {({ id, describedBy }) => (
          <select
            id={id}
            aria-describedby={describedBy}
            className="w-full rounded-md border border-line bg-white px-2.5 py-1.5"
            value={parts?.make ?? ''}
            onChange={(event) => onChange(chosen(event.target.value))}
          >
            <option value="">{parameter.optional ? 'none' : 'choose'}</option>
            {takesNumber && <option value="#">a fixed value</option>}
            {options.map((option) => (
              <option key={option.name} value={option.name}>
                {option.name.replaceAll('_', ' ')}: {option.help}
              </option>
            ))}
          </select>
        )}
      </Field>
      {parts && spec && (
        <div className="grid gap-3 sm:grid-cols-2">
          {spec.parameters
            .filter((inner) => !inner.repeats)
            .map((inner) => (
              <ArgumentField
                key={inner.name}
                parameter={inner}
                value={parts.arguments[inner.name] ?? ''}
                scope={scope}
                onChange={(next) =>
                  onChange(callText({ ...parts, arguments: { ...parts.arguments, [inner.name]: next } }))
                }
              />
            ))}
          {repeating && (
            <div className="flex flex-col gap-2 sm:col-span-2">
              {parts.repeated.map((text, i) => (
                <ArgumentField
                  key={i}
                  parameter={{ ...repeating, name: `${repeating.name} ${i + 1}`, repeats: false, optional: true }}
                  value={text}
                  scope={scope}
                  onChange={(next) =>
                    onChange(
                      callText({ ...parts, repeated: parts.repeated.map((other, j) => (j === i ? next : other)) }),
                    )
                  }
                />
              ))}
              <Button
                small
                onClick={() => onChange(callText({ ...parts, repeated: [...parts.repeated, first(repeating)] }))}
              >
                Add a {repeating.name}
              </Button>
            </div>
          )}
        </div>
      )}
    </fieldset>
  )
}

/** A fresh argument of what is chosen: empty, a number to be typed over, or a constructor with nothing filled in. */
const chosen = (name: string): string => (name === '' ? '' : name === '#' ? '1' : `${name}()`)

function first(repeating: Parameter): string {
  const kind = nestedKind(repeating)
  return kind === null ? '' : `${constructorsOf(kind)[0].name}()`
}
