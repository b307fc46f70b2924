import { describe, expect, it } from 'vitest';

import { jobFile, ohmRun } from '../support/job-file.ts';
import { apart, circuitOf } from './circuit.ts';
import { netlistOf, readRaw } from './netlist.ts';

const circuit = circuitOf(
  jobFile({
    sources: [{ id: 's', bus: 'a', system: '1ph-2w', volts: 120 }],
    runs: [ohmRun('r', 'a', 'b', ['L1', 'N'], 0.25, 0.1)],
    loads: [{ id: 'l', bus: 'b', terminals: 'L1-N', amps: 10, powerFactor: 1 }],
  }),
)!;

describe('a circuit as a deck', () => {
  it('has a source for each given voltage, R and L for each conductor, and the load from line to neutral', () => {
    const deck = netlistOf(circuit, 'out.raw').split('\n');
    const count = (letter: string) => deck.filter((line) => line.startsWith(letter)).length;
    expect([count('V'), count('R'), count('L'), count('I')]).toEqual([2, 2, 2, 1]);
    // 0.1 ohm at 60 Hz, in henries.
    const henries = Number(deck.find((line) => line.startsWith('L'))!.split(' ')[3]);
    expect(henries * 2 * Math.PI * 60).toBeCloseTo(0.1, 14);
  });

  it('finds the volts that the product names: 10 A there and back', () => {
    const lines = circuit.volts.map(([re]) => re);
    expect(Math.max(...lines)).toBe(120);
    expect(lines.some((re) => Math.abs(re - 117.5) < 1e-9)).toBe(true);
    expect(lines.some((re) => Math.abs(re - 2.5) < 1e-9)).toBe(true);
  });

  it('reads node volts out of a raw file, whatever else is in it', () => {
    const raw =
      'Title: t\nNo. Variables: 3\nVariables:\n\t0\tfrequency\tfrequency\n\t1\tv(n2)\tvoltage\n\t2\ti(v0)\tcurrent\nValues:\n 0\t6.0e+01,0.0\n\t1.175e+02,-1.5e+00\n\t1.0,2.0\n';
    const volts = readRaw(raw);
    expect(volts[2]).toEqual([117.5, -1.5]);
    expect(volts.filter((v) => v !== undefined)).toHaveLength(1);
    expect(() => readRaw('nothing')).toThrow('not an ASCII raw file');
  });

  it('measures how far two sets of volts are apart, missing ones without end', () => {
    expect(
      apart(
        [
          [100, 0],
          [0, 0],
        ],
        [
          [100, 0],
          [0, 1],
        ],
      ),
    ).toBe(0.01);
    expect(apart([[100, 0]], [])).toBeNaN();
  });
});
