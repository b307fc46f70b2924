import { describe, expect, it } from 'vitest';
import { reference } from '../../test/support/reference.ts';
import { ampacityAwg, ampacityMm2 } from './ampacity.ts';
import { largestBreaker, nextStandardBreaker, smallConductorLimit, standardBreakers } from './breakers.ts';
import { groundingConductor } from './grounding.ts';
import { codeLetterAmps, lockedRotorAmps, motorAmps } from './motors.ts';
import { TABLE_IDS, tableSources } from './sources.ts';

interface AwgReference {
  rows: ({ size: string } & Record<string, number | null>)[];
  ambient_correction_30C: { rows: Record<'ambient_C_max' | 'f_60C' | 'f_75C' | 'f_90C', number | null>[] };
  standard_ocpd_240_6_A: { rows: number[] };
  egc_250_122: { rows: { ocpd_max: number; cu: string; al: string }[] };
}
const awg = reference<AwgReference>('ampacity-awg');
const named = (size: string) => (size.includes('/') || Number(size) <= 18 ? `${size} AWG` : `${size} kcmil`);

describe('NEC Table 310.16', () => {
  it('has every cell of the reference, and refuses the empty ones', () => {
    let cells = 0;
    for (const row of awg.rows)
      for (const [material, prefix] of [
        ['copper', 'cu'],
        ['aluminum', 'al'],
      ] as const)
        for (const columnC of [60, 75, 90] as const) {
          const printed = row[`${prefix}_${columnC}C`];
          const found = ampacityAwg({ material, size: named(row.size), columnC });
          expect(found.ok ? found.amps : null, `${material} ${row.size} ${columnC}`).toBe(printed);
          cells++;
        }
    expect(cells).toBe(180);
  });
  it('takes the ambient band that the temperature falls in', () => {
    for (const row of awg.ambient_correction_30C.rows)
      for (const columnC of [60, 75, 90] as const) {
        const found = ampacityAwg({
          material: 'copper',
          size: '4 AWG',
          columnC,
          ambientC: row.ambient_C_max,
        });
        expect(found.ok ? found.ambientFactor : null).toBe(row[`f_${columnC}C`]);
      }
    expect(ampacityAwg({ material: 'copper', size: '4 AWG', columnC: 90, ambientC: 86 }).ok).toBe(false);
  });
  it('multiplies ambient and bundling: 8 Cu at 90 °C, 38 °C, six conductors: 55·0.91·0.80 = 40.04 A', () => {
    const found = ampacityAwg({ material: 'copper', size: '8 AWG', columnC: 90, ambientC: 38, bundled: 6 });
    expect(found.ok && found.amps).toBeCloseTo(40.04, 10);
  });
});

describe('IEC 60364-5-52', () => {
  interface IecRow extends Record<string, unknown> {
    conductor_C: 70 | 90;
    loaded_conductors: 2 | 3;
    material: string;
    area_mm2: number;
  }
  const iec = reference<{ rows: IecRow[] }>('ampacity-iec');
  it('has every cell of Tables B.52.2 to B.52.5', () => {
    let cells = 0;
    for (const row of iec.rows)
      for (const method of ['A1', 'A2', 'B1', 'B2', 'C', 'D1', 'D2'] as const) {
        const found = ampacityMm2({
          material: row.material === 'copper' ? 'copper' : 'aluminum',
          size: `${row.area_mm2} mm2`,
          method,
          insulationC: row.conductor_C,
          loaded: row.loaded_conductors,
        });
        expect(found.ok ? found.amps : null).toBe(row[method]);
        cells++;
      }
    expect(cells).toBe(868);
  });
  it('takes the less favourable neighbour between listed ambients and circuits', () => {
    const base = { material: 'copper', size: '16 mm2', method: 'B1', insulationC: 70, loaded: 2 } as const;
    const warm = ampacityMm2({ ...base, ambientC: 37, circuits: 11 });
    expect(warm.ok && [warm.ambientFactor, warm.bundlingFactor]).toEqual([0.87, 0.45]);
    const ground = ampacityMm2({ ...base, method: 'D1', ambientC: 20 });
    expect(ground.ok && [ground.ambientFactor, ground.referenceC]).toEqual([1, 20]);
    expect(ampacityMm2({ ...base, method: 'F' }).ok).toBe(false);
    expect(ampacityMm2({ ...base, circuits: 21 }).ok).toBe(false);
  });
});

describe('breakers, NEC 240.4 and 240.6(A)', () => {
  it('lists the standard ratings', () => expect(standardBreakers()).toEqual(awg.standard_ocpd_240_6_A.rows));
  it('goes to the next standard rating', () => {
    expect([16, 20, 20.1, 101, 6001].map(nextStandardBreaker)).toEqual([20, 20, 25, 110, null]);
  });
  it('lets the next size up protect to 800 A, never above, and holds small conductors to 240.4(D)', () => {
    expect(largestBreaker(130, 'copper', '1 AWG')).toBe(150);
    expect(largestBreaker(855, 'copper', '600 kcmil')).toBe(855);
    expect(largestBreaker(760, 'copper', '500 kcmil')).toBe(800);
    expect(largestBreaker(25, 'copper', '12 AWG')).toBe(20);
    expect(smallConductorLimit('aluminum', '10 AWG')).toBe(25);
    expect(smallConductorLimit('copper', '8 AWG')).toBeNull();
  });
});

