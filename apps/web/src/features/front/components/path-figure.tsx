import { cx } from '../../../ui/cx.ts';
import {
  EXAMPLE_JOB,
  EXAMPLE_LIMIT,
  EXAMPLE_PATH,
  EXAMPLE_VERDICT,
  type PathPoint,
} from '../example-path.ts';

interface Layout {
  width: number;
  height: number;
  /** Where each point stands. */
  xs: readonly number[];
  lineY: number;
  top: number;
  bottom: number;
  titleY: number;
  zones: number;
  /** Runs that have room for their size. */
  labelled: ReadonlySet<number>;
  cells: readonly (readonly [number, string, string])[];
}

const WIDE: Layout = {
  width: 800,
  height: 630,
  xs: [65, 210.8, 325, 390.1, 569.4, 742],
  lineY: 112,
  top: 212.7,
  bottom: 516.7,
  titleY: 578,
  zones: 8,
  labelled: new Set([1, 2, 4, 5]),
  cells: [
    [36, 'Job', EXAMPLE_JOB],
    [232, 'Path', 'service to the roof deck'],
    [432, 'Scenario', 'each circuit full'],
    [580, 'Basis', 'impedance, 75 °C'],
    [718, 'Sheet', '1 of 9'],
  ],
};

const NARROW: Layout = {
  width: 374,
  height: 430,
  xs: [66, 127, 175.5, 205, 270.3, 340],
  lineY: 80,
  top: 182.5,
  bottom: 339.1,
  titleY: 378,
  zones: 4,
  labelled: new Set([4, 5]),
  cells: [
    [36, 'Job', EXAMPLE_JOB],
    [246, 'Scenario', 'each circuit full'],
  ],
};

/** The worst path of the demo job: one-line above, volts below. */
export function PathFigure({ narrow = false }: { narrow?: boolean }) {
  const layout = narrow ? NARROW : WIDE;
  const { width, height } = layout;
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={`The worst path of the demo job: ${EXAMPLE_PATH.map((p) => `${p.label} ${p.volts.toFixed(1)} V`).join(', ')}; ${EXAMPLE_VERDICT}`}
      className={cx('h-auto w-full', narrow ? 'block desk:hidden' : 'hidden desk:block')}
    >
      <Zones layout={layout} />
      <path d={`M22 20H${width - 4}V${height - 4}H22Z`} className="fill-none stroke-line" />
      <OneLine layout={layout} narrow={narrow} />
      <Volts layout={layout} narrow={narrow} />
      <path d={`M22 ${layout.titleY}H${width - 4}`} className="stroke-ink" strokeWidth="2" />
      {layout.cells.map(([x, word, text], index) => (
        <g key={word}>
          {index > 0 && <path d={`M${x - 14} ${layout.titleY}V${height - 4}`} className="stroke-line" />}
          <Text x={x} y={layout.titleY + 18} soft>
            {word}
          </Text>
          <Text x={x} y={layout.titleY + 37} size={15}>
            {text}
          </Text>
        </g>
      ))}
    </svg>
  );
}

function Text({
  x,
  y,
  children,
  size = 12,
  anchor = 'start',
  soft = false,
  className,
  halo = false,
}: {
  x: number;
  y: number;
  children: string;
  size?: number;
  anchor?: 'start' | 'middle' | 'end';
  soft?: boolean;
  className?: string;
  halo?: boolean;
}) {
  return (
    <text
      x={x}
      y={y}
      fontSize={size}
      textAnchor={anchor}
      style={{
        ...(soft ? { fill: 'var(--ink-soft)' } : {}),
        ...(halo ? { paintOrder: 'stroke', stroke: 'var(--sheet)', strokeWidth: 4 } : {}),
      }}
      className={className}
    >
      {children}
    </text>
  );
}

function Zones({ layout: { width, titleY, zones } }: { layout: Layout }) {
  const step = (width - 26) / zones;
  const rows = (titleY - 20) / 4.6;
  return (
    <g>
      {Array.from({ length: zones }, (_, i) => (
        <g key={`column ${i + 1}`}>
          <Text x={22 + step * (i + 0.5)} y={13} anchor="middle" soft>
            {String(i + 1)}
          </Text>
          {i > 0 && <path d={`M${22 + step * i} 5v10`} className="stroke-rule" />}
        </g>
      ))}
      {['A', 'B', 'C', 'D', 'E'].map((letter, i) => (
        <g key={letter}>
          <Text x={12} y={24 + rows * (i + 0.5)} anchor="middle" soft>
            {letter}
          </Text>
          {i > 0 && <path d={`M5 ${20 + rows * i}h13`} className="stroke-rule" />}
        </g>
      ))}
    </g>
  );
}

