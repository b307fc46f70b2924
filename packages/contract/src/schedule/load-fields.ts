import { LOAD_CLASSES, type LoadClass } from '@farlug/solver/job';
import { parseAmps, parseNumber, parsePower } from '@farlug/solver/units';
import { Decimal } from 'decimal.js';
import { proposedPowerFactor, STARTING_POWER_FACTOR } from '../presets/defaults.ts';
import type { Row } from '../rows/index.ts';
import { classFromText, yesOrNo } from './words.ts';

/** What typed text makes of a load: the changes, or what would have been right. */
export type LoadChange = { ok: true; set: Partial<Row<'load'>> } | { ok: false; message: string };
const refused = (message: string): LoadChange => ({ ok: false, message });
const QUANTITY = /^(\d+(?:\.\d+)?)\s*[x×*@]\s*(.+)$/i;

/** `16 A`, `1.5 kW`, `3/4 hp`, `6 × 180 VA`. Motors given in hp become the class `motor`. */
export function loadSizeChange(load: Pick<Row<'load'>, 'class'>, text: string): LoadChange {
  if (text === '') return { ok: true, set: { size: null, sizeAssumed: false } };
  const many = QUANTITY.exec(text);
  const size = parsePower(many ? many[2]! : text);
  if (!size.ok) return size;
  const quantity = many ? parseNumber(many[1]!, { min: 0, max: 1e6 }) : null;
  if (quantity && !quantity.ok) return quantity;
  const motor = size.unit === 'hp' && load.class === 'equipment';
  return {
    ok: true,
    set: {
      size: size.text,
      sizeAssumed: false,
      quantity: quantity && quantity.value !== '1' ? quantity.value : null,
      ...(motor ? { class: 'motor' as const } : {}),
    },
  };
}

/** `0.85`, `85 %`, `0.9 leading`; empty proposes that of the class again, marked as assumed. */
export function powerFactorChange(load: Pick<Row<'load'>, 'class'>, text: string): LoadChange {
  if (text === '') return { ok: true, set: { ...assumedPowerFactor(load.class), leading: false } };
  const [, number = '', side = ''] =
    /^(.*?)\s*(lead|leading|cap|capacitive|lag|lagging|ind|inductive)?\.?$/i.exec(text)!;
  const percent = /%$/.test(number.trim());
  const value = parseNumber(number.replace(/%$/, '').trim(), { min: 0, above: true, max: percent ? 100 : 1 });
  if (!value.ok)
    return refused(`must be a power factor above 0 and at most 1, such as 0.85: ${value.message}`);
  const powerFactor = percent ? new Decimal(value.value).div(100).toFixed() : value.value;
  return { ok: true, set: { powerFactor, powerFactorAssumed: false, leading: /^(lead|cap)/i.test(side) } };
}

export const assumedPowerFactor = (ofClass: LoadClass): Partial<Row<'load'>> => ({
  powerFactor: proposedPowerFactor(ofClass),
  powerFactorAssumed: true,
});

/** `0.4`, `40 %` or `1080 VA`: what the load counts upstream. */
export function demandChange(text: string): LoadChange {
  if (text === '') return { ok: true, set: { demand: null, demandVa: null } };
  if (/va$/i.test(text)) {
    const va = parsePower(text);
    if (!va.ok) return va;
    const amount = va.unit === 'kVA' ? new Decimal(va.value).times(1000).toFixed() : va.value;
    return Number(amount) < 0
      ? refused('must be ≥ 0 VA')
      : { ok: true, set: { demand: null, demandVa: amount } };
  }
  const percent = /%$/.test(text);
  const value = parseNumber(text.replace(/\s*%$/, ''), { min: 0, max: percent ? 150 : 1.5 });
  if (!value.ok)
    return refused(
      `must be a factor up to 1.5, a percentage, or VA, such as 0.4, 40 % or 1080 VA: ${value.message}`,
    );
  const demand = percent ? new Decimal(value.value).div(100).toFixed() : value.value;
  return { ok: true, set: { demand: demand === '1' ? null : demand, demandVa: null } };
}

export function continuousChange(text: string): LoadChange {
  const continuous = yesOrNo(text);
  return continuous === null ? refused('must be yes or no') : { ok: true, set: { continuous } };
}

/** A class of load by its name or a word for it. A power factor that was assumed follows. */
export function classChange(load: Pick<Row<'load'>, 'powerFactorAssumed'>, text: string): LoadChange {
  const named = LOAD_CLASSES.find((one) => one === text.toLowerCase()) ?? classFromText(text);
  if (text !== '' && named === null) return refused(`must be one of ${LOAD_CLASSES.join(', ')}`);
  const ofClass = named ?? 'equipment';
  return {
    ok: true,
    set: { class: ofClass, ...(load.powerFactorAssumed ? assumedPowerFactor(ofClass) : {}) },
  };
}

/** `96 A`, `96 A at 0.35`: amps and power factor while starting. */
export function startingChange(text: string): LoadChange {
  if (text === '') return { ok: true, set: { startingAmps: null, startingPowerFactor: null } };
  const [amps = '', factor] = text.split(/\s+(?:at|@)\s+|\s*@\s*/i);
  const current = parseAmps(amps);
  if (!current.ok) return refused(`must be starting amps, such as 96 A or 96 A at 0.35: ${current.message}`);
  const powerFactor = factor === undefined ? null : parseNumber(factor, { min: 0, above: true, max: 1 });
  if (powerFactor && !powerFactor.ok)
    return refused(`must be a power factor after “at”, such as 0.35: ${powerFactor.message}`);
  return {
    ok: true,
    set: { startingAmps: current.value, startingPowerFactor: powerFactor?.value ?? STARTING_POWER_FACTOR },
  };
}
