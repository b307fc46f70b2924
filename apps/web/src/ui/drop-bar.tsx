interface DropBarProps {
  feederPercent: number;
  branchPercent: number;
  /** The limit of the total; null draws no tick. */
  limitPercent: number | null;
  /** Percent at the right end; the same for every row of a grid. */
  scalePercent?: number;
}

/** Feeder part, branch part, an ink tick at the limit; what lies beyond it in `over`. */
export function DropBar({ feederPercent, branchPercent, limitPercent, scalePercent = 8 }: DropBarProps) {
  const at = (percent: number) => (Math.min(Math.max(percent, 0), scalePercent) / scalePercent) * 96;
  const feeder = at(feederPercent);
  const total = at(feederPercent + branchPercent);
  const limit = limitPercent === null ? null : at(limitPercent);
  const solid = limit === null ? total : Math.min(total, limit);
  const said = `feeder ${feederPercent.toFixed(2)}, branch ${branchPercent.toFixed(2)}${limitPercent === null ? '' : `, limit ${limitPercent}`}`;
  return (
    <svg
      viewBox="0 0 96 10"
      preserveAspectRatio="none"
      role="img"
      aria-label={said}
      className="block h-2.5 w-full overflow-visible"
    >
      <rect x="0" y="2" width={Math.min(feeder, solid)} height="6" className="fill-mid" />
      <rect
        x={Math.min(feeder, solid)}
        y="2"
        width={Math.max(solid - feeder, 0)}
        height="6"
        className="fill-deep"
      />
      {limit !== null && total > limit && (
        <rect x={limit} y="1" width={total - limit} height="8" className="fill-over" />
      )}
      {limit !== null && (
        <path
          d={`M${limit} -1V11`}
          className="stroke-ink"
          strokeWidth="1.2"
          vectorEffect="non-scaling-stroke"
        />
      )}
    </svg>
  );
}
