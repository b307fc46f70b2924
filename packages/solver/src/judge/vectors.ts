/** Real vectors of one length, as the iterations upon voltages need them. */
export const dot = (a: Float64Array, b: Float64Array): number => {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
};
export const size = (a: Float64Array): number => Math.sqrt(dot(a, a));
export const addScaled = (to: Float64Array, by: number, a: Float64Array): void => {
  for (let i = 0; i < a.length; i++) to[i]! += by * a[i]!;
};
