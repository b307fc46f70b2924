import type { HandCheck } from '@farlug/solver/hand-check';
import { formatFixed } from '@farlug/solver/units';
import { Text, View } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { Glyph, Heading } from './glyph.tsx';
import type { ReportFigures } from './report-figures.ts';
import { Sheet } from './sheet.tsx';
import { HAIR, styles } from './theme.ts';
import { VoltsBar } from './volts-bar.tsx';

type Done = Extract<HandCheck, { ok: true }>;

/** The formula that a person can work with a pencil beside the nodal result of every radial run. */
export function HandCheckSection({ figures, facts }: { figures: ReportFigures; facts: RevisionFacts }) {
  const done = figures.handChecks.filter((check): check is Done => check.ok);
  const left = figures.handChecks.filter((check) => !check.ok);
  if (figures.handChecks.length === 0) return null;
  const rows = new Map(
    [...figures.panels.flatMap(({ rows: list }) => list), ...figures.looseRows].flatMap((row) =>
      row.run ? [[row.run.id, row] as const] : [],
    ),
  );
  return (
    <Sheet
      figures={figures}
      facts={facts}
      section="hand check"
      title="Hand check"
      lead="Each radial run by a formula to work with a pencil, lengths one way. Branch runs in their own turn, others at design demand."
    >
      <VoltsBar figures={figures} />
      {done.map((check) => {
        const row = rows.get(check.runId);
        return (
          <View
            key={check.runId}
            wrap={false}
            style={{
              flexDirection: 'row',
              gap: 12,
              borderBottomWidth: 0.5,
              borderBottomColor: HAIR,
              paddingVertical: 3.5,
            }}
          >
            <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>
              <View style={{ flexDirection: 'row', alignItems: 'center', gap: 3 }}>
                {row?.shown && <Glyph kind={row.shown} />}
                <Text>
                  <Text style={styles.bold}>{check.runId}</Text> {row?.serves ?? ''}
                </Text>
              </View>
              <Text style={[styles.small, styles.soft]}>
                {check.wire}
                {row?.override ? ' †' : ''}. {check.constants}
              </Text>
              <Text style={styles.code}>{`${check.hand.formula}\n${check.hand.filled}`}</Text>
            </View>
            <View style={{ width: 176, flexShrink: 0 }}>
              <Results check={check} />
              {check.reasons.length > 0 && (
                <Text style={[styles.soft, { fontSize: 7.2, lineHeight: 1.3 }]}>
                  {`${signed(check.difference.percent)} %: ${check.reasons.map(({ words }) => words).join('; ')}`}
                </Text>
              )}
            </View>
          </View>
        );
      })}
      {left.length > 0 && (
        <View>
          <Heading title="Runs that no single formula follows" />
          {left.map((check) => (
            <Text key={check.runId} style={styles.small}>
              <Text style={styles.bold}>{check.runId}</Text>: {check.ok ? '' : check.reason}
            </Text>
          ))}
        </View>
      )}
    </Sheet>
  );
}

const signed = (percent: number): string => `${percent >= 0 ? '+' : '−'}${formatFixed(Math.abs(percent), 2)}`;

/** By hand above, the node equations below them in bold: three texts side by side, so that a line stays a line. */
function Results({ check: { hand, byCircularMils, nodal } }: { check: Done }) {
  const byHand = [
    { word: 'By hand', ...hand },
    ...(byCircularMils ? [{ word: 'By 2·K·I·D/cmil', ...byCircularMils }] : []),
  ];
  return (
    <View style={[styles.row, { fontSize: 8, lineHeight: 1.35 }]}>
      <Text style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>
        {byHand.map(({ word }) => `${word}\n`)}
        <Text style={styles.bold}>Node equations, {nodal.pair}</Text>
      </Text>
      <Text style={{ width: 42, textAlign: 'right' }}>
        {byHand.map(({ volts }) => `${formatFixed(volts, 2)} V\n`)}
        <Text style={styles.bold}>{formatFixed(nodal.volts, 2)} V</Text>
      </Text>
      <Text style={{ width: 44, textAlign: 'right' }}>
        {byHand.map(({ percent }) => `${formatFixed(percent, 2)} %\n`)}
        <Text style={styles.bold}>{formatFixed(nodal.percent, 2)} %</Text>
      </Text>
    </View>
  );
}
