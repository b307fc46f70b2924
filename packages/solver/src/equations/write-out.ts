import type { Phasor } from '../job/index.ts';
import type { Part } from './parts.ts';

/** Enough digits to work an equation again on a calculator: voltages differ by little, admittances are large. */
const DIGITS = 7;
const MINUS = '−';

/** `25.31206`, `25.31206 − j3.1204`. */
export function complexText([re, im]: Phasor): string {
  if (im === 0) return realText(re);
  return `${realText(re)} ${im < 0 ? MINUS : '+'} j${realText(Math.abs(im))}`;
}

const realText = (value: number): string => {
  if (value === 0) return '0';
  const size = Math.abs(value);
  const text =
    size >= 1e7 || size < 1e-4 ? size.toPrecision(DIGITS) : String(Number(size.toPrecision(DIGITS)));
  return value < 0 ? MINUS + text.replace('e-', `e${MINUS}`) : text.replace('e-', `e${MINUS}`);
};

/** Joins signed pieces: `a + b − c`; `0` where there is none. */
const joined = (pieces: readonly { negative: boolean; text: string }[]): string =>
  pieces.length === 0
    ? '0'
    : pieces
        .map(
          ({ negative, text }, i) =>
            (i === 0 ? (negative ? MINUS : '') : negative ? ` ${MINUS} ` : ' + ') + text,
        )
        .join('');

const isNegative = ([re, im]: Phasor): boolean => re < 0 || (re === 0 && im < 0);
const negated = ([re, im]: Phasor): Phasor => [-re, -im];
const bracketed = (value: Phasor): string =>
  value[1] === 0 ? complexText(value) : `(${complexText(value)})`;
const signed = (value: Phasor, after = ''): { negative: boolean; text: string } => {
  const negative = isNegative(value);
  return { negative, text: `${bracketed(negative ? negated(value) : value)}${after}` };
};

/** `1/Z(F1.L1)`, `0.4330127/Z(T1.1)`: a weight over an impedance, without its sign. */
const overImpedance = (weight: number, name: string): string => `${realText(Math.abs(weight))}/${name}`;

/** The equation of one node in names and with numbers; for a node of given voltage, that voltage. */
export function writeOut(
  node: string,
  parts: readonly Part[],
  own: Phasor,
  terms: readonly (readonly [number, Phasor])[],
  right: Phasor,
  nameOf: (node: number) => string,
  volts: Phasor,
  given: boolean,
): { symbols: string; text: string } {
  if (given) {
    const text = `V(${node}) = ${complexText(volts)} V, given`;
    return { symbols: text, text };
  }
  const byNode = new Map<string, { weight: number; name: string }[]>();
  const sources: { negative: boolean; text: string }[] = [];
  for (const part of parts) {
    if (part.kind === 'current') sources.push({ negative: part.sign < 0, text: part.named.name });
    else {
      for (const { node: other, weight } of part.terms) {
        const list = byNode.get(nameOf(other)) ?? [];
        list.push({ weight, name: part.named.name });
        byNode.set(nameOf(other), list);
      }
      if (part.emf)
        sources.push({ negative: false, text: `E(${part.named.name.slice(2)}/${part.named.name}` });
    }
  }
  const ownFirst = [node, ...[...byNode.keys()].filter((name) => name !== node)];
  const symbolPieces = ownFirst.flatMap((name) => {
    const list = byNode.get(name);
    if (!list) return [];
    const negative = list.every(({ weight }) => weight < 0);
    const inside = joined(
      list.map(({ weight, name: z }) => ({
        negative: negative ? weight > 0 : weight < 0,
        text: overImpedance(weight, z),
      })),
    );
    return [{ negative, text: `${list.length > 1 ? `(${inside})` : inside}·V(${name})` }];
  });
  const numberPieces = [
    signed(own, `·V(${node})`),
    ...terms.map(([other, y]) => signed(y, `·V(${nameOf(other)})`)),
  ];
  return {
    symbols: `${joined(symbolPieces)} = ${joined(sources)}`,
    text: `${joined(numberPieces)} = ${joined([signed(right)])} A`,
  };
}
