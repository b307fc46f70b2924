import { formatFixed } from '@farlug/solver/units';
import { cx } from '../../../ui/cx.ts';
import type { SizeFigures } from '../../../workers/answer-sizes.ts';
import { shortSizeText } from '../size-words.ts';

const WIDTH = 860;
const HEIGHT = 200;
const LEFT = 46;
const BOTTOM = 168;
const TOP = 16;

/** Total at the worst load against the size, with its limit. The table beside it holds the same figures. */
export function SizesChart({ sizes }: { sizes: readonly SizeFigures[] }) {
  const shown = sizes.filter(({ worst }) => worst !== null);
  const limit = shown[0]?.worst?.limitPercent ?? null;
  if (shown.length < 2) return null;
  const values = shown.map(({ worst }) => worst!.totalPercent);
  // Sizes far too thin would press everything else into a corner.
  const top = Math.min(
    Math.max(...values),
    Math.max(3 * (limit ?? Math.min(...values)), 2 * Math.min(...values)),
  );
  const step = top > 12 ? 5 : top > 6 ? 2 : 1;
  const y = (percent: number) => BOTTOM - ((BOTTOM - TOP) * Math.min(Math.max(percent, 0), top)) / top;
  const x = (i: number) => LEFT + 24 + ((WIDTH - LEFT - 40) * i) / Math.max(shown.length - 1, 1);
  const lines = Array.from({ length: Math.floor(top / step) + 1 }, (_, k) => k * step);
  const every = Math.ceil(shown.length / 16);
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      role="img"
      aria-label="Total at the worst load against size"
      className="hidden w-full max-w-215 px-4 py-2 desk:block"
    >
      {lines.map((percent) => (
        <g key={percent}>
          <path d={`M${LEFT} ${y(percent)}H${WIDTH - 8}`} className="stroke-hair" />
          <text x={LEFT - 8} y={y(percent) + 4} fontSize="12" textAnchor="end" className="fill-ink-soft">
            {percent} %
          </text>
        </g>
      ))}
      {limit !== null && limit <= top && (
        <>
          <path d={`M${LEFT} ${y(limit)}H${WIDTH - 8}`} className="stroke-ink" strokeWidth="1.6" />
          <text x={WIDTH - 8} y={y(limit) - 5} fontSize="12" textAnchor="end" className="fill-ink">
            limit {limit} %
          </text>
        </>
      )}
      {shown.map((size, i) => {
        const { totalPercent } = size.worst!;
        const beyond = totalPercent > top;
        return (
          <g key={`${size.material} ${size.size} ${size.sets}`}>
            <title>
              {shortSizeText(size)}: {formatFixed(totalPercent, 2)} %
            </title>
            <rect
              x={x(i) - 4}
              y={y(totalPercent) - 4}
              width="8"
              height="8"
              className={cx(size.needsOverride || beyond ? 'fill-none stroke-ink-soft' : 'fill-ink')}
            />
            {size.now && (
              <rect
                x={x(i) - 9}
                y={y(totalPercent) - 9}
                width="18"
                height="18"
                className="fill-none stroke-copper"
                strokeWidth="2"
              />
            )}
            {(i % every === 0 || size.now) && (
              <text x={x(i)} y={BOTTOM + 18} fontSize="12" textAnchor="middle" className="fill-ink-soft">
                {shortSizeText(size)}
              </text>
            )}
          </g>
        );
      })}
    </svg>
  );
}
