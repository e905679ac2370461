import * as Y from 'yjs'
import { fillDocument } from './file'
import type { SheetFile } from './file'

/** The demo: one vessel of a nitrogen accumulator bank, filled from a header at 300 bar. Every name and figure is invented. */
const ACCUMULATOR_FILL: SheetFile = {
  format: 'chargehand-sheet',
  version: 1,
  rig: [
    { name: 'N2', make: 'gas', arguments: { fluid: 'nitrogen' } },
    {
      name: 'A1',
      make: 'vessel',
      arguments: {
        volume: '50 L',
        shell: 'lumped(mass: 52 kg, heat_capacity: 470 [J/(kg K)], area: 0.75 [m^2])',
        inside: '250 [W/(m^2 K)]',
        outside: '6 [W/(m^2 K)]',
        p_high: '250 bar',
        shell_high: '65 °C',
        shell_low: '-20 °C',
      },
    },
    { name: 'Header H', make: 'header', arguments: { gas: 'nitrogen', p: '300 bar', T: '15 °C' } },
    {
      name: 'Bank B',
      make: 'bank',
      arguments: { gas: 'nitrogen', count: '12', volume: '80 L', p: '280 bar', T: '18 °C' },
    },
    { name: 'Needle N', make: 'valve', arguments: { kv: '0.035 [m^3/h]', xt: '0.72' } },
    { name: 'Orifice O', make: 'orifice', arguments: { diameter: '2.5 mm', cd: '0.84' } },
    { name: 'Still air', make: 'surroundings', arguments: { T: '18 °C', p: '1.013 bar' } },
  ],
  columns: [
    { symbol: 'step', label: 'Step', quantity: 'text', width: 58 },
    { symbol: 's', label: 'Supply', quantity: 'supply', width: 78 },
    { symbol: 'via', label: 'Path', quantity: 'path', width: 76 },
    { symbol: 'p_to', label: 'To pressure', quantity: 'pressure', unit: 'bar', width: 72 },
    { symbol: 'T_to', label: 'To temp.', quantity: 'temperature', unit: '°C', width: 68 },
    {
      symbol: 'p',
      label: 'Pressure',
      quantity: 'pressure',
      unit: 'bar',
      width: 72,
      formula: 'run.p',
      high: 'A1.p_high',
    },
    { symbol: 'T_end', label: 'Gas temp.', quantity: 'temperature', unit: '°C', width: 68, formula: 'run.T' },
    {
      symbol: 'T_peak',
      label: 'Peak gas',
      quantity: 'temperature',
      unit: '°C',
      width: 72,
      formula: 'run.T_peak',
      high: 'A1.shell_high',
    },
    {
      symbol: 'check',
      label: 'Margin to the liner’s limit',
      quantity: 'temperature_difference',
      unit: 'K',
      width: 138,
      display: 'margin',
      formula: 'A1.shell_high - run.T_peak',
      high: 'A1.shell_high - A1.ambient',
    },
    { symbol: 'm', label: 'Mass', quantity: 'mass', unit: 'kg', decimals: 3, width: 68, formula: 'run.m' },
    { symbol: 't', label: 'Time', quantity: 'time', unit: 'min', width: 64, formula: 'run.time' },
    { symbol: 'T_low', label: 'Lowest gas', quantity: 'temperature', unit: '°C', width: 76, formula: 'run.T_low' },
    {
      symbol: 'shell_peak',
      label: 'Peak shell',
      quantity: 'temperature',
      unit: '°C',
      width: 76,
      formula: 'run.shell_peak',
      high: 'A1.shell_high',
    },
    {
      symbol: 'shell_low',
      label: 'Lowest shell',
      quantity: 'temperature',
      unit: '°C',
      width: 76,
      formula: 'run.shell_low',
      low: 'A1.shell_low',
    },
    {
      symbol: 'run',
      label: 'Run',
      quantity: 'run',
      width: 190,
      formula:
        'if(step = "start", start(A1, N2, p: p_to, T: T_to), ' +
        'if(step = "charge", charge(from: run@from, supply: s, through: via, until_p: p_to), ' +
        'if(step = "hold", hold(from: run@from, until_T: T_to), ' +
        'vent(from: run@from, through: via, until_p: p_to))))',
    },
  ],
  rows: [
    { label: 'A1 as received', cells: { step: '"start"', p_to: '5 bar', T_to: '18 °C' } },
    { label: 'Fill slow', from: 1, cells: { step: '"charge"', s: '[Header H]', via: '[Needle N]', p_to: '200 bar' } },
    { label: 'Fill quick', from: 1, cells: { step: '"charge"', s: '[Header H]', via: '[Orifice O]', p_to: '200 bar' } },
    { label: 'Stand to 20 °C', from: 3, cells: { step: '"hold"', T_to: '20 °C' } },
    { label: 'Top up', from: 4, cells: { step: '"charge"', s: '[Bank B]', via: '[Needle N]', p_to: '200 bar' } },
    { label: 'Let down', from: 4, cells: { step: '"vent"', via: '[Orifice O]', p_to: '1.1 bar' } },
  ],
}

/** The demo sheet as an update to an empty document. */
export function buildDemoSheet(): Uint8Array {
  const doc = new Y.Doc()
  fillDocument(doc, ACCUMULATOR_FILL)
  return Y.encodeStateAsUpdate(doc)
}
