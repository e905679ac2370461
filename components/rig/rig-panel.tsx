'use client'

import { useState } from 'react'
import type { Scope } from '@/lib/formula'
import { RIG_SECTIONS } from '@/lib/sheet/doc/definition'
import type { RigSection } from '@/lib/sheet/doc/definition'
import type { SheetEdits, TypedThing } from '@/lib/sheet/edits'
import type { ThingView } from '@/lib/sheet/view'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { Menu } from '../ui/menu'
import { addable } from './constructors'
import { ThingDialog } from './thing-dialog'
import { ThingGlyph } from './glyphs'

const HEADINGS: Readonly<Record<RigSection, { readonly plural: string; readonly one: string }>> = {
  gas: { plural: 'Gases', one: 'gas' },
  vessel: { plural: 'Vessels', one: 'vessel' },
  supply: { plural: 'Supplies', one: 'supply' },
  path: { plural: 'Paths', one: 'path' },
  surroundings: { plural: 'Surroundings', one: 'surroundings' },
}

interface RigPanelProps {
  readonly things: readonly ThingView[]
  readonly scope: Scope
  readonly canEdit: boolean
  readonly edits: SheetEdits
  /** How many cells and columns read a thing. */
  readonly usesOf: (id: string) => number
}

type Open = { readonly id: string | null; readonly thing: TypedThing }

/** The things that formulas name. */
export function RigPanel({ things, scope, canEdit, edits, usesOf }: RigPanelProps) {
  const [open, setOpen] = useState<Open | null>(null)
  const [removing, setRemoving] = useState<ThingView | null>(null)
  const taken = [...scope.things, ...scope.columns].map((item) => ('name' in item ? item.name : item.symbol))

  function save(thing: TypedThing) {
    if (open?.id) edits.updateThing(open.id, thing)
    else edits.addThing(thing)
    setOpen(null)
  }

  return (
    <>
      {RIG_SECTIONS.map((section) => {
        const here = things.filter((thing) => thing.section === section)
        const full = section === 'surroundings' && here.length > 0
        return (
          <section key={section} aria-label={HEADINGS[section].plural} className="mb-3">
            <h2 className="mb-1.5 flex items-center justify-between text-[12px] font-bold text-dim">
              {HEADINGS[section].plural}
              {canEdit && !full && (
                <AddButton
                  section={section}
                  onAdd={(make) => setOpen({ id: null, thing: { section, name: '', make, arguments: {} } })}
                />
              )}
            </h2>
            {here.map((thing) => (
              <ThingCard
                key={thing.id}
                thing={thing}
                canEdit={canEdit}
                onEdit={() => setOpen({ id: thing.id, thing })}
                onDuplicate={() => edits.duplicateThing(thing.id, freeName(thing.name, taken))}
                onRemove={() => setRemoving(thing)}
              />
            ))}
            {here.length === 0 && <p className="text-[12.5px] text-dim">None yet.</p>}
          </section>
        )
      })}
      {open && (
        <ThingDialog
          title={
            open.id
              ? `Edit ${open.thing.name}`
              : `New ${HEADINGS[open.thing.section].one}: ${open.thing.make.replaceAll('_', ' ')}`
          }
          thing={open.thing}
          scope={scope}
          taken={taken.filter((name) => name !== open.thing.name)}
          onSave={save}
          onClose={() => setOpen(null)}
        />
      )}
      {removing && (
        <Dialog
          open
          onClose={() => setRemoving(null)}
          title={`Remove ${removing.name}?`}
          description={usedWords(usesOf(removing.id))}
        >
          <div className="flex justify-end gap-2">
            <Button onClick={() => setRemoving(null)}>Keep it</Button>
            <Button
              look="danger"
              onClick={() => {
                edits.removeThing(removing.id)
                setRemoving(null)
              }}
            >
              Remove it
            </Button>
          </div>
        </Dialog>
      )}
    </>
  )
}

function usedWords(uses: number): string {
  if (uses === 0) return 'No formula reads it.'
  return `${uses} ${uses === 1 ? 'formula reads it and' : 'formulas read it and'} will say that it was deleted. Undo brings it back.`
}

function freeName(name: string, taken: readonly string[]): string {
  for (let i = 2; ; i++) if (!taken.includes(`${name} ${i}`)) return `${name} ${i}`
}

function AddButton({ section, onAdd }: { readonly section: RigSection; readonly onAdd: (make: string) => void }) {
  const options = addable(section)
  const label = `Add ${HEADINGS[section].one}`
  if (options.length === 1) {
    return (
      <Button look="text" small aria-label={label} onClick={() => onAdd(options[0].name)}>
        Add
      </Button>
    )
  }
  return (
    <Menu
      label={label}
      trigger={
        <Button look="text" small aria-label={label}>
          Add
        </Button>
      }
      items={options.map((spec) => ({ label: spec.name.replaceAll('_', ' '), onSelect: () => onAdd(spec.name) }))}
    />
  )
}

interface ThingCardProps {
  readonly thing: ThingView
  readonly canEdit: boolean
  readonly onEdit: () => void
  readonly onDuplicate: () => void
  readonly onRemove: () => void
}

function ThingCard({ thing, canEdit, onEdit, onDuplicate, onRemove }: ThingCardProps) {
  return (
    <div
      className={`relative mb-1.5 flex gap-2.5 rounded-lg border bg-white px-2.5 py-2 ${thing.error ? 'border-hot' : 'border-line'}`}
    >
      <ThingGlyph thing={thing} />
      <div className="min-w-0 flex-1">
        <p className="truncate pr-6 font-bold">{thing.name || 'unnamed'}</p>
        {thing.error ? (
          <p className="text-[12.5px] font-semibold text-hot">{thing.error}</p>
        ) : (
          thing.lines.map((line) => (
            <p key={line} className="text-[12.5px] text-dim">
              {line}
            </p>
          ))
        )}
      </div>
      {canEdit && (
        <div className="absolute right-1 top-1">
          <Menu
            label={thing.name}
            trigger={
              <button
                type="button"
                aria-label={`Actions for ${thing.name}`}
                className="grid size-7 place-items-center rounded-md text-dim hover:bg-steel"
              >
                ⋯
              </button>
            }
            items={[
              { label: 'Edit', onSelect: onEdit },
              { label: 'Duplicate', onSelect: onDuplicate },
              { label: 'Remove', onSelect: onRemove, danger: true },
            ]}
          />
        </div>
      )}
    </div>
  )
}
