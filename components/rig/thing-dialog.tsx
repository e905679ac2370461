'use client'

import { useState } from 'react'
import type { Scope } from '@/lib/formula'
import { compile } from '@/lib/formula'
import type { TypedThing } from '@/lib/sheet/edits'
import { VOCABULARY } from '@/lib/sheet/engine/vocabulary'
import { thingType } from '@/lib/sheet/types'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { TextField } from '../ui/field'
import { ArgumentField, mistakeIn, tidy } from './argument-field'
import { callText, constructorNamed } from './constructors'

interface ThingDialogProps {
  readonly title: string
  readonly thing: TypedThing
  readonly scope: Scope
  /** Names that are taken: a name means one thing. */
  readonly taken: readonly string[]
  readonly onSave: (thing: TypedThing) => void
  readonly onClose: () => void
}

/** The form of a rig thing, made from its constructor's row in the function table. */
export function ThingDialog({ title, thing, scope, taken, onSave, onClose }: ThingDialogProps) {
  const [name, setName] = useState(thing.name)
  const [given, setGiven] = useState<Readonly<Record<string, string>>>(thing.arguments)
  const [tried, setTried] = useState(false)
  const spec = constructorNamed(thing.make)
  if (!spec) return null

  const filled = Object.fromEntries(
    spec.parameters.map((parameter) => [parameter.name, tidy(given[parameter.name] ?? '', parameter)]),
  )
  const nameMistake =
    name.trim() === ''
      ? 'it needs a name, by which formulas call it'
      : taken.includes(name.trim())
        ? `${name.trim()} is taken: a name means one thing`
        : null
  const compilation = compile(callText({ make: thing.make, arguments: filled, repeated: [] }), scope, VOCABULARY, {
    expected: thingType(thing.section),
  })
  const whole = compilation.ok ? null : compilation.fault.reason
  const wrong = spec.parameters.some((parameter) => mistakeIn(given[parameter.name] ?? '', parameter, scope))

  function save(event: React.FormEvent) {
    event.preventDefault()
    setTried(true)
    if (nameMistake || wrong || whole) return
    onSave({ ...thing, name: name.trim(), arguments: filled })
  }

  return (
    <Dialog open onClose={onClose} title={title} description={spec.help} wide>
      <form onSubmit={save} className="flex flex-col gap-4" noValidate>
        <TextField
          label="Name *"
          value={name}
          autoFocus
          maxLength={60}
          error={tried ? nameMistake : null}
          onChange={(event) => setName(event.target.value)}
        />
        <div className="grid gap-4 sm:grid-cols-2">
          {spec.parameters.map((parameter) => (
            <ArgumentField
              key={parameter.name}
              parameter={parameter}
              value={given[parameter.name] ?? ''}
              scope={scope}
              onChange={(value) => setGiven({ ...given, [parameter.name]: value })}
            />
          ))}
        </div>
        {tried && !wrong && whole && (
          <p role="alert" className="font-semibold text-hot">
            {whole}
          </p>
        )}
        <div className="flex justify-end gap-2 border-t border-line pt-3">
          <Button onClick={onClose}>Cancel</Button>
          <Button look="primary" type="submit">
            Save
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
