import {
  addDependencies,
  bignumberDependencies,
  create,
  createUnitDependencies,
  divideDependencies,
  type FactoryFunctionMap,
  type MathNode,
  multiplyDependencies,
  parseDependencies,
  subtractDependencies,
  type Unit,
  unaryMinusDependencies,
  unitDependencies,
} from 'mathjs';
import type { LengthUnit } from '../job/vocabulary.ts';
import type { TypedLengthUnit } from './length.ts';
import { parseLength } from './length.ts';
import { tidy } from './number.ts';
import type { LoadUnit } from './power.ts';
import { LOAD_UNITS, parsePower } from './power.ts';
import type { QuantityOutcome } from './quantity.ts';
import { made } from './quantity.ts';

/**
 * Sums and products in a typed field: a route as `42 ft + 2 × 9 ft + 6"`, a group of receptacles as `6 × 180 VA`.
 * The reading, the units and the exact arithmetic are mathjs's (64 digits); only numbers, units, + − × ÷ and brackets
 * are let through, so that nothing typed can call a function. Heavy: loaded where a person types, not by the first page.
 */
const parts = {
  addDependencies,
  bignumberDependencies,
  createUnitDependencies,
  divideDependencies,
  multiplyDependencies,
  parseDependencies,
  subtractDependencies,
  unaryMinusDependencies,
  unitDependencies,
} as FactoryFunctionMap;
const math = create(parts, { number: 'BigNumber', precision: 64 });
/** A base of its own: mathjs counts VA as watts, and a sum of the two is no size of a load. */
math.createUnit('voltamp', { prefixes: 'long' });

const OPERATORS = new Set(['add', 'subtract', 'multiply', 'divide', 'unaryMinus']);
const MAX_TEXT = 200;

/** Units as mathjs spells them, by how people do. */
const LENGTH_NAMES = {
  ft: 'ft',
  feet: 'ft',
  foot: 'ft',
  in: 'inch',
  yd: 'yd',
  mi: 'mi',
  m: 'm',
  cm: 'cm',
  mm: 'mm',
  km: 'km',
};
const LOAD_NAMES = {
  a: 'A',
  amp: 'A',
  amps: 'A',
  va: 'voltamp',
  kva: 'kilovoltamp',
  w: 'W',
  watts: 'W',
  kw: 'kW',
};

const MATH_UNITS: Record<LoadUnit, string> = {
  A: 'A',
  VA: 'voltamp',
  kVA: 'kilovoltamp',
  W: 'W',
  kW: 'kW',
  hp: 'hp',
};

type Names = Record<string, string>;

const allowed = (node: MathNode, units: ReadonlySet<string>): boolean => {
  if (node.type === 'ConstantNode') return true;
  if (node.type === 'SymbolNode') return units.has((node as MathNode & { name: string }).name);
  if (node.type === 'OperatorNode' && !OPERATORS.has((node as MathNode & { fn: string }).fn)) return false;
  if (node.type !== 'OperatorNode' && node.type !== 'ParenthesisNode') return false;
  let fine = true;
  node.forEach((child) => {
    fine &&= allowed(child, units);
  });
  return fine;
};

/** The value in `unit` as a decimal text; `null` where it cannot be read or its units do not add up. */
const evaluated = (text: string, names: Names, unit: string): string | null => {
  const spelled = tidy(text)
    .replace(/'/g, ' ft ')
    .replace(/"/g, ' in ')
    .replace(/[×x](?=[\s\d(])/gi, '*')
    .replace(/÷/g, '/')
    .replace(/[a-z]+/gi, (word) => names[word.toLowerCase()] ?? word);
  try {
    const node = math.parse(spelled);
    if (Array.isArray(node) || !allowed(node, new Set(Object.values(names)))) return null;
    const value: unknown = node.compile().evaluate();
    if (isUnit(value)) return value.equalBase(math.unit(unit)) ? decimalText(value.toNumeric(unit)) : null;
    return decimalText(value);
  } catch {
    return null;
  }
};

const isUnit = (value: unknown): value is Unit =>
  typeof value === 'object' && value !== null && (value as { type?: string }).type === 'Unit';

const decimalText = (value: unknown): string | null => {
  const text = String(value);
  return /^-?\d+(\.\d+)?$/.test(text) ? text : null;
};

const readBy = <U extends string>(
  text: string,
  plain: QuantityOutcome<U>,
  names: Names,
  unit: U,
  mathUnit: string,
  read: (text: string) => QuantityOutcome<U>,
): QuantityOutcome<U> => {
  if (plain.ok || text.length > MAX_TEXT || !/[+*×÷x(]/i.test(text)) return plain;
  const value = evaluated(text, names, mathUnit);
  if (value === null) return plain;
  const rounded = read(`${Number(Number(value).toPrecision(12))} ${unit}`);
  return rounded.ok ? made(rounded.value, unit) : rounded;
};

/** `parseLength`, and sums of legs: `42 ft + 2 × 9 ft`, `(30 + 12) ft`, `12 m + 40 cm`; the result is in `defaultUnit`. */
export const evaluateLength = (text: string, defaultUnit: LengthUnit): QuantityOutcome<TypedLengthUnit> =>
  readBy<TypedLengthUnit>(text, parseLength(text, defaultUnit), LENGTH_NAMES, defaultUnit, defaultUnit, (t) =>
    parseLength(t, defaultUnit),
  );

const loadName = (word: string): string | undefined => (LOAD_NAMES as Names)[word.toLowerCase()];

/** `parsePower`, and counts of one load: `6 × 180 VA`, `2 × 1.5 kW + 300 W`; the result is in the first unit written. */
export function evaluatePower(text: string, defaultUnit: LoadUnit | null = null): QuantityOutcome<LoadUnit> {
  const plain = parsePower(text, defaultUnit);
  const word = text.match(/[a-z]{1,5}/gi)?.find((w) => loadName(w) !== undefined);
  const unit = word ? LOAD_UNITS.find((known) => MATH_UNITS[known] === loadName(word))! : defaultUnit;
  if (!unit) return plain;
  return readBy<LoadUnit>(text, plain, LOAD_NAMES, unit, MATH_UNITS[unit], (t) => parsePower(t, unit));
}
