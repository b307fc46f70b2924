import { formatFixed } from '@farlug/solver/units';
import { Text } from '@react-pdf/renderer';
import type { FedPanel, PrintedRow } from './report-figures.ts';
import { COLOURS, styles } from './theme.ts';

const PARTS = ['feeder', 'branch', 'total'] as const;

/** One part of a drop: bold and starred where it is the figure that exceeds. */
export function Part({ row: { worst }, part }: { row: PrintedRow; part: (typeof PARTS)[number] }) {
  if (!worst) return null;
  const value = { feeder: worst.feederPercent, branch: worst.branchPercent, total: worst.totalPercent }[part];
  if (value === null) return null;
  const missed = worst.reasons.find((reason) => reason.startsWith(`${part} `));
  if (!missed) return <Text>{formatFixed(value, 2)}</Text>;
  // The reason has as many digits as tell the figure from its limit.
  return <Exceeding>{/ ([\d.]+) %/.exec(missed)?.[1] ?? formatFixed(value, 2)}</Exceeding>;
}

/** The feeder part at the panel that a row feeds. */
export function Fed({ panel: { feederPercent, shown } }: { panel: FedPanel }) {
  if (feederPercent === null) return null;
  const text = formatFixed(feederPercent, 2);
  return shown === 'over' ? <Exceeding>{text}</Exceeding> : <Text>{text}</Text>;
}

const Exceeding = ({ children }: { children: string }) => (
  <Text style={styles.bold}>
    {children}
    <Text style={{ letterSpacing: -3.4 }}>*</Text>
  </Text>
);

const byPart = (reason: string): boolean => PARTS.some((part) => reason.startsWith(`${part} `));

/** What else a row exceeds than the parts that have a column: starting, rise, volts, rating. */
export function OtherReasons({ row }: { row: PrintedRow }) {
  const others = row.worst?.reasons.filter((reason) => !byPart(reason)) ?? [];
  if (others.length === 0) return null;
  return <Text style={{ color: COLOURS.over }}>{`\n${others.join('; ')}`}</Text>;
}

/** The limits of the parts that a row exceeds, in the order of the columns: `3, 5`. */
export const limitsMissed = ({ worst }: PrintedRow): string =>
  (worst?.reasons ?? [])
    .filter(byPart)
    .map((reason) => / > ([\d.]+) %$/.exec(reason)?.[1] ?? '')
    .filter(Boolean)
    .join(', ');
