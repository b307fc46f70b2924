import type { Material } from '../job/vocabulary.ts';
import { SMALL_CONDUCTOR_LIMITS, STANDARD_AMPS } from './data/overcurrent.ts';

/** Standard ampere ratings, NEC 240.6(A), smallest first. */
export const standardBreakers = (): readonly number[] => STANDARD_AMPS;

/** The smallest standard rating that is at least `amps` (NEC 240.6(A)); `null` above the largest. */
export const nextStandardBreaker = (amps: number): number | null =>
  STANDARD_AMPS.find((rating) => rating >= amps * (1 - 1e-9)) ?? null;

/** Largest overcurrent device for a small conductor (NEC 240.4(D)); `null` where the rule sets none. */
export const smallConductorLimit = (material: Material, size: string): number | null =>
  SMALL_CONDUCTOR_LIMITS.find((row) => row.size === size && row.material === material)?.amps ?? null;

/** Largest rating that 240.4(B) lets the next standard size up reach, amperes. */
const NEXT_SIZE_UP_TO = 800;

/**
 * Largest breaker that protects a conductor of `ampacityAmps`: its ampacity or, up to 800 A, the next standard
 * rating above it (NEC 240.4(B), (C)), and no more than 240.4(D) for small conductors. Amperes.
 */
export function largestBreaker(ampacityAmps: number, material: Material, size: string): number {
  const next = nextStandardBreaker(ampacityAmps);
  const general = next !== null && next <= NEXT_SIZE_UP_TO ? next : ampacityAmps;
  const small = smallConductorLimit(material, size);
  return small === null ? general : Math.min(general, small);
}
