import type { ShownVerdict } from '@farlug/solver/judge';
import { formatFixed, formatNumber } from '@farlug/solver/units';
import { Text, View } from '@react-pdf/renderer';
import { type Column, Columns, Row } from './columns.tsx';
import { Fed, limitsMissed, OtherReasons, Part } from './figure-cells.tsx';
import { Assumed, Glyph, Heading } from './glyph.tsx';
import type { PrintedRow, ReportFigures } from './report-figures.ts';
import { COLOURS } from './theme.ts';

/** What exceeds a limit, worst first: circuits, then the panels that they stand behind. */
export function ExceedingTable({ figures }: { figures: ReportFigures }) {
  const { exceeding, panels, input } = figures;
  const fed = panels.flatMap(({ rows }) => rows).filter(({ feeds }) => feeds?.shown === 'over');
  if (exceeding.length + fed.length === 0) return null;
  const all: Column[] = [
    { key: 'run', label: 'Run', width: 74, drawn: true },
    { key: 'serves', label: 'Serves' },
    { key: 'wire', label: 'Wire', width: 66 },
    { key: 'length', label: input.job.lengthUnit, width: 32, right: true },
    { key: 'load', label: 'Load', width: 42, right: true },
    { key: 'pf', label: 'pf', width: 28, right: true },
    { key: 'volts', label: 'Volts', width: 32, right: true },
    { key: 'feeder', label: 'Feeder', width: 33, right: true },
    { key: 'branch', label: 'Branch', width: 33, right: true },
    { key: 'total', label: 'Total', width: 33, right: true },
    { key: 'limit', label: 'Limits', width: 34, right: true },
  ];
  const columns = all.filter(({ key }) => key !== 'pf' || input.job.frequency > 0);
  const common = (row: PrintedRow) => ({
    wire: row.wire,
    length: <Assumed when={row.lengthAssumed}>{row.length.split(' ')[0] ?? ''}</Assumed>,
  });
  return (
    <View>
      <Heading
        title="What exceeds, worst first"
        aside="* the figure that exceeds; percent of nominal volts"
      />
      <Columns columns={columns}>
        {exceeding.map((row, i) => (
          <Row
            key={`${row.code} ${i}`}
            columns={columns}
            cells={{
              ...common(row),
              run: <Place kind={row.shown ?? 'over'} name={row.code} />,
              serves: (
                <>
                  {row.serves}
                  <OtherReasons row={row} />
                </>
              ),
              load: <Assumed when={row.loadAssumed}>{row.load}</Assumed>,
              pf: <Assumed when={row.powerFactorAssumed}>{row.powerFactor}</Assumed>,
              volts: row.worst?.volts == null ? '' : formatFixed(row.worst.volts, 1),
              feeder: <Part row={row} part="feeder" />,
              branch: <Part row={row} part="branch" />,
              total: <Part row={row} part="total" />,
              limit: limitsMissed(row),
            }}
          />
        ))}
        {fed.map(
          (row) =>
            row.feeds && (
              <Row
                key={row.feeds.bus}
                columns={columns}
                cells={{
                  ...common(row),
                  run: <Place kind="over" name={`panel ${row.feeds.bus}`} />,
                  serves: row.serves,
                  volts: row.feeds.volts === null ? '' : formatFixed(row.feeds.volts, 1),
                  feeder: <Fed panel={row.feeds} />,
                  limit: input.job.limits.feeder === null ? '' : formatNumber(input.job.limits.feeder, 2),
                }}
              />
            ),
        )}
      </Columns>
    </View>
  );
}

const Place = ({ kind, name }: { kind: ShownVerdict; name: string }) => (
  <View style={{ flexDirection: 'row', alignItems: 'center', gap: 3 }}>
    <Glyph kind={kind} />
    <Text style={{ color: COLOURS.over, fontWeight: 600 }}>{name}</Text>
  </View>
);
