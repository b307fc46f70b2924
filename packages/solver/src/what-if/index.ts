export { lossFactorOf, type YearOptions } from './loss-factor.ts';
export { type Losses, type LossesRefused, losses, type PartLoss, type YearlyLoss } from './losses.ts';
export {
  type LostNeutral,
  type LostNeutralLoad,
  type LostNeutralStatus,
  lostNeutral,
  type VoltBounds,
} from './lost-neutral.ts';
export {
  type LoadSensitivity,
  type RunSensitivity,
  type Sensitivities,
  sensitivities,
} from './sensitivities.ts';