describe('equipment grounding conductor, NEC Table 250.122', () => {
  const equal = { floorCmil: 1e6, installedCmil: 1e6, lineCmil: 2e6 };
  it('has every row of the reference', () => {
    for (const { ocpd_max: breakerAmps, cu, al } of awg.egc_250_122.rows) {
      expect(groundingConductor({ ...equal, breakerAmps, material: 'copper' })).toMatchObject({
        size: named(cu),
      });
      expect(groundingConductor({ ...equal, breakerAmps, material: 'aluminum' })).toMatchObject({
        size: named(al),
      });
    }
  });
  it('grows in the ratio of circular mils (250.122(B)): 12 Cu on 20 A, line 12 to 8: 6530·16510/6530 = 16510, 8 AWG', () => {
    expect(
      groundingConductor({
        breakerAmps: 20,
        material: 'copper',
        floorCmil: 6530,
        installedCmil: 16510,
        lineCmil: 16510,
      }),
    ).toMatchObject({ ok: true, size: '8 AWG', tableSize: '12 AWG', upsized: true });
  });
  it('takes the next size up: 6 Cu on 150 A, line 1 to 2/0: 26240·133100/83690 = 41732 cmil, 4 AWG', () => {
    expect(
      groundingConductor({
        breakerAmps: 150,
        material: 'copper',
        floorCmil: 83690,
        installedCmil: 133100,
        lineCmil: 133100,
      }),
    ).toMatchObject({ size: '4 AWG' });
  });
  it('never exceeds the line conductors', () => {
    expect(
      groundingConductor({
        breakerAmps: 30,
        material: 'copper',
        floorCmil: 6530,
        installedCmil: 10380,
        lineCmil: 10380,
      }),
    ).toMatchObject({ size: '10 AWG' });
    expect(groundingConductor({ ...equal, breakerAmps: 6500, material: 'copper' }).ok).toBe(false);
  });
});

describe('motors, NEC 430', () => {
  interface MotorRow extends Record<string, unknown> {
    hp_value: number;
  }
  const { rows } = reference<{ rows: Record<string, MotorRow[]> }>('motors');
  const check = (
    list: MotorRow[],
    prefix: string,
    columns: readonly (readonly [number, number])[],
    amps: (hp: number, volts: number) => ReturnType<typeof motorAmps>,
  ) => {
    for (const row of list)
      for (const [column, volts] of columns) {
        const found = amps(row.hp_value, volts);
        expect(found.ok ? found.amps : null, `${row.hp} hp at ${volts} V`).toBe(row[`${prefix}${column}`]);
      }
  };
  const single = [
    [115, 120],
    [208, 208],
    [230, 240],
  ] as const;
  const three = [
    [115, 120],
    [200, 200],
    [208, 208],
    [230, 240],
    [460, 480],
    [575, 600],
  ] as const;
  it('has every cell of Tables 430.248, 430.250 and 430.251', () => {
    check(rows.table_430_248_single_phase_flc!, 'v', [...single, [200, 200]], (hp, volts) =>
      motorAmps({ hp, volts, phases: 1 }),
    );
    check(rows.table_430_250_three_phase_flc!, 'ind_', three, (hp, volts) =>
      motorAmps({ hp, volts, phases: 3 }),
    );
    check(rows.table_430_251_A_single_phase_locked_rotor!, 'v', single, (hp, volts) =>
      lockedRotorAmps({ hp, volts, phases: 1 }),
    );
    check(rows.table_430_251_B_polyphase_design_BCD_locked_rotor!, 'v', three, (hp, volts) =>
      lockedRotorAmps({ hp, volts, phases: 3 }),
    );
  });
  it('reads 120.09 V of 208Y as the 115 V column, and refuses 277 and 400 V', () => {
    expect(motorAmps({ hp: 0.5, phases: 1, volts: 208 / Math.sqrt(3) })).toMatchObject({
      ok: true,
      amps: 9.8,
    });
    expect(motorAmps({ hp: 0.5, phases: 1, volts: 480 / Math.sqrt(3) })).toMatchObject({ ok: false });
    expect(motorAmps({ hp: 5, phases: 3, volts: 400 })).toMatchObject({ ok: false });
  });
  it('reads 0.33 hp as 1/3 and names the neighbours of a size that is not printed', () => {
    expect(motorAmps({ hp: 0.33, phases: 1, volts: 120 })).toMatchObject({ ok: true, amps: 7.2 });
    expect(motorAmps({ hp: 12, phases: 3, volts: 480 })).toMatchObject({
      message: expect.stringContaining('10 and 15 hp'),
    });
  });
  it('takes the top of a code letter’s band: G, 10 hp, 460 V: 6.29·10·1000/(√3·460) = 78.95 A', () => {
    expect(codeLetterAmps('g', { hp: 10, phases: 3, volts: 460 })).toBeCloseTo(78.947, 2);
    expect(codeLetterAmps('I', { hp: 10, phases: 3, volts: 460 })).toBeNull();
  });
});

describe('sources', () => {
  it('names a standard, an edition or clause, and how far it was seen, for every table', () => {
    const sources = tableSources();
    expect(sources.map((s) => s.id)).toEqual([...TABLE_IDS]);
    for (const { source, verified } of sources) {
      expect(source).toMatch(/^(NFPA 70|IEC \d+)/);
      expect(verified).toMatch(/retrieved|memory/);
    }
  });
});
