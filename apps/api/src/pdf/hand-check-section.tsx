import type { HandCheck } from '@farlug/solver/hand-check';
import { formatFixed } from '@farlug/solver/units';
import { Text, View } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { Glyph, Heading } from './glyph.tsx';
import type { ReportFigures } from './report-figures.ts';
import { Sheet } from './sheet.tsx';
import { HAIR, styles } from './theme.ts';

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
      title="Hand check"
      lead="Each radial run by a formula that can be worked with a pencil, lengths one way; branch runs in the turn of their own circuit, others at design demand."
    >
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
                {check.wire}. {check.constants}
              </Text>
              <Text style={styles.code}>{check.hand.formula}</Text>
              <Text style={styles.code}>{check.hand.filled}</Text>
            </View>
            <View style={{ width: 176, flexShrink: 0 }}>
              <Result word="By hand" volts={check.hand.volts} percent={check.hand.percent} />
              {check.byCircularMils && (
                <Result
                  word="By 2·K·I·D/cmil"
                  volts={check.byCircularMils.volts}
                  percent={check.byCircularMils.percent}
                />
              )}
              <Result
                word={`Node equations, ${check.nodal.pair}`}
                volts={check.nodal.volts}
                percent={check.nodal.percent}
                strong
              />
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

function Result({
  word,
  volts,
  percent,
  strong = false,
}: {
  word: string;
  volts: number;
  percent: number;
  strong?: boolean;
}) {
  const style = strong ? styles.bold : {};
  return (
    <View
      style={{
        flexDirection: 'row',
        borderBottomWidth: 0.5,
        borderBottomColor: HAIR,
        paddingVertical: 0.8,
        fontSize: 8,
      }}
    >
      <Text style={[{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }, style]}>{word}</Text>
      <Text style={[{ width: 42, textAlign: 'right' }, style]}>{formatFixed(volts, 2)} V</Text>
      <Text style={[{ width: 44, textAlign: 'right' }, style]}>{formatFixed(percent, 2)} %</Text>
    </View>
  );
}
