import { describe, expect, it } from 'vitest';
import type { JobFile, Transformer } from './schema.ts';
import { jobSchema, transformerSchema } from './schema.ts';
import type { Emfs } from './systems.ts';
import { busSystems, nominalEmfs, secondaryEmfs } from './systems.ts';
import type { Conductor, System } from './vocabulary.ts';

const polar = (emfs: Emfs): Partial<Record<Conductor, [number, number]>> =>
  Object.fromEntries(
    Object.entries(emfs).map(([c, [re, im]]) => {
      const size = Math.hypot(re, im);
      const degrees = size === 0 ? 0 : (Math.atan2(im, re) * 180) / Math.PI;
      return [
        c,
        [Number(size.toFixed(6)), Number(degrees.toFixed(6)) === -180 ? 180 : Number(degrees.toFixed(6))],
      ];
    }),
  );

describe('nominal EMFs of each supply system (model: volts between lines, except 1ph-2w and dc-2w)', () => {
  const cases: [System, number, Partial<Record<Conductor, [number, number]>>][] = [
    ['dc-2w', 48, { L1: [48, 0], N: [0, 0] }],
    ['1ph-2w', 230, { L1: [230, 0], N: [0, 0] }],
    ['1ph-3w', 240, { L1: [120, 0], L2: [120, 180], N: [0, 0] }],
    ['1ph-3w-wye', 208, { L1: [120.088856, 0], L2: [120.088856, -120], N: [0, 0] }],
    ['3ph-3w', 480, { L1: [277.128129, 0], L2: [277.128129, -120], L3: [277.128129, 120] }],
    ['3ph-4w', 400, { L1: [230.940108, 0], L2: [230.940108, -120], L3: [230.940108, 120], N: [0, 0] }],
    // High leg: 240·√3/2 = 207.846 V.
    ['3ph-4w-delta', 240, { L1: [120, 0], L2: [207.846097, -90], L3: [120, 180], N: [0, 0] }],
  ];
  it.each(cases)('%s', (system, volts, expected) =>
    expect(polar(nominalEmfs(system, volts))).toEqual(expected),
  );
});

describe('secondary of a transformer', () => {
  const transformer = (t: Partial<Transformer>): Transformer =>
    transformerSchema.parse({
      id: 'T',
      from: 'a',
      to: 'b',
      kva: 75,
      primaryVolts: 480,
      secondaryVolts: 208,
      connection: 'delta-wye',
      percentZ: 5,
      xOverR: 2,
      system: '3ph-4w',
      ...t,
    });
  const star480 = nominalEmfs('3ph-3w', 480);

  it('lags by 30° stepping down and at equal volts, leads stepping up (IEEE C57.12.00)', () => {
    expect(polar(secondaryEmfs(transformer({}), star480)!).L1).toEqual([120.088856, -30]);
    expect(polar(secondaryEmfs(transformer({ secondaryVolts: 480 }), star480)!).L1).toEqual([
      277.128129, -30,
    ]);
    expect(polar(secondaryEmfs(transformer({ secondaryVolts: 600 }), star480)!).L1).toEqual([346.410162, 30]);
  });
  it('keeps the angle between windings of one kind, and takes the mid-point of L3–L1 as neutral of a high leg', () => {
    expect(polar(secondaryEmfs(transformer({ connection: 'wye-wye' }), star480)!).L2).toEqual([
      120.088856, -120,
    ]);
    const high = secondaryEmfs(
      transformer({ connection: 'delta-delta', secondaryVolts: 240, system: '3ph-4w-delta' }),
      star480,
    )!;
    // The L3–L1 winding lies along the primary's: L1–N at −30°, the high leg a quarter turn behind it.
    expect(polar(high)).toEqual({ L1: [120, -30], L2: [207.846097, -120], L3: [120, 150], N: [0, 0] });
  });
  it('follows the pair that a single-phase unit sits on', () => {
    const single = transformer({
      connection: 'single-phase',
      primary: 'L1-L2',
      secondaryVolts: 240,
      system: '1ph-3w',
    });
    expect(polar(secondaryEmfs(single, star480)!)).toEqual({ L1: [120, 30], L2: [120, -150], N: [0, 0] });
    expect(secondaryEmfs(transformer({}), nominalEmfs('1ph-3w', 240))).toBeNull();
  });
});

describe('busSystems', () => {
  const job = (parts: Partial<JobFile>) =>
    jobSchema.parse({
      format: 'farlug-job/1',
      name: 'x',
      lengthUnit: 'ft',
      sources: [{ id: 's', bus: 'S', system: '3ph-4w', volts: 480, openVolts: 492 }],
      ...parts,
    });
  const run = (
    id: string,
    from: string,
    to: string,
    conductors: Conductor[] = ['L1', 'L2', 'L3', 'N'],
    open = false,
  ) => ({ id, kind: 'feeder', from, to, length: 10, conductors, size: '3/0', open }) as const;

  it('carries system, open ratio and source bus through runs and transformers', () => {
    const systems = busSystems(
      job({
        runs: [run('a', 'S', 'P'), run('b', 'T', 'Q', ['L1', 'N'])],
        transformers: [
          {
            id: 'T1',
            from: 'P',
            to: 'T',
            kva: 75,
            primaryVolts: 480,
            secondaryVolts: 208,
            connection: 'delta-wye',
            percentZ: 5,
            xOverR: 2,
            system: '3ph-4w',
          },
        ],
      }),
    );
    const far = systems.get('Q')!;
    expect(far.conductors).toEqual(['L1', 'N']);
    expect(far.origin).toMatchObject({
      volts: 208,
      openRatio: 1.025,
      sourceBus: 'S',
      source: 0,
      transformer: 0,
    });
    expect(systems.get('P')!.origin).toBe(systems.get('S')!.origin);
  });

  it('collects the conductors that several runs bring', () => {
    const systems = busSystems(
      job({
        runs: [
          run('a', 'S', 'M', ['L1', 'N']),
          run('b', 'S', 'M', ['L2', 'N']),
          run('c', 'M', 'E', ['L2', 'N']),
        ],
      }),
    );
    expect(systems.get('M')!.conductors).toEqual(['L1', 'L2', 'N']);
    expect(systems.get('E')!.conductors).toEqual(['L2', 'N']);
  });

  it('takes the first source that reaches a bus; open runs and sources that are off come last', () => {
    const systems = busSystems(
      job({
        sources: [
          { id: 's', bus: 'S', system: '3ph-4w', volts: 480, off: true },
          { id: 'g', bus: 'G', system: '3ph-4w', volts: 490 },
        ],
        runs: [
          run('a', 'S', 'P'),
          run('b', 'G', 'P'),
          run('c', 'P', 'Q', ['L1', 'N'], true),
          run('d', 'Z', 'Y'),
        ],
      }),
    );
    expect(systems.get('P')!.origin.source).toBe(1);
    expect(systems.get('Q')).toMatchObject({ live: false, conductors: ['L1', 'N'] });
    expect(systems.has('Y')).toBe(false);
  });
});
