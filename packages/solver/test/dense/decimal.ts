import { Decimal } from 'decimal.js';

export type { Decimal };

/** Every figure of the slow solver carries fifty digits. */
const Fifty = Decimal.clone({ precision: 50 });

/** A figure of a file or a table by the digits that it is written with: 0.1 is a tenth, not the double beside it. */
export const D = (digits: number | string): Decimal => new Fifty(digits);

export const NIL = D(0);
export const UNITY = D(1);
export const ROOT3 = D(3).sqrt();
export const PI = D('3.1415926535897932384626433832795028841971693993751058');

export const largest = (list: readonly Decimal[]): Decimal =>
  list.reduce((most, each) => (each.gt(most) ? each : most));
export const sumOf = (list: readonly Decimal[]): Decimal => list.reduce((sum, each) => sum.plus(each), NIL);
