import { CAUTION } from '@farlug/solver/job';

/**
 * The cautions that stand wherever a verdict does: on pages, in reports, in messages, on the command line.
 * A firm's own wording follows them and never takes their place.
 */
export const NOTICES: readonly string[] = [
  'Results are calculations from the data entered. They do not replace the adopted local code, the authority having jurisdiction, or a licensed electrician or engineer.',
  '“Within” is not “approved”, “safe” or “compliant”. A recommendation that is missed is not a violation; the two are told apart.',
  'Voltage drop does not replace ampacity, overcurrent, fault, grounding or equipment ratings. Not checked: fault and clearing times, coordination, lugs, fill, torque, harmonics.',
  'Fault-current figures are estimates and never for equipment rating.',
  'Tables must be confirmed against the adopted edition. Every assumed length, load and power factor is marked where it counts.',
  'Verify absence of voltage before work. Readings on live parts are for qualified people with proper protection. Never open a neutral to test. A suspect hot joint: de-energise, lock out, verify absence; never tighten live.',
  'Aluminum needs listed terminations and torque. Fire pump, emergency and medical circuits need an engineer.',
];

/** The same in two lines, for the foot of a page that links to the whole. */
export const BRIEF_NOTICE: string = CAUTION;
