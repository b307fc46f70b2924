/** What is said in two lines wherever a verdict stands. */
export const CAUTION =
  'Calculated from the data entered. Does not replace the adopted local code, the authority having jurisdiction, or a licensed electrician or engineer. Voltage drop does not replace ampacity, overcurrent, fault, grounding or equipment ratings. “Within” is not “approved”. Not checked: fault and clearing times, coordination, lugs, fill, torque, harmonics. Verify absence of voltage before work.';

/** What is said beside every figure of a lost neutral. */
export const NEUTRAL_CAUTION = 'Worked out on paper only: never open a neutral to test.';
