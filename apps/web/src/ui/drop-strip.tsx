import { cx } from './cx.ts';

export interface DropPart {
  label: string;
  volts: number;
  /** `aside` is what the limits do not count: source, service, transformer. */
  part: 'aside' | 'feeder' | 'branch';
}

interface DropStripProps {
  parts: readonly DropPart[];
  /** Volts that the counted part may drop; null where no limit is set. */
  limitVolts: number | null;
  /** Said below the tick, as `limit 5 %: 6.00 V`. */
  limitLabel: string;
}

const FILL: Record<DropPart['part'], string> = { aside: 'hatch', feeder: 'bg-mid', branch: 'bg-deep' };

/** Where the volts go: hatched what is not counted, solid what is, the limit an ink tick. */
export function DropStrip({ parts, limitVolts, limitLabel }: DropStripProps) {
  const sum = (list: readonly DropPart[]) => list.reduce((volts, part) => volts + Math.max(part.volts, 0), 0);
  const total = sum(parts);
  const aside = sum(parts.filter((part) => part.part === 'aside'));
  const reach = Math.max(total, limitVolts === null ? 0 : aside + limitVolts, 1e-9) * 1.02;
  const percent = (volts: number) => `${(Math.max(volts, 0) / reach) * 100}%`;
  const tick = limitVolts === null ? null : aside + limitVolts;
  const beyond = tick === null ? 0 : total - tick;
  return (
    <figure
      role="img"
      aria-label={`${parts.map((part) => `${part.label} ${part.volts.toFixed(2)} V`).join(', ')}; ${limitLabel}`}
      className="relative pt-1 pb-6"
    >
      <div className="flex h-3.5 w-full border-b border-rule">
        {parts.map((part) => (
          <div key={part.label} style={{ width: percent(part.volts) }} className={FILL[part.part]} />
        ))}
      </div>
      {tick !== null && beyond > 0 && (
        <div
          className="absolute top-1 h-3.5 bg-over"
          style={{ left: percent(tick), width: percent(beyond) }}
        />
      )}
      {tick !== null && (
        <>
          <div className="absolute top-0 h-6 w-px bg-ink" style={{ left: percent(tick) }} />
          <div
            className={cx(
              'absolute top-6 whitespace-nowrap text-label',
              tick / reach > 0.6 && '-translate-x-full',
            )}
            style={{ left: percent(tick) }}
          >
            {limitLabel}
          </div>
        </>
      )}
    </figure>
  );
}
