import { complexText } from '@farlug/solver/equations';
import { Text, View } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { Heading } from './glyph.tsx';
import type { ReportFigures } from './report-figures.ts';
import { Sheet } from './sheet.tsx';
import { HAIR, styles } from './theme.ts';

const STATE = { design: 'design demand', 'everything-on': 'everything on', light: 'light load' } as const;

/** The node equations of one panel, in names, with numbers, and their solution. */
export function EquationsSection({ figures, facts }: { figures: ReportFigures; facts: RevisionFacts }) {
  if (figures.equations === null) return null;
  const { bus, equations } = figures.equations;
  return (
    <Sheet
      figures={figures}
      facts={facts}
      section="node equations"
      title={`Node equations at ${bus}`}
      lead={`Written by inspection at ${STATE[equations.scenario]}: own admittance times own voltage, less each joining admittance times its neighbour’s voltage, equals the current that flows in. Siemens, volts, amperes; closes to ${equations.kclResidual === 0 ? '0' : equations.kclResidual.toExponential(1)} of the largest current.`}
    >
      {equations.equations.map((equation) => (
        <View
          key={equation.node}
          style={{ borderBottomWidth: 0.5, borderBottomColor: HAIR, paddingVertical: 3 }}
        >
          <Text style={styles.bold} minPresenceAhead={30}>
            {equation.node}
            {equation.also.length > 0 ? `, the same as ${equation.also.join(', ')}` : ''}
          </Text>
          {!equation.given && <Text style={[styles.code, styles.soft]}>{equation.symbols}</Text>}
          <Text style={styles.code}>{equation.text}</Text>
          {!equation.given && (
            <Text style={styles.small}>
              Solved: V({equation.node}) = <Text style={styles.bold}>{complexText(equation.volts)} V</Text>
            </Text>
          )}
        </View>
      ))}
      <Named title="Voltages of the nodes around, volt" items={equations.neighbours} />
      <Named title="Impedances, ohm" items={equations.impedances} />
      <Named title="Currents, ampere" items={equations.currents} />
    </Sheet>
  );
}

type Item = { name: string; about: string; value: readonly [number, number] };

/** Two to a line: name and value. */
function Named({ title, items }: { title: string; items: readonly Item[] }) {
  if (items.length === 0) return null;
  return (
    <View>
      <View fixed>
        <Heading title={title} />
      </View>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap' }}>
        {items.map(({ name, value }) => (
          <View
            key={name}
            wrap={false}
            style={{
              width: '50%',
              flexDirection: 'row',
              justifyContent: 'space-between',
              paddingRight: 12,
              paddingVertical: 0.6,
            }}
          >
            <Text style={styles.code}>{name}</Text>
            <Text style={styles.code}>{complexText(value)}</Text>
          </View>
        ))}
      </View>
    </View>
  );
}
