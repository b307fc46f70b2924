import { describe, expect, it } from 'vitest';
import { reference } from '../../test/support/reference.ts';
import { RACEWAYS } from '../job/vocabulary.ts';
import { conductorImpedance, skinFactor, temperatureCoefficient } from './impedance.ts';

const at = (q: Partial<Parameters<typeof conductorImpedance>[0]>) => {
  const z = conductorImpedance({ material: 'copper', size: '12 AWG', raceway: 'pvc', frequencyHz: 60, ...q });
  if (!z.ok) throw new Error(z.message);
  return z;
};

describe('AWG at 60 Hz and 75 °C: every cell of NEC Chapter 9 Table 9', () => {
  const { rows } = reference<{
    rows: {
      size: string;
      unit: string;
      xl: Record<string, number>;
      r_ac_cu: Record<string, number>;
      r_ac_al: Record<string, number | null>;
    }[];
  }>('conductors-awg-ac');
  it.each(rows.map((row) => [`${row.size} ${row.unit}`, row] as const))('%s', (size, row) => {
    for (const raceway of RACEWAYS) {
      const column = raceway === 'cable' ? 'pvc' : raceway;
      const cu = at({ size, raceway });
      expect(cu.rOhmPerM * 304.8).toBeCloseTo(row.r_ac_cu[column]!, 12);
      expect(cu.xOhmPerM * 304.8).toBeCloseTo(row.xl[column]!, 12);
      expect(cu.estimated).toBe(false);
      const printedAl = row.r_ac_al[column];
      if (printedAl === null) continue;
      expect(at({ size, raceway, material: 'aluminum' }).rOhmPerM * 304.8).toBeCloseTo(printedAl!, 12);
    }
  });
  it('lies, as effective Z at 0.85, within the rounding of the printed column', () => {
    // NECH commentary to Table 9: 1 AWG copper in aluminum conduit, printed 0.16.
    const { rOhmPerM: r, xOhmPerM: x } = at({ size: '1 AWG', raceway: 'aluminum' });
    const z = (r * 0.85 + x * Math.sqrt(1 - 0.85 ** 2)) * 304.8;
    expect(z).toBeGreaterThan(0.155);
    expect(z).toBeLessThan(0.165);
  });
});

describe('direct current: NEC Chapter 9 Table 8, stranded', () => {
  const { rows } = reference<{
    rows: {
      size: string;
      unit: string;
      strands: number;
      r_dc_75C_cu_uncoated_ohm_per_kft: number;
      r_dc_75C_al_ohm_per_kft: number;
    }[];
  }>('conductors-awg-dc');
  it.each(rows.filter((row) => row.strands > 1).map((row) => [`${row.size} ${row.unit}`, row] as const))(
    '%s',
    (size, row) => {
      const cu = at({ size, frequencyHz: 0 });
      expect(cu.rOhmPerM * 304.8).toBeCloseTo(row.r_dc_75C_cu_uncoated_ohm_per_kft, 12);
      expect(cu.xOhmPerM).toBe(0);
      expect(cu.estimated).toBe(false);
      const al = at({ size, frequencyHz: 0, material: 'aluminum' });
      expect(al.rOhmPerM * 304.8).toBeCloseTo(row.r_dc_75C_al_ohm_per_kft, 12);
    },
  );
});

describe('mm²: IEC 60228 class 2 at 20 °C', () => {
  const { rows } = reference<{
    rows: {
      area_mm2: number;
      cu_class2_plain: number;
      al_class1_class2: number | null;
    }[];
  }>('conductors-iec-dc');
  it.each(rows.map((row) => [`${row.area_mm2} mm2`, row] as const))('%s', (size, row) => {
    const cu = at({ size, frequencyHz: 0, temperatureC: 20 });
    expect(cu.rOhmPerM * 1000).toBeCloseTo(row.cu_class2_plain, 12);
    const al = conductorImpedance({
      material: 'aluminum',
      size,
      raceway: 'cable',
      frequencyHz: 0,
      temperatureC: 20,
    });
    if (row.al_class1_class2 === null) expect(al).toMatchObject({ ok: false });
    else expect(al.ok && al.rOhmPerM * 1000).toBeCloseTo(row.al_class1_class2, 12);
  });
  it('takes 0.08 mΩ/m at 50 Hz (IEC 60364-5-52 Annex G), in proportion at 60 Hz', () => {
    expect(at({ size: '16 mm2', frequencyHz: 50 }).xOhmPerM).toBeCloseTo(0.08e-3, 15);
    expect(at({ size: '16 mm2', frequencyHz: 60 }).xOhmPerM).toBeCloseTo(0.096e-3, 15);
    expect(at({ size: '16 mm2', frequencyHz: 50 }).estimated).toBe(true);
  });
  it('is at 70 °C where nothing is said', () => {
    // 16 mm², 1.15 Ω/km at 20 °C: 1.15·[1 + 0.00393·50] = 1.375975 Ω/km before skin effect.
    expect(at({ size: '16 mm2', frequencyHz: 0 }).rOhmPerM * 1000).toBeCloseTo(1.375975, 9);
  });
});

