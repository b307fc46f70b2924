import { formatFixed, formatNumber } from '@farlug/solver/units';
import { Text, View } from '@react-pdf/renderer';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { ExceedingTable } from './exceeding-table.tsx';
import { Glyph, Heading } from './glyph.tsx';
import type { ReportFigures } from './report-figures.ts';
import { Sheet } from './sheet.tsx';
import { COLOURS, HAIR, INK, styles } from './theme.ts';
import { day, limitsText, notCounted, SCENARIO_TEXT, sourceText, transformerText } from './words.ts';

/** The first sheets: the verdict, what it stands on, what exceeds, the panels, the cautions. */
export function SummarySection({ figures, facts }: { figures: ReportFigures; facts: RevisionFacts }) {
  const { input } = figures;
  const { titleBlock } = input;
  return (
    <Sheet
      figures={figures}
      facts={facts}
      section="verdict and basis"
      title={titleBlock.heading || 'Voltage drop report'}
      lead={`${[titleBlock.job, titleBlock.building, titleBlock.area, titleBlock.address].filter(Boolean).join(', ')}
Issued by ${titleBlock.issuedBy}, ${titleBlock.firm}, ${day(facts.issuedAt)}, from edit ${input.seq}`}
      aside={[
        ['Code', titleBlock.codeEdition ? `${titleBlock.codeEdition}, as entered` : 'not stated'],
        ['Authority', titleBlock.authority ?? 'not stated'],
        ['Permit', titleBlock.permitNumber ?? 'not stated'],
      ]}
    >
      <VerdictSentence figures={figures} />
      {input.note.trim() !== '' && <Text style={{ marginBottom: 4 }}>{input.note.trim()}</Text>}
      <Basis figures={figures} />
      <ExceedingTable figures={figures} />
      <Panels figures={figures} />
      <Overrides figures={figures} />
      <Notices figures={figures} />
    </Sheet>
  );
}

