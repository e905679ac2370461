'use client'

import { useMemo, useState } from 'react'
import { FLUIDS, findFluid } from '@/lib/fluids'
import type { Source } from '@/lib/fluids'
import { formatQuantity } from '@/lib/units'
import { TopBar } from '../layout/top-bar'
import { Caution } from '../sheet/caution'
import { SelectField, TextField } from '../ui/field'
import { domeOf } from './dome'
import { PressureEnthalpy } from './pressure-enthalpy'
import { LETTERS, rowsOf, stateOf } from './state-of-fluid'
import type { Letter, TypedPair } from './state-of-fluid'

const show = (si: number, quantity: string) =>
  Number.isFinite(si) ? formatQuantity(si, { quantity, ambient_Pa: 101_325 }) : '–'
const LETTER_OPTIONS = Object.keys(LETTERS).map((letter) => ({ value: letter, label: letter }))

/** One fluid at a time: where its numbers come from, how far they reach, and its state for a typed pair. */
export function FluidsScreen() {
  const [id, setId] = useState('nitrogen')
  const [typed, setTyped] = useState<TypedPair>({ first: 'p', second: 'T', firstText: '200 bar', secondText: '15 °C' })
  const fluid = findFluid(id)!
  const dome = useMemo(() => domeOf(fluid), [fluid])
  const found = useMemo(() => stateOf(fluid, typed), [fluid, typed])
  const state = 'state' in found ? found.state : null
  const { info } = fluid

  return (
    <>
      <TopBar title="Fluids" />
      <main className="mx-auto grid max-w-6xl gap-4 p-4 lg:grid-cols-2">
        <section className="flex flex-col gap-4 rounded-xl border border-line bg-white p-4" aria-label="State">
          <SelectField
            label="Fluid"
            value={id}
            options={FLUIDS.map((one) => ({ value: one.id, label: one.name }))}
            onChange={(event) => setId(event.target.value)}
          />
          <div className="grid grid-cols-[72px_1fr] gap-3">
            <SelectField
              label="Given"
              value={typed.first}
              options={LETTER_OPTIONS}
              onChange={(event) => setTyped({ ...typed, first: event.target.value as Letter })}
            />
            <TextField
              label="First value"
              mono
              value={typed.firstText}
              onChange={(event) => setTyped({ ...typed, firstText: event.target.value })}
            />
            <SelectField
              label="and"
              value={typed.second}
              options={LETTER_OPTIONS}
              onChange={(event) => setTyped({ ...typed, second: event.target.value as Letter })}
            />
            <TextField
              label="Second value"
              mono
              value={typed.secondText}
              onChange={(event) => setTyped({ ...typed, secondText: event.target.value })}
            />
          </div>
          {'mistake' in found && (
            <p role="alert" className="rounded-md bg-hot-pale px-3 py-2 font-semibold text-hot-ink">
              {found.mistake}
            </p>
          )}
          {state && (
            <table className="w-full text-[13.5px]">
              <caption className="pb-1 text-left text-[12px] font-bold text-dim">
                {fluid.name}, {state.phase}
              </caption>
              <tbody>
                {rowsOf(fluid, state).map((row) => (
                  <tr key={row.name} className="border-t border-line-light">
                    <th scope="row" className="py-1 text-left font-normal text-dim">
                      {row.name}
                    </th>
                    <td className="figures py-1 text-right">{show(row.value, row.quantity)}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          )}
        </section>
        <section
          className="flex flex-col gap-3 rounded-xl border border-line bg-white p-4"
          aria-label="Source and range"
        >
          <PressureEnthalpy name={fluid.name} dome={dome} state={state} />
          {!dome && (
            <p className="text-dim">
              Liquid and vapour of {fluid.name} differ in composition: its two-phase region is not drawn.
            </p>
          )}
          <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-[13.5px]">
            <Fact name="Formula, CAS">{[info.formula, info.cas].filter(Boolean).join(', ')}</Fact>
            <Fact name="Names">{[fluid.id, ...info.otherNames].join(', ')}</Fact>
            <Fact name="Molar mass">{show(info.molarMass_kg_mol, 'molar_mass')}</Fact>
            <Fact name="Critical point">
              {info.critical &&
                `${show(info.critical.T_K, 'temperature')}, ${show(info.critical.p_Pa, 'pressure')}, ${show(info.critical.rho_kg_m3, 'density')}`}
            </Fact>
            <Fact name="Triple point">
              {info.triple && `${show(info.triple.T_K, 'temperature')}, ${show(info.triple.p_Pa, 'pressure')}`}
            </Fact>
            <Fact name="Used here">
              {show(info.T_min_K, 'temperature')} to {show(info.T_max_K, 'temperature')}, up to{' '}
              {show(info.p_max_Pa, 'pressure')}
            </Fact>
          </dl>
          <h2 className="text-[12px] font-bold text-dim">Equation of state</h2>
          {info.sources.map((source) => (
            <Reference key={source.title} source={source} />
          ))}
        </section>
        <div className="lg:col-span-2">
          <Caution />
        </div>
      </main>
    </>
  )
}

function Fact({ name, children }: { readonly name: string; readonly children: React.ReactNode }) {
  return (
    <>
      <dt className="text-dim">{name}</dt>
      <dd className="min-w-0 break-words">{children}</dd>
    </>
  )
}

function Reference({ source }: { readonly source: Source }) {
  const place = [source.journal, source.volume, source.pages].filter(Boolean).join(' ')
  return (
    <p className="text-[13px]">
      {source.authors?.join(', ')}
      {source.authors && ': '}
      <i>{source.title}</i>. {place}
      {source.year && ` (${source.year})`}
      {source.doi && `. doi ${source.doi}`}
    </p>
  )
}
