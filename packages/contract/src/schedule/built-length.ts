import type { LengthUnit } from '@farlug/solver/job';
import { Decimal } from 'decimal.js';

/** A route as it is paced out on a plan: right-angled, with its rises and drops. Decimals in the job's unit. */
export interface Route {
  across: string;
  along: string;
  drops: string;
}

/** Left at the panel, the share added on top, and the step up to which the length is rounded (common practice). */
export const ROUTE_ALLOWANCE: Record<LengthUnit, { atPanel: string; share: string; step: string }> = {
  ft: { atPanel: '10', share: '0.1', step: '5' },
  m: { atPanel: '3', share: '0.1', step: '1' },
};

/** Length of a run from its route: the sum and what is left at the panel, 10 % on top, up to the next step. */
export function builtLength(route: Route, unit: LengthUnit): string {
  const { atPanel, share, step } = ROUTE_ALLOWANCE[unit];
  const sum = [route.across, route.along, route.drops, atPanel].reduce(
    (total, one) => total.plus(one),
    new Decimal(0),
  );
  const steps = sum.times(new Decimal(1).plus(share)).div(step).ceil();
  return `${steps.times(step).toFixed()} ${unit}`;
}
