import { describe, expect, test } from 'vitest';
import { classFromText, racewayFromText, yesOrNo } from './words.ts';

describe('words of schedules', () => {
  test.each([
    ['Corridor lighting', 'lighting'],
    ['LTG - RM 204', 'lighting'],
    ['Beleuchtung Flur', 'lighting'],
    ['Éclairage couloir', 'lighting'],
    ['Office receptacles', 'receptacle'],
    ['Steckdosen Küche', 'receptacle'],
    ['EF-3 exhaust fan', 'motor'],
    ['Water heater', 'heat'],
    ['Fire pump controller', 'fire-pump'],
    ['Emergency lighting', 'emergency'],
    ['EV charger, level 2', 'ev'],
    ['Roof unit RTU-2', 'cooling'],
    ['Data rack', 'sensitive'],
    ['PV inverter', 'generation'],
  ])('“%s” is %s', (text, expected) => {
    expect(classFromText(text)).toBe(expected);
  });

  test.each(['whatever', 'record store', 'Door operator', 'Ledger desk', ''])(
    '“%s” suggests no class',
    (text) => {
      expect(classFromText(text)).toBeNull();
    },
  );

  test('a raceway is what it is made of; what else was said is kept', () => {
    expect(racewayFromText('3/4 EMT')).toEqual({ raceway: 'steel', size: '3/4 EMT' });
    expect(racewayFromText('PVC')).toEqual({ raceway: 'pvc', size: null });
    expect(racewayFromText('MC cable')).toEqual({ raceway: 'cable', size: 'MC cable' });
    expect(racewayFromText('rope')).toBeNull();
  });

  test('yes and no', () => {
    expect([yesOrNo('Y'), yesOrNo('ja'), yesOrNo('no'), yesOrNo(''), yesOrNo('maybe')]).toEqual([
      true,
      true,
      false,
      false,
      null,
    ]);
  });
});
