export * from './breaker.ts';
export * from './conductor-size.ts';
export * from './electrical.ts';
export * from './format.ts';
export * from './length.ts';
export { type NumberBounds, type NumberOutcome, parseNumber } from './number.ts';
export * from './power.ts';
export {
  parseQuantity,
  type Quantity,
  type QuantityOutcome,
  quantityText,
  readQuantity,
  type UnitSet,
} from './quantity.ts';
