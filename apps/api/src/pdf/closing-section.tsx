import { Text, View } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { Heading } from './glyph.tsx';
import type { ReportFigures } from './report-figures.ts';
import { Sheet } from './sheet.tsx';
import { HAIR, INK, styles } from './theme.ts';

/** The tables that the figures come from, the firm's own sizes, and room for the decision. */
export function ClosingSection({ figures, facts }: { figures: ReportFigures; facts: RevisionFacts }) {
  const { tables, job } = figures.input;
  return (
    <Sheet
      figures={figures}
      facts={facts}
      section="tables and decision"
      title="Tables and decision"
      lead="Figures come from these tables as transcribed; confirm them against the adopted edition."
    >
      <Heading title="Tables" aside="first digits of each table’s SHA-256" />
      {tables.map((table) => (
        <Line key={table.id} text={table.source} mark={table.sha256.slice(0, 12)} />
      ))}
      {job.conductorRows.length > 0 && (
        <View>
          <Heading title="Sizes of the firm’s own" aside="ohm per conductor" />
          {job.conductorRows.map((row) => (
            <Line
              key={`${row.name} ${row.material}`}
              text={`${row.name}, ${row.material}: ${row.source}`}
              mark={`${row.r} + j${row.x} per ${row.per === 'km' ? 'km' : '1000 ft'}`}
            />
          ))}
        </View>
      )}
      <View wrap={false} style={{ borderWidth: 1, borderColor: INK, padding: 9, marginTop: 16 }}>
        <Text style={[styles.bold, { marginBottom: 8 }]}>Decision on revision {facts.revisionLetter}</Text>
        <View style={{ flexDirection: 'row', gap: 20, marginBottom: 16, alignItems: 'flex-end' }}>
          <Box text="No exceptions" />
          <Box text="Corrections needed" />
          <Blank text="Other" grow={3} />
        </View>
        <View style={{ flexDirection: 'row', marginBottom: 16 }}>
          <Blank text="Comments" grow={1} />
        </View>
        <View style={{ flexDirection: 'row', gap: 20, marginBottom: 10 }}>
          <Blank text="Name and title" grow={3} />
          <Blank text="Signature" grow={3} />
          <Blank text="Date" grow={1} />
        </View>
        <Text style={styles.small}>
          Return this page, or open the link in the covering e-mail. The decision is kept against input{' '}
          {facts.sha256}.
        </Text>
      </View>
    </Sheet>
  );
}

function Line({ text, mark }: { text: string; mark: string }) {
  return (
    <View
      wrap={false}
      style={{
        flexDirection: 'row',
        justifyContent: 'space-between',
        gap: 12,
        borderBottomWidth: 0.5,
        borderBottomColor: HAIR,
        paddingVertical: 1.8,
      }}
    >
      <Text style={[styles.small, { flexShrink: 1 }]}>{text}</Text>
      <Text style={styles.code}>{mark}</Text>
    </View>
  );
}

const Box = ({ text }: { text: string }) => (
  <View style={{ flexDirection: 'row', alignItems: 'center', gap: 5 }}>
    <View style={{ width: 9, height: 9, borderWidth: 1, borderColor: INK }} />
    <Text>{text}</Text>
  </View>
);

const Blank = ({ text, grow }: { text: string; grow: number }) => (
  <View style={{ flexGrow: grow, flexBasis: 0, borderBottomWidth: 0.8, borderBottomColor: INK }}>
    <Text style={styles.soft}>{text}</Text>
  </View>
);
