/** Complex numbers as plain pairs: slow and readable on purpose. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const ZERO: Complex = { re: 0, im: 0 };
export const ONE: Complex = { re: 1, im: 0 };
export const complex = (re: number, im = 0): Complex => ({ re, im });
export const polar = (size: number, degrees: number): Complex => {
  const angle = (degrees * Math.PI) / 180;
  return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
};
export const add = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });
export const sub = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im });
export const mul = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});
export const scale = (a: Complex, k: number): Complex => ({ re: a.re * k, im: a.im * k });
export const conj = (a: Complex): Complex => ({ re: a.re, im: -a.im });
export const abs = (a: Complex): number => Math.hypot(a.re, a.im);
export const div = (a: Complex, b: Complex): Complex => {
  const square = b.re * b.re + b.im * b.im;
  return {
    re: (a.re * b.re + a.im * b.im) / square,
    im: (a.im * b.re - a.re * b.im) / square,
  };
};
export const unit = (a: Complex): Complex => scale(a, 1 / abs(a));
export const isZero = (a: Complex): boolean => a.re === 0 && a.im === 0;
