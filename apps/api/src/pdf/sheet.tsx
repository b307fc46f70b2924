import { Page, Text, View } from '@react-pdf/renderer';
import type { ReactNode } from 'react';
import type { RevisionFacts } from '../worker/worker-deps.ts';
import { Mark } from './glyph.tsx';
import type { ReportFigures } from './report-figures.ts';
import { INK, SOFT, styles } from './theme.ts';
import { day } from './words.ts';

interface SheetProps {
  figures: ReportFigures;
  facts: RevisionFacts;
  /** Two words at the foot of each page, which a heading on the first does not reach. */
  section: string;
  title: string;
  lead?: string;
  aside?: readonly (readonly [string, string])[];
  children: ReactNode;
}

const LEFT = 33;
const RIGHT = 29;
const TOP = 30;
const BOTTOM = 65;
const COLUMNS = ['1', '2', '3', '4', '5', '6', '7', '8'];
const ROWS = ['A', 'B', 'C', 'D', 'E', 'F'];

/** A drawing sheet: frame with zones, the title block at the foot of each page, and what flows between. */
export function Sheet({ figures, facts, section, title, lead, aside, children }: SheetProps) {
  const letter = figures.input.paper === 'letter';
  const height = letter ? 792 : 842;
  return (
    <Page
      size={letter ? 'LETTER' : 'A4'}
      wrap
      style={{
        paddingTop: TOP + 12,
        paddingLeft: LEFT + 14,
        paddingRight: RIGHT + 14,
        paddingBottom: BOTTOM + 8,
      }}
    >
      <View
        fixed
        style={{
          position: 'absolute',
          left: LEFT,
          right: RIGHT,
          top: TOP,
          height: height - TOP - BOTTOM,
          borderWidth: 1,
          borderColor: INK,
        }}
      />
      <Zones height={height} />
      <View style={styles.text}>
        <View
          style={{
            flexDirection: 'row',
            justifyContent: 'space-between',
            borderBottomWidth: 2,
            borderBottomColor: INK,
            paddingBottom: 6,
            marginBottom: 6,
          }}
        >
          <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0, paddingRight: 14 }}>
            <Text style={styles.h1}>{title}</Text>
            {lead && <Text>{lead}</Text>}
          </View>
          {aside && (
            <View style={{ flexShrink: 0, width: asideWidth(aside) }}>
              {aside.map(([word, text]) => (
                <View key={word} style={styles.row}>
                  <Text style={[styles.soft, { width: 46 }]}>{word}</Text>
                  <Text style={{ flexGrow: 1, flexShrink: 1, flexBasis: 0 }}>{text}</Text>
                </View>
              ))}
            </View>
          )}
        </View>
        {children}
      </View>
      <TitleBlock figures={figures} facts={facts} section={section} />
      {/* Laid out anew on each page, where an inherited line height would be applied twice. */}
      <Text
        fixed
        style={{
          position: 'absolute',
          right: RIGHT,
          bottom: BOTTOM - 28,
          width: 46,
          fontFamily: 'Sans',
          fontSize: 8.5,
          color: INK,
        }}
        render={({ pageNumber, totalPages }) => `${pageNumber} of ${totalPages}`}
      />
    </Page>
  );
}

/** As wide as its longest text needs, up to two fifths of the sheet. */
const asideWidth = (aside: readonly (readonly [string, string])[]): number =>
  46 + Math.min(160, Math.max(...aside.map(([, text]) => text.length * 4.6)));

function Zones({ height }: { height: number }) {
  const zone = { position: 'absolute' as const, fontFamily: 'Sans', fontSize: 6.5, color: SOFT };
  return (
    <>
      {COLUMNS.map((label, i) => (
        <Text
          fixed
          key={label}
          style={[zone, { top: TOP - 11, left: `${6 + ((i + 0.5) / COLUMNS.length) * 88}%` }]}
        >
          {label}
        </Text>
      ))}
      {ROWS.map((label, i) => (
        <Text
          fixed
          key={label}
          style={[
            zone,
            { left: LEFT - 11, top: TOP + ((i + 0.5) / ROWS.length) * (height - TOP - BOTTOM) - 4 },
          ]}
        >
          {label}
        </Text>
      ))}
    </>
  );
}

function TitleBlock({
  figures,
  facts,
  section,
}: {
  figures: ReportFigures;
  facts: RevisionFacts;
  section: string;
}) {
  const { titleBlock } = figures.input;
  return (
    <View
      fixed
      style={{
        position: 'absolute',
        left: LEFT,
        right: RIGHT,
        bottom: BOTTOM - 36,
        height: 36,
        borderWidth: 1,
        borderTopWidth: 2,
        borderColor: INK,
        flexDirection: 'row',
        fontFamily: 'Sans',
        fontSize: 8.5,
        lineHeight: 1.25,
        color: INK,
      }}
    >
      <View style={{ flexDirection: 'row', alignItems: 'center', gap: 5, paddingHorizontal: 7 }}>
        <Mark size={19} />
        <View>
          <Text style={styles.bold}>Farlug</Text>
          <Text style={{ fontSize: 7.5 }}>voltage drop report</Text>
          <Text style={{ fontSize: 6.5, color: SOFT }}>{section}</Text>
        </View>
      </View>
      <Cell word="Job" text={titleBlock.job} grow />
      <Cell word="Issued by" text={`${titleBlock.firm}`} width={104} />
      <Cell word="Revision" text={facts.revisionLetter} width={44} />
      <Cell word="Date" text={day(facts.issuedAt)} width={58} />
      <Cell word="Input, solver" text={`${facts.sha256.slice(0, 8)}, ${facts.solverVersion}`} width={84} />
      <View
        style={{ borderLeftWidth: 1, borderLeftColor: INK, paddingHorizontal: 6, paddingTop: 4, width: 52 }}
      >
        <Text style={{ fontSize: 6.5, color: SOFT }}>Page</Text>
      </View>
    </View>
  );
}

const CELL_LETTERS = 42;
/** What two small lines of a cell hold, cut between words: the whole stands at the head of the first sheet. */
const cut = (text: string): string =>
  text.length <= CELL_LETTERS ? text : `${text.slice(0, CELL_LETTERS).replace(/\s+\S*$/, '')} …`;

function Cell({
  word,
  text,
  grow = false,
  width,
}: {
  word: string;
  text: string;
  grow?: boolean;
  width?: number;
}) {
  return (
    <View
      style={{
        borderLeftWidth: 1,
        borderLeftColor: INK,
        paddingHorizontal: 6,
        paddingTop: 4,
        overflow: 'hidden',
        ...(grow ? { flexGrow: 1, flexShrink: 1, flexBasis: 0 } : { width }),
      }}
    >
      <Text style={{ fontSize: 6.5, color: SOFT }}>{word}</Text>
      <Text style={text.length > 18 ? { fontSize: 7, lineHeight: 1.1, maxLines: 2 } : {}}>{cut(text)}</Text>
    </View>
  );
}
