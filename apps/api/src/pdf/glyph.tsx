import type { ShownVerdict } from '@farlug/solver/judge';
import { Circle, Path, Svg, Text, View } from '@react-pdf/renderer';
import { COLOURS, COPPER, INK, styles } from './theme.ts';
import { VERDICT_WORDS } from './words.ts';

/** The sign of a verdict as a drawing: it reads in black and white, and needs no font. */
export function Glyph({ kind, size = 6.5 }: { kind: ShownVerdict; size?: number }) {
  const fill = COLOURS[kind];
  return (
    <Svg viewBox="0 0 12 12" style={{ width: size, height: size }}>
      {kind === 'over' && <Path d="M6 .9 11.7 11H.3Z" fill={fill} />}
      {kind === 'rise' && <Path d="M6 11.1.3 1h11.4Z" fill={fill} />}
      {kind === 'near' && <Path d="M6 .2 11.8 6 6 11.8.2 6Z" fill={fill} />}
      {kind === 'within' && <Circle cx={6} cy={6} r={4.9} fill={fill} />}
      {kind === 'unserved' && <Path d="M1.5 1.5 10.5 10.5M10.5 1.5 1.5 10.5" stroke={fill} strokeWidth={2} />}
      {kind === 'unjudged' && <Circle cx={6} cy={6} r={4.3} stroke={fill} strokeWidth={1.5} fill="none" />}
    </Svg>
  );
}

export function Verdict({ kind, word = true }: { kind: ShownVerdict; word?: boolean }) {
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: 3 }}>
      <Glyph kind={kind} />
      {word && (
        <Text style={{ color: COLOURS[kind], fontWeight: kind === 'over' ? 600 : 400 }}>
          {VERDICT_WORDS[kind]}
        </Text>
      )}
    </View>
  );
}

/** A figure that was assumed: a raised a behind it, which hangs into the gap so that the digits stay in line. */
export function Assumed({ when, children }: { when: boolean; children: string }) {
  return (
    <Text>
      {children}
      {when && (
        <Text style={{ color: COPPER, fontSize: 6, verticalAlign: 'super', letterSpacing: -3 }}>a</Text>
      )}
    </Text>
  );
}

/** The mark of the product: a line that drops to a point. */
export function Mark({ size = 20 }: { size?: number }) {
  return (
    <Svg viewBox="0 0 32 32" style={{ width: size, height: size }}>
      <Path d="M2 7H9.5L19.6 19.6" stroke={INK} strokeWidth={3} fill="none" />
      <Path d="M14.5 7H30" stroke={INK} strokeWidth={1.2} strokeDasharray="3 2.4" fill="none" />
      <Circle cx={23.4} cy={24} r={5} stroke={COPPER} strokeWidth={3} fill="none" />
    </Svg>
  );
}

export function Heading({ title, aside }: { title: string; aside?: string }) {
  return (
    <View style={{ flexDirection: 'row', justifyContent: 'space-between' }} minPresenceAhead={48}>
      <Text style={styles.h2}>{title}</Text>
      {aside && <Text style={[styles.h2, styles.soft, { fontWeight: 400 }]}>{aside}</Text>}
    </View>
  );
}
