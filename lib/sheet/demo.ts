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
    { name: 'Still air', make: 'surroundings', arguments: { T: '18 °C', p: '1.013 bar' } },
  ],
  columns: [{ symbol: 'step', label: 'Step', quantity: 'text' }],
  rows: [],
}

/** The demo sheet as an update to an empty document. */
export function buildDemoSheet(): Uint8Array {
  const doc = new Y.Doc()
  fillDocument(doc, ACCUMULATOR_FILL)
  return Y.encodeStateAsUpdate(doc)
}
