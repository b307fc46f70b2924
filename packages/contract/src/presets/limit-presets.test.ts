import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { LIMIT_PRESETS, limitsFromPreset } from './limit-presets.ts';

interface ReferenceRow {
  id: string;
  limit_percent: number | Record<string, number> | null;
  combined_limit_percent?: number;
}
// fixtures/reference/limits.json: clauses of codes with their figures, kept apart from the presets.
const reference: {
  rows: ReferenceRow[];
  ansi_c84_1: { rows: { nominal: string; range_A: { utilization_min: string; utilization_max: string } }[] };
} = JSON.parse(readFileSync(new URL('../../../../fixtures/reference/limits.json', import.meta.url), 'utf8'));

const row = (id: string): ReferenceRow => reference.rows.find((one) => one.id === id)!;
const limits = (id: string) => limitsFromPreset(LIMIT_PRESETS.find((preset) => preset.id === id)!);

describe('limit presets agree with the clauses that they name', () => {
  test.each([
    ['nec-notes', 'branch', 'NEC-210.19-IN', 'limit_percent'],
    ['nec-notes', 'total', 'NEC-210.19-IN', 'combined_limit_percent'],
    ['nec-notes', 'feeder', 'NEC-215.2-IN', 'limit_percent'],
    ['nec-695', 'starting', 'NEC-695.7-start', 'limit_percent'],
    ['iec-g52-public', 'total', 'IEC-G52-A-other', 'limit_percent'],
    ['iec-g52-private', 'total', 'IEC-G52-B-other', 'limit_percent'],
    ['as-nzs-3000', 'total', 'AS3000-3.6.2', 'limit_percent'],
    ['csa-8-102', 'branch', 'CSA-8-102-part', 'limit_percent'],
    ['csa-8-102', 'total', 'CSA-8-102-total', 'limit_percent'],
    ['ashrae-2010', 'feeder', 'ASHRAE-90.1-feeder', 'limit_percent'],
    ['ashrae-2010', 'branch', 'ASHRAE-90.1-branch', 'limit_percent'],
    ['ashrae-2016', 'total', 'ASHRAE-90.1-total', 'limit_percent'],
    ['iecc', 'total', 'IECC-total', 'limit_percent'],
  ] as const)('%s %s', (preset, kind, id, key) => {
    expect(limits(preset)[kind]).toBe(row(id)[key]);
  });

  test('by class', () => {
    expect(limits('iec-g52-public').byClass.lighting?.total).toBe(row('IEC-G52-A-light').limit_percent);
    expect(limits('iec-g52-private').byClass.lighting?.total).toBe(row('IEC-G52-B-light').limit_percent);
    for (const [preset, id] of [
      ['nec-647-fixed', 'NEC-647.4(D)(1)'],
      ['nec-647-cord', 'NEC-647.4(D)(2)'],
    ] as const) {
      expect(limits(preset).byClass.sensitive?.branch).toBe(row(id).limit_percent);
      expect(limits(preset).byClass.sensitive?.total).toBe(row(id).combined_limit_percent);
    }
    for (const [preset, id] of [
      ['bs7671-public', 'BS7671-4Ab-A'],
      ['bs7671-private', 'BS7671-4Ab-B'],
    ] as const) {
      const { lighting, other } = row(id).limit_percent as Record<string, number>;
      expect(limits(preset).byClass.lighting?.total).toBe(lighting);
      expect(limits(preset).total).toBe(other);
    }
  });

  test('terminal volts and ratings', () => {
    const rangeA = (nominal: string) =>
      reference.ansi_c84_1.rows.find((one) => one.nominal === nominal)!.range_A;
    const { lowestVolts, highestVolts } = limits('ansi-c84-1');
    expect(lowestVolts).toMatchObject({
      120: Number(rangeA('120').utilization_min),
      480: Number(rangeA('480').utilization_min),
    });
    expect(highestVolts).toMatchObject({
      120: Number(rangeA('120').utilization_max),
      600: Number(rangeA('600').utilization_max),
    });
    expect(
      `${(lowestVolts as Record<string, number>)[208]}Y/${(lowestVolts as Record<string, number>)[120]}`,
    ).toBe(rangeA('208Y/120').utilization_min);
    expect(
      `${(lowestVolts as Record<string, number>)[480]}Y/${(lowestVolts as Record<string, number>)[277]}`,
    ).toBe(rangeA('480Y/277').utilization_min);
    const tenth = row('NEMA-MG1-voltage').limit_percent as number;
    expect(limits('nema-mg1').rating).toEqual({ low: 100 - tenth, high: 100 + tenth });
    expect(limits('nec-695').rating?.low).toBe(100 - (row('NEC-695.7-run').limit_percent as number));
  });

  test('each names its clause and how far it was seen', () => {
    for (const preset of LIMIT_PRESETS) {
      expect(preset.clause).not.toBe('');
      expect(preset.verified).toMatch(/retrieved|memory/);
      expect(limitsFromPreset(preset)).toMatchObject({ basis: preset.clause, force: preset.force });
    }
    expect(new Set(LIMIT_PRESETS.map((preset) => preset.id)).size).toBe(LIMIT_PRESETS.length);
  });
});
