import { formatCount } from '../../../lib/format.ts';
import { AssumedMark } from '../../../ui/assumed-mark.tsx';
import type { JobResult } from '../../../workers/results.ts';
import type { Missing } from '../next-missing.ts';

interface LegendProps {
  result: JobResult | null;
  missing: readonly Missing[];
  next: Missing | null;
  onNext: () => void;
}

const ASSUMED_WORDS = {
  length: ['length', 'lengths'],
  raceway: ['raceway', 'raceways'],
  size: ['load', 'loads'],
  powerFactor: ['power factor', 'power factors'],
} as const;

/** What the marks mean, how much is assumed, and what is to be filled in next. */
export function ScheduleLegend({ result, missing, next, onNext }: LegendProps) {
  const assumed = Object.entries(ASSUMED_WORDS).flatMap(([field, [one, many]]) => {
    const count = result?.assumed.filter((each) => each.field === field).length ?? 0;
    return count > 0 ? [formatCount(count, one, many)] : [];
  });
  return (
    <p className="flex flex-none flex-wrap items-center gap-x-6 gap-y-1 border-t border-rule px-4 py-1.5 text-label text-ink-soft">
      {assumed.length > 0 && (
        <span>
          <AssumedMark>marked</AssumedMark> assumed in this job: {assumed.join(', ')}
        </span>
      )}
      <span className="hidden desk:inline">Bar: feeder, then branch; tick at the limit</span>
      {next && (
        <button type="button" onClick={onNext} className="tap text-copper underline desk:ml-auto">
          {formatCount(missing.length, 'row')} to finish, next {next.circuit.code}:{' '}
          {next.circuit.next?.reason}
        </button>
      )}
    </p>
  );
}
