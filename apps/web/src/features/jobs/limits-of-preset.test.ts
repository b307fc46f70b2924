import { LIMIT_PRESETS } from '@farlug/contract/presets';
import { expect, test } from 'vitest';
import { limitsOfPreset, startingPreset } from './limits-of-preset.ts';

const { edition: _edition, standing: _standing, verified: _verified, ...house } = LIMIT_PRESETS[1]!;

test('a new job starts from the firm’s own first preset where it has one', () => {
  expect(startingPreset([house, ...LIMIT_PRESETS], 'mm2')).toBe(house);
});

test('without one it starts from the notes of the code whose sizes are used', () => {
  const notes = startingPreset(LIMIT_PRESETS, 'awg')!;
  expect(notes.clause).toMatch(/210\.19/);
  expect(limitsOfPreset(notes)).toMatchObject({
    limitForce: 'recommendation',
    limits: { feeder: '3', branch: '3', total: '5' },
  });
  expect(startingPreset(LIMIT_PRESETS, 'mm2')?.clause).toMatch(/^IEC 60364-5-52/);
  expect(startingPreset([], 'awg')).toBeUndefined();
});