function VerdictSentence({ figures }: { figures: ReportFigures }) {
  const { counts, panelsOver, input } = figures;
  const over = counts.over + counts.rise;
  const judged = over + counts.near + counts.within;
  const what = input.job.limits.force === 'mandatory' ? 'the mandatory limits' : 'the recommendation';
  const panels = panelsOver === 0 ? '' : panelsOver === 1 ? ' and one panel' : ` and ${panelsOver} panels`;
  const kind = over + panelsOver > 0 ? 'over' : counts.near > 0 ? 'near' : 'within';
  const lead =
    over + panelsOver > 0
      ? `${over} of ${judged} judged circuits${panels} ${over === 1 && panelsOver === 0 ? 'exceeds' : 'exceed'} ${what}.`
      : `None of ${judged} judged circuits exceeds ${what}.`;
  const rest = [
    `${counts.near === 0 ? 'None is' : counts.near === 1 ? '1 is' : `${counts.near} are`} near a limit, ${counts.within} within.`,
    counts.unjudged > 0 ? `${counts.unjudged} have no limit.` : '',
    counts.unserved > 0 ? `${counts.unserved} are not served: a run is open or a source off.` : '',
    'No row is left out.',
  ]
    .filter(Boolean)
    .join(' ');
  return (
    <View style={{ flexDirection: 'row', gap: 6, marginBottom: 6 }}>
      <View style={{ paddingTop: 4 }}>
        <Glyph kind={kind} size={9} />
      </View>
      <Text style={{ fontSize: 12, lineHeight: 1.35, flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>
        <Text style={{ color: COLOURS[kind], fontWeight: 600 }}>{lead}</Text> {rest}
      </Text>
    </View>
  );
}

function Basis({ figures }: { figures: ReportFigures }) {
  const { input, scenario } = figures;
  const { job } = input;
  const count = (field: string) => input.assumed.filter((one) => one.field === field).length;
  const assumed = (
    [
      ['load', 'loads', count('size')],
      ['power factor', 'power factors', count('powerFactor')],
      ['length', 'lengths', count('length')],
      ['raceway', 'raceways', count('raceway')],
    ] as const
  )
    .filter(([, , many]) => many > 0)
    .map(([one, several, many]) => `${many} ${many === 1 ? one : several}`);
  const left: [string, string][] = [
    ['Limits', limitsText(job)],
    [
      'Ground',
      `${job.limits.basis ?? 'not stated'}: ${job.limits.force === 'mandatory' ? 'mandatory' : 'a recommendation. A miss is not a violation by itself'}`,
    ],
    ['Not counted', notCounted(job)],
    ['Scenario', SCENARIO_TEXT[scenario]],
  ];
  const right: [string, string][] = [
    ...job.sources.map((source): [string, string] => ['Service', sourceText(source)]),
    ...job.transformers.map((t): [string, string] => ['Transformer', transformerText(t)]),
    [
      'Conductors',
      `${job.basis === 'impedance' && job.frequency > 0 ? 'R and X' : 'R'} at ${job.frequency === 0 ? 'direct current' : `${formatNumber(job.frequency)} Hz`}; tables at the end`,
    ],
    ['Method', 'node-voltage equations of the whole network'],
    [
      'Assumed',
      assumed.length === 0 ? 'nothing' : `${assumed.join(', ')}; each is marked a where it is printed`,
    ],
  ];
  return (
    <View style={{ borderTopWidth: 0.6, borderTopColor: HAIR }}>
      <Heading title="What it stands on" />
      <View style={{ flexDirection: 'row', gap: 16 }}>
        {[left, right].map((list) => (
          <View key={list[0]![0]} style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>
            {list.map(([word, text], i) => (
              <View key={`${word} ${i}`} style={[styles.row, { marginBottom: 1 }]}>
                <Text style={[styles.soft, { width: 58, flexShrink: 0 }]}>{word}</Text>
                <Text style={{ flexShrink: 1, flexGrow: 1, flexBasis: 0 }}>{text}</Text>
              </View>
            ))}
          </View>
        ))}
      </View>
    </View>
  );
}

function Panels({ figures }: { figures: ReportFigures }) {
  const limit = figures.input.job.limits.feeder;
  if (figures.panels.length === 0) return null;
  return (
    <View wrap={false}>
      <Heading
        title="Feeder part at each panel, design demand"
        aside={limit === null ? 'no limit set' : `limit ${formatNumber(limit, 2)} %`}
      />
      <View style={{ borderTopWidth: 1, borderTopColor: INK, flexDirection: 'row', flexWrap: 'wrap' }}>
        {figures.panels.map((panel) => (
          <View
            key={panel.bus}
            style={{
              width: '11.1%',
              paddingVertical: 2.5,
              paddingHorizontal: 3,
              borderBottomWidth: 0.5,
              borderBottomColor: HAIR,
            }}
          >
            <Text style={styles.bold}>{panel.bus}</Text>
            <View style={{ flexDirection: 'row', alignItems: 'center', gap: 3 }}>
              <Glyph kind={panel.shown} />
              <Text style={{ color: COLOURS[panel.shown] }}>
                {panel.figures?.feederPercent == null ? '' : formatFixed(panel.figures.feederPercent, 2)}
              </Text>
            </View>
          </View>
        ))}
      </View>
    </View>
  );
}

function Overrides({ figures }: { figures: ReportFigures }) {
  const { overrides } = figures.input;
  if (overrides.length === 0) return null;
  return (
    <View>
      <Heading title="† Below the ampacity floor by decision" />
      {overrides.map(({ run, reason }) => (
        <Text key={run} style={styles.small}>
          <Text style={styles.bold}>{run}</Text>: {reason}
        </Text>
      ))}
    </View>
  );
}

function Notices({ figures }: { figures: ReportFigures }) {
  const { notices, firmWording } = figures.input;
  return (
    <View
      wrap={false}
      style={{ borderWidth: 1, borderColor: INK, paddingHorizontal: 8, paddingVertical: 5, marginTop: 9 }}
    >
      <Text style={styles.bold}>Notices</Text>
      <Text style={styles.small}>{notices.join(' ')}</Text>
      {firmWording.trim() !== '' && (
        <Text style={[styles.small, { marginTop: 3 }]}>{firmWording.trim()}</Text>
      )}
    </View>
  );
}
