import type { Limits, LoadResult } from '@farlug/solver/job';
import { formatFixed, formatNumber } from '@farlug/solver/units';
import { Text, View } from '@react-pdf/renderer';
import { Heading } from './glyph.tsx';
import type { PrintedRow, ReportFigures } from './report-figures.ts';
import { INK, styles } from './theme.ts';

/** Where the volts of the worst circuit go, part by part. Nothing where a part of them rises. */
export function VoltsBar({ figures }: { figures: ReportFigures }) {
  const row = worstRow(figures);
  if (!row?.worst?.dropVolts || !row.worst.dropPercent) return null;
  const { dropVolts, dropPercent, volts, limitPercent } = row.worst;
  const parts = partsOf(row.worst, figures.input.job.limits);
  const sum = (some: typeof parts) => some.reduce((total, { percent }) => total + percent, 0);
  if (parts.some(({ percent }) => percent < -1e-9) || sum(parts) <= 0) return null;
  const voltsOf = (percent: number) => `${formatFixed((percent * dropVolts) / dropPercent, 2)} V`;
  const left = sum(parts.filter(({ counted }) => !counted));
  return (
    <View wrap={false} style={{ marginBottom: 8 }}>
      <Heading
        title={`Where the ${formatFixed(dropVolts, 2)} volts of ${row.code} go`}
        aside={volts === null ? undefined : `${formatFixed(volts, 1)} V at its worst load`}
      />
      <View style={{ flexDirection: 'row', height: 11, borderWidth: 0.8, borderColor: INK }}>
        {parts.map(({ name, percent, fill }, i) => (
          <View
            key={name}
            style={{
              width: `${(100 * percent) / sum(parts)}%`,
              backgroundColor: fill,
              ...(i > 0 && percent > 0 ? { borderLeftWidth: 0.8, borderLeftColor: INK } : {}),
            }}
          />
        ))}
      </View>
      <Text style={[styles.small, { marginTop: 2 }]}>
        {`From left: ${parts
          .filter(({ percent }) => percent > 0)
          .map(({ name, percent }) => `${name} ${voltsOf(percent)}`)
          .join(', ')}.`}
        {left > 0 ? ` Not counted (white): ${voltsOf(left)}, ${formatFixed(left, 2)} %.` : ''}
        {limitPercent === null ? '' : ` The limit of the total is ${formatNumber(limitPercent, 2)} %.`}
      </Text>
    </View>
  );
}

function worstRow({ exceeding, panels, looseRows }: ReportFigures): PrintedRow | undefined {
  if (exceeding[0]) return exceeding[0];
  return [...panels.flatMap(({ rows }) => rows), ...looseRows]
    .filter(({ worst }) => worst !== null)
    .sort((a, b) => (b.worst?.totalPercent ?? 0) - (a.worst?.totalPercent ?? 0))[0];
}

interface Part {
  name: string;
  percent: number;
  counted: boolean;
  fill: string;
}
function partsOf(worst: LoadResult, limits: Limits): Part[] {
  const part = (name: string, percent: number | null, counted: boolean, shade: string): Part => ({
    name,
    percent: percent ?? 0,
    counted,
    fill: counted ? shade : '#FFFFFF',
  });
  return [
    part('source', worst.sourcePercent, limits.includeSource, '#ECE7DC'),
    part('service', worst.servicePercent, limits.includeService, '#DCD7CC'),
    part('transformers', worst.transformerPercent, limits.includeTransformer, '#CCC8BF'),
    part('feeders', worst.feederPercent, true, '#B9BDC4'),
    part('branch', worst.branchPercent, true, '#4A5260'),
  ];
}
