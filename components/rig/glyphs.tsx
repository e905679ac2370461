import type { ThingView } from '@/lib/sheet/view'

/** Shoulder colours of EN 1089-3 for what a vessel holds; gases that it does not name go by their hazard, inert by bright green. */
const SHOULDERS: Readonly<Record<string, string>> = {
  nitrogen: '#1B1B1B',
  oxygen: '#FFFFFF',
  hydrogen: '#C1121C',
  parahydrogen: '#C1121C',
  deuterium: '#C1121C',
  argon: '#0E6B3B',
  helium: '#8D5A2B',
  carbon_dioxide: '#8F999E',
  nitrous_oxide: '#1F3A93',
  air: '#57A639',
  ammonia: '#F2C500',
  chlorine: '#F2C500',
  carbon_monoxide: '#F2C500',
  hydrogen_sulfide: '#F2C500',
}
const FLAMMABLE = ['methane', 'ethane', 'ethylene', 'propane', 'n_butane', 'isobutane', 'n_pentane', 'dimethyl_ether']

export function shoulderColour(gas: string): string {
  if (SHOULDERS[gas]) return SHOULDERS[gas]
  return FLAMMABLE.includes(gas) ? '#C1121C' : '#57A639'
}

const INK = '#10222C'
const STROKE = { stroke: INK, strokeWidth: 1.4, fill: 'none' } as const

/** A small drawing of what a thing is. */
export function ThingGlyph({ thing }: { readonly thing: ThingView }) {
  return (
    <svg viewBox="0 0 22 40" className="h-10 w-[22px] shrink-0" aria-hidden="true">
      {drawing(thing)}
    </svg>
  )
}

function drawing({ section, make, arguments: given }: ThingView) {
  switch (section) {
    case 'vessel':
      return <Vessel shoulder={given.gas ? shoulderColour(given.gas.replaceAll('"', '').toLowerCase()) : '#C9D3D7'} />
    case 'gas':
      return <Vessel shoulder={shoulderColour((given.fluid ?? '').replaceAll('"', '').toLowerCase())} />
    case 'supply':
      return make === 'bank' ? (
        <path
          d="M2 34V12q0-4 3-4t3 4v22zM9 34V12q0-4 3-4t3 4v22zM16 34V12q0-4 2.500-4t2.500 4v22z"
          fill="#DCE6EA"
          stroke={INK}
          strokeWidth="1.3"
        />
      ) : make === 'machine' ? (
        <g {...STROKE}>
          <circle cx="11" cy="20" r="9" />
          <path d="M5 14l13 3M5 26l13-3" />
        </g>
      ) : (
        <path d="M1 14h20M1 26h20M6 14v12M16 14v12" {...STROKE} strokeWidth={1.6} />
      )
    case 'path':
      return make === 'valve' ? (
        <path d="M1 12l10 8-10 8zM21 12l-10 8 10 8zM11 20V7M6 7h10" {...STROKE} />
      ) : make === 'pump' ? (
        <g {...STROKE}>
          <circle cx="11" cy="20" r="9" />
          <path d="M4 15l14 5-14 5" />
        </g>
      ) : (
        <path d="M1 12h20M1 28h20M11 12v6M11 22v6" {...STROKE} strokeWidth={1.8} />
      )
    case 'surroundings':
      return (
        <path d="M2 14q5-5 9 0t9 0M2 21q5-5 9 0t9 0M2 28q5-5 9 0t9 0" stroke="#1F6FA8" strokeWidth="1.5" fill="none" />
      )
  }
}

function Vessel({ shoulder }: { readonly shoulder: string }) {
  return (
    <>
      <path
        d="M8 1h6v4q6 2 6 8v22a4 4 0 0 1-4 4H6a4 4 0 0 1-4-4V13q0-6 6-8z"
        fill="#fff"
        stroke={INK}
        strokeWidth="1.3"
      />
      <path d="M2.7 14V11q.6-4 5.6-5.6V1.6h5.4v3.8q5 1.6 5.6 5.6v3z" fill={shoulder} />
      <path d="M2.700 18h16.600v17a3.400 3.400 0 0 1-3.400 3.400H6.100a3.400 3.400 0 0 1-3.400-3.400z" fill="#CFE0E6" />
    </>
  )
}
