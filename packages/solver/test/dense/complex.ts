import { D, type Decimal, NIL, ROOT3, UNITY } from './decimal.ts';

/** Complex numbers as plain pairs: slow and readable on purpose. */
export interface Complex {
  readonly re: Decimal;
  readonly im: Decimal;
}

export const ZERO: Complex = { re: NIL, im: NIL };
export const ONE: Complex = { re: UNITY, im: NIL };
export const complex = (re: Decimal, im: Decimal = NIL): Complex => ({ re, im });
/** A third of a turn ahead: 1∠120°. */
export const THIRD: Complex = { re: D('-0.5'), im: ROOT3.div(2) };

export const isZero = (a: Complex): boolean => a.re.isZero() && a.im.isZero();
export const add = (a: Complex, b: Complex): Complex => ({ re: a.re.plus(b.re), im: a.im.plus(b.im) });
export const sub = (a: Complex, b: Complex): Complex => ({ re: a.re.minus(b.re), im: a.im.minus(b.im) });
export const neg = (a: Complex): Complex => ({ re: a.re.neg(), im: a.im.neg() });
export const conj = (a: Complex): Complex => ({ re: a.re, im: a.im.neg() });
export const scale = (a: Complex, k: Decimal): Complex => ({
  re: a.re.times(k),
  im: a.im.isZero() ? a.im : a.im.times(k),
});
export const mul = (a: Complex, b: Complex): Complex => {
  if (a.im.isZero()) return scale(b, a.re);
  if (b.im.isZero()) return scale(a, b.re);
  return {
    re: a.re.times(b.re).minus(a.im.times(b.im)),
    im: a.re.times(b.im).plus(a.im.times(b.re)),
  };
};
const normSquare = ({ re, im }: Complex): Decimal => re.times(re).plus(im.times(im));
export const abs = (a: Complex): Decimal => {
  if (a.im.isZero()) return a.re.abs();
  return a.re.isZero() ? a.im.abs() : normSquare(a).sqrt();
};
export const inverse = (a: Complex): Complex => {
  if (a.im.isZero()) return { re: UNITY.div(a.re), im: NIL };
  const each = UNITY.div(normSquare(a));
  return { re: a.re.times(each), im: a.im.times(each).neg() };
};
export const div = (a: Complex, b: Complex): Complex => mul(a, inverse(b));
export const unit = (a: Complex): Complex => scale(a, UNITY.div(abs(a)));
