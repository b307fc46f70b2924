const STEPS: readonly (readonly [string, string])[] = [
  [
    'The building as a network',
    'Every panel, tap and outlet is a point, every conductor between two points a resistance and a reactance, the neutral a conductor like any other. The service stands behind its own impedance, a transformer is drawn winding by winding.',
  ],
  [
    'Solved whole, not run by run',
    'Kirchhoff’s current law is written at every conductor of every point by inspection, and the equations are solved together. A feeder’s drop is felt by every circuit behind it, an unbalanced neutral shifts both legs, and a ring shares its current by itself.',
  ],
  [
    'Each circuit full, in turn',
    'For its verdict a circuit carries its own load in full while all others stand at their design demand. Other scenarios are a choice away: everything on, design demand, light load with generation, and each motor while it starts.',
  ],
  [
    'Split as the limits are',
    'The drop at the far lug is split into source, service, transformer, feeder and branch. The limits count what you say they count; a recommendation that is missed is told apart from a rule that is broken.',
  ],
  [
    'Checked with a pencil',
    'Beside every radial run stands the textbook formula with its numbers and the difference to the full solution, with the reason for it. The node equations of any panel can be read written out.',
  ],
  [
    'On record',
    'A report pins its input, tables, limits and wording. The hash on every page is the SHA-256 of the canonical JSON (RFC 8785) of that input, so that anybody can see whether two papers speak of the same job.',
  ],
];

/** How the volts are found, in the words of somebody who has to believe them. */
export function Method() {
  return (
    <dl className="mx-4 max-w-240 border-t border-ink desk:mx-12">
      {STEPS.map(([title, text]) => (
        <div key={title} className="grid gap-x-8 border-b border-rule py-4 desk:grid-cols-[16rem_1fr]">
          <dt className="font-bold">{title}</dt>
          <dd className="text-pretty">{text}</dd>
        </div>
      ))}
    </dl>
  );
}