function OneLine({ layout: { xs, lineY, labelled }, narrow }: { layout: Layout; narrow: boolean }) {
  const radius = narrow ? 8 : 15;
  const edge = (point: PathPoint, side: 1 | -1) =>
    (point.kind === 'transformer'
      ? radius * 1.66
      : point.kind === 'service'
        ? 13
        : point.kind === 'far-lug'
          ? 6
          : 0) * side;
  return (
    <g>
      {EXAMPLE_PATH.map((point, i) => {
        const before = EXAMPLE_PATH[i - 1];
        const x = xs[i]!;
        if (!before || !point.run) return null;
        const middle = (xs[i - 1]! + x) / 2;
        return (
          <g key={point.label}>
            <path
              d={`M${xs[i - 1]! + edge(before, 1)} ${lineY}H${x + edge(point, -1)}`}
              className="stroke-ink"
              strokeWidth={point.run.weight}
            />
            {labelled.has(i) && (
              <>
                <Text x={middle} y={lineY + 20} anchor="middle">
                  {narrow ? point.run.size.replace(/,.*/, '') : point.run.size}
                </Text>
                <Text x={middle} y={lineY + 35} anchor="middle" soft>
                  {point.run.length}
                </Text>
              </>
            )}
          </g>
        );
      })}
      {EXAMPLE_PATH.map((point, i) => (
        <g key={point.label} className="fill-none stroke-ink" strokeWidth="1.6">
          <PointSymbol kind={point.kind} x={xs[i]!} y={lineY} radius={radius} tall={narrow ? 17 : 26} />
          <text
            x={xs[i]}
            y={lineY - (narrow ? 26 : 36)}
            fontSize={narrow ? 12 : 15}
            fontWeight={600}
            textAnchor="middle"
            stroke="none"
            style={point.kind === 'far-lug' ? { fill: 'var(--copper)' } : undefined}
          >
            {point.label}
          </text>
        </g>
      ))}
    </g>
  );
}

function PointSymbol({
  kind,
  x,
  y,
  radius,
  tall,
}: {
  kind: PathPoint['kind'];
  x: number;
  y: number;
  radius: number;
  tall: number;
}) {
  if (kind === 'panel') return <path d={`M${x} ${y - tall}V${y + tall}`} strokeWidth="6" />;
  if (kind === 'transformer')
    return (
      <>
        <circle cx={x - radius * 0.66} cy={y} r={radius} />
        <circle cx={x + radius * 0.66} cy={y} r={radius} />
      </>
    );
  if (kind === 'far-lug') return <circle cx={x} cy={y} r="6.5" strokeWidth="3.4" className="stroke-copper" />;
  return (
    <>
      <circle cx={x} cy={y} r="13" />
      <path d={`M${x - 7} ${y}q3.5-7 7 0t7 0`} strokeWidth="1.4" />
    </>
  );
}

function Volts({ layout: { xs, lineY, top, bottom, width }, narrow }: { layout: Layout; narrow: boolean }) {
  const y = (volts: number) => top + ((120 - volts) / 12) * (bottom - top);
  const line = (points: readonly { volts: number; voltsBehind?: number }[]) =>
    points
      .map(
        (p, i) =>
          `${xs[i]},${y(p.volts)}${p.voltsBehind === undefined ? '' : ` ${xs[i]},${y(p.voltsBehind)}`}`,
      )
      .join(' ');
  const left = xs[0]! - 14;
  const right = width - (narrow ? 20 : 44);
  const last = EXAMPLE_PATH.at(-1)!;
  return (
    <g>
      <Text x={left} y={top - 24} soft>
        Volts, on a 120 V base
      </Text>
      {[120, 118, 116, 114, 112, 110, 108].map((volts) => (
        <g key={volts}>
          <path d={`M${left} ${y(volts)}H${right}`} className="stroke-hair" />
          <Text x={left - 6} y={y(volts) + 4} anchor="end" soft>
            {String(volts)}
          </Text>
        </g>
      ))}
      {xs.map((x) => (
        <path
          key={x}
          d={`M${x} ${lineY + 46}V${bottom + 22}`}
          strokeDasharray="1 3"
          className="stroke-rule"
        />
      ))}
      <polyline points={line(EXAMPLE_LIMIT)} className="fill-none stroke-ink" strokeWidth="1.5" />
      <Text x={xs[2]! + 10} y={y(EXAMPLE_LIMIT.at(-1)!.volts) - 7} halo>
        {narrow ? 'limit, 5 %' : 'limit, 5 % of feeder and branch'}
      </Text>
      <polyline
        points={line(EXAMPLE_PATH)}
        className="fill-none stroke-copper"
        strokeWidth="3.2"
        strokeLinejoin="round"
      />
      {EXAMPLE_PATH.map((point, i) =>
        point.kind === 'transformer' ? null : (
          <circle
            key={point.label}
            cx={xs[i]}
            cy={y(point.volts)}
            r={point.kind === 'far-lug' ? 7 : 4}
            strokeWidth={point.kind === 'far-lug' ? 3.4 : 2}
            className="fill-sheet stroke-copper"
          />
        ),
      )}
      {!narrow &&
        EXAMPLE_PATH.map((point, i) => {
          if (!point.says) return null;
          const from = EXAMPLE_PATH[i - 1]!;
          const transformer = point.kind === 'transformer';
          const x = transformer ? xs[i]! + 8 : (xs[i - 1]! + xs[i]!) / 2 + 12;
          const level = transformer
            ? (point.volts + point.voltsBehind!) / 2
            : (from.volts + point.volts) / 2 + 0.4;
          return (
            <Text key={point.label} x={x} y={y(level)} halo>
              {point.says}
            </Text>
          );
        })}
      <text
        x={xs.at(-1)! - (narrow ? 14 : 18)}
        y={y(last.volts) + (narrow ? 7 : -2)}
        fontSize="15"
        fontWeight={600}
        textAnchor="end"
        style={{ fill: 'var(--over)' }}
      >
        {`▲ ${EXAMPLE_VERDICT}`}
      </text>
    </g>
  );
}