describe('temperature', () => {
  it('follows the note of Table 8: R2 = R1·[1 + 0.00323·(T2 − 75)]', () => {
    expect(at({ temperatureC: 30 }).rOhmPerM / at({}).rOhmPerM).toBeCloseTo(1 - 0.00323 * 45, 12);
    const al = at({ size: '4 AWG', material: 'aluminum', temperatureC: 60 });
    expect(al.rOhmPerM * 304.8).toBeCloseTo(0.51 * (1 - 0.0033 * 15), 12);
  });
  it('shifts α between temperatures: 0.00393 at 20 °C is 0.00323 at 75 °C (NEC and IEC agree to the printed digits)', () => {
    expect(temperatureCoefficient('copper', 20)).toBe(0.00393);
    const shifted = 0.00393 / (1 + 0.00393 * 55);
    expect(Math.abs(shifted - temperatureCoefficient('copper', 75))).toBeLessThan(5e-6);
  });
});

describe('skin effect and what is estimated', () => {
  it('of 1000 kcmil copper, worked by hand: xs² = 8π·60/(0.0129/304.8)·1e-7 = 3.5630, ys = xs⁴/(192 + 0.8·xs⁴) = 0.062798', () => {
    expect(skinFactor(0.0129 / 304.8, 60)).toBeCloseTo(1.062798, 6);
  });
  it('stays below Table 9, which has proximity in it too, to the rounding of the table', () => {
    for (const size of ['500 kcmil', '750 kcmil', '1000 kcmil']) {
      const direct = at({ size, frequencyHz: 0 }).rOhmPerM;
      const printed = at({ size }).rOhmPerM * 304.8;
      expect(direct * skinFactor(direct, 60) * 304.8).toBeLessThan(printed + 0.0005);
    }
  });
  it('is nothing at direct current and next to nothing in a thin wire', () => {
    expect(skinFactor(0.0129 / 304.8, 0)).toBe(1);
    expect(skinFactor(1.98 / 304.8, 60) - 1).toBeLessThan(1e-5);
  });
  it('marks a size that Table 9 lacks and takes the reactance of the nearest area', () => {
    const z = at({ size: '700 kcmil', raceway: 'steel' });
    expect(z.estimated).toBe(true);
    expect(z.xOhmPerM * 304.8).toBeCloseTo(0.048, 12); // 750 kcmil in steel, Table 9
    expect(z.rOhmPerM * 304.8).toBeGreaterThan(0.0184);
    expect(at({ size: '2000 kcmil' }).xOhmPerM * 304.8).toBeCloseTo(0.037, 12); // 1000 kcmil in PVC
  });
  it('scales table reactance with frequency', () => {
    expect(at({ frequencyHz: 50 }).xOhmPerM / at({}).xOhmPerM).toBeCloseTo(50 / 60, 12);
  });
});

describe('the firm’s own rows and refusals', () => {
  const row = {
    name: 'busway A',
    material: 'copper' as const,
    areaMm2: 100,
    r: 0.2,
    x: 0.1,
    per: 'km' as const,
    temperature: 20,
    ampacity: 250,
    source: 'maker’s sheet',
  };
  it('come before the tables, at their own temperature unless the run states one', () => {
    const z = at({ size: 'busway A', conductorRows: [row] });
    expect([z.rOhmPerM, z.xOhmPerM, z.atC, z.source]).toEqual([0.0002, 0.0001, 20, 'conductor-row']);
    expect(at({ size: 'busway A', conductorRows: [row], temperatureC: 70 }).rOhmPerM).toBeCloseTo(
      0.0002 * (1 + 0.00393 * 50),
      15,
    );
  });
  it('names what is missing', () => {
    const lost = conductorImpedance({ material: 'aluminum', size: '4 mm2', raceway: 'pvc', frequencyHz: 50 });
    expect(lost).toEqual({ ok: false, message: expect.stringContaining('aluminum 4 mm2') });
  });
});
