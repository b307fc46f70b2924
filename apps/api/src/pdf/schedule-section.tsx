import { formatFixed } from '@farlug/solver/units';
import { Text, View } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { type Column, Columns, Row } from './columns.tsx';
import { Fed, OtherReasons, Part } from './figure-cells.tsx';
import { Assumed, Glyph, Verdict } from './glyph.tsx';
import type { PrintedPanel, PrintedRow, ReportFigures } from './report-figures.ts';
import { Sheet } from './sheet.tsx';
import { COLOURS, styles } from './theme.ts';

const COLUMNS: readonly Column[] = [
  { key: 'space', label: 'Space', width: 38 },
  { key: 'line', label: 'Line', width: 24 },
  { key: 'serves', label: 'Serves' },
  { key: 'breaker', label: 'Breaker', width: 31 },
  { key: 'wire', label: 'Wire', width: 66 },
  { key: 'length', label: 'Length', width: 38, right: true },
  { key: 'load', label: 'Load', width: 42, right: true },
  { key: 'pf', label: 'pf', width: 28, right: true },
  { key: 'feeder', label: 'Feeder', width: 33, right: true },
  { key: 'branch', label: 'Branch', width: 33, right: true },
  { key: 'total', label: 'Total', width: 33, right: true },
  { key: 'verdict', label: 'Verdict', width: 56, gap: 8, drawn: true },
];

/** Every panel's schedule as it was judged. */
export function ScheduleSection({ figures, facts }: { figures: ReportFigures; facts: RevisionFacts }) {
  const columns = COLUMNS.filter(({ key }) => key !== 'pf' || figures.input.job.frequency > 0);
  return (
    <Sheet
      figures={figures}
      facts={facts}
      section="schedules"
      title="Schedules"
      lead="Each circuit by its worst load, percent of nominal volts. A raised a marks what was assumed; * the figure that exceeds."
    >
      {figures.panels.map((panel) => (
        <PanelTable key={panel.bus} columns={columns} panel={panel} />
      ))}
      {figures.looseRows.length > 0 && (
        <View>
          <Title name="In no panel" about="" />
          <Columns columns={columns}>
            {figures.looseRows.map((row, i) => (
              <ScheduleRow key={`${row.code} ${i}`} columns={columns} row={row} />
            ))}
          </Columns>
        </View>
      )}
    </Sheet>
  );
}

function PanelTable({ columns, panel }: { columns: readonly Column[]; panel: PrintedPanel }) {
  const percent = panel.figures?.feederPercent;
  return (
    <View style={{ marginBottom: 8 }}>
      <View
        fixed
        minPresenceAhead={60}
        style={{ flexDirection: 'row', alignItems: 'center', gap: 8, marginTop: 4, marginBottom: 2 }}
      >
        <Title name={`${panel.bus}${panel.name ? ` ${panel.name}` : ''}`} about={panel.about} />
        {percent != null && (
          <View style={{ flexDirection: 'row', alignItems: 'center', gap: 3, marginLeft: 'auto' }}>
            <Text style={styles.soft}>feeder part</Text>
            <Glyph kind={panel.shown} />
            <Text style={{ color: COLOURS[panel.shown] }}>{formatFixed(percent, 2)} %</Text>
          </View>
        )}
      </View>
      {panel.rows.length === 0 ? (
        <Text style={[styles.small, styles.soft]}>No circuit in its schedule.</Text>
      ) : (
        <Columns columns={columns}>
          {panel.rows.map((row, i) => (
            <ScheduleRow key={`${row.spaces} ${row.code} ${i}`} columns={columns} row={row} />
          ))}
        </Columns>
      )}
    </View>
  );
}

const Title = ({ name, about }: { name: string; about: string }) => (
  <Text style={{ fontSize: 10.5 }}>
    <Text style={styles.bold}>{name}</Text>
    {about !== '' && <Text style={[styles.soft, { fontSize: 8.5 }]}>{`  ${about}`}</Text>}
  </Text>
);

function ScheduleRow({ columns, row }: { columns: readonly Column[]; row: PrintedRow }) {
  const idle = row.run === null && row.worst === null;
  return (
    <Row
      columns={columns}
      idle={idle}
      cells={{
        space: row.spaces || row.code,
        line: row.line,
        serves: (
          <>
            {[row.serves || (idle ? row.kind : ''), row.room].filter(Boolean).join(', ')}
            <OtherReasons row={row} />
            {row.override !== null && (
              <Text style={{ color: COLOURS.over }}>{'\n† below the ampacity floor by decision'}</Text>
            )}
          </>
        ),
        breaker: row.breaker,
        wire: row.wire,
        length: <Assumed when={row.lengthAssumed}>{row.length}</Assumed>,
        load: <Assumed when={row.loadAssumed}>{row.load}</Assumed>,
        pf: <Assumed when={row.powerFactorAssumed}>{row.powerFactor}</Assumed>,
        feeder: row.feeds ? <Fed panel={row.feeds} /> : <Part row={row} part="feeder" />,
        branch: <Part row={row} part="branch" />,
        total: <Part row={row} part="total" />,
        verdict: row.feeds ? <Verdict kind={row.feeds.shown} /> : row.shown && <Verdict kind={row.shown} />,
      }}
    />
  );
}
