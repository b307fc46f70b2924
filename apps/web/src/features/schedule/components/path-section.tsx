import type { Row } from '@farlug/contract/rows';
import { formatFixed, formatPercent } from '@farlug/solver/units';
import { KeyFigures } from '../../../ui/key-values.tsx';
import { SheetSection } from '../../../ui/side-sheet.tsx';
import type { LoadFigures } from '../../../workers/results.ts';
import { VoltsPath } from './volts-path.tsx';

interface PathSectionProps {
  worst: LoadFigures;
  /** In the circuit's first run. */
  lossWatts: number | null;
  job: Row<'job'>;
}

/** Where the volts of a circuit's worst load go, and what is left at its far lug. */
export function PathSection({ worst, lossWatts, job }: PathSectionProps) {
  const figures: [string, string][] = [];
  if (worst.volts !== null) figures.push(['At the far lug', `${formatFixed(worst.volts, 1)} V`]);
  figures.push(['Between', worst.terminals]);
  figures.push([
    'Headroom',
    worst.headroomAmps === null ? 'no limit' : `${formatFixed(worst.headroomAmps, 1)} A`,
  ]);
  if (lossWatts !== null) figures.push(['Lost in the run', `${formatFixed(lossWatts, 1)} W`]);
  if (worst.startingPercent !== null)
    figures.push(['While starting', formatPercent(worst.startingPercent, 1)]);
  return (
    <>
      {worst.dropVolts !== null && (
        <SheetSection title={`Where the ${formatFixed(worst.dropVolts, 2)} volts go, service to far lug`}>
          <VoltsPath
            load={worst}
            counted={{
              source: job.includeSource,
              service: job.includeService,
              transformer: job.includeTransformer,
            }}
          />
        </SheetSection>
      )}
      {worst.volts !== null && (
        <SheetSection>
          <KeyFigures columns={2} items={figures} />
        </SheetSection>
      )}
    </>
  );
}
