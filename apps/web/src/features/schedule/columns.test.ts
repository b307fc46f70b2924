import { expect, test } from 'vitest';
import { breakerText, lineText, spacesText, wireText } from './columns.ts';
import { openDemoRows, panelOf } from './testing/open-demo.ts';

const rows = openDemoRows();
const circuit = (panel: string, first: number) =>
  panelOf(rows, panel).circuits.find((one) => one.spaces[0] === first)!;

test.each([
  ['LP-2', 7, '7', 'L1', '20/1P', '12 Cu'],
  ['LP-2', 15, '15, 17', 'L2-3', '40/2P', '8 Cu'],
  ['LP-2', 19, '19–23', '3-ph', '40/3P', '8 Cu'],
  ['MDP', 1, '1–5', '3-ph', '70/3P', '4 Cu'],
])('%s space %i reads in narrow columns', (panel, first, spaces, line, breaker, wire) => {
  const one = circuit(panel, first);
  expect([spacesText(one), lineText(one), breakerText(one), wireText(one)]).toEqual([
    spaces,
    line,
    breaker,
    wire,
  ]);
});
