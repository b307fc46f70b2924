export {
  type LostNeutral,
  type LostNeutralLoad,
  type LostNeutralStatus,
  lostNeutral,
  type VoltBounds,
} from './lost-neutral.ts';
