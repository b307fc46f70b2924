import type { Force } from '@farlug/solver/job';
import type { VerdictKind } from '../../ui/glyph.tsx';

const LEADS: Record<VerdictKind, string> = {
  over: 'Over.',
  rise: 'Rise.',
  near: 'Near a limit.',
  within: 'Within.',
  unserved: 'Not served.',
  unjudged: 'Not judged.',
};

/** The verdict in one sentence: its word, then the reasons or what holds. */
export function verdictSentence(
  shown: VerdictKind,
  reasons: readonly string[],
  totalText: string,
  limitText: string | null,
): { lead: string; rest: string } {
  const lead = LEADS[shown];
  if (reasons.length > 0) return { lead, rest: `${capital(reasons.map(spoken).join(', '))}.` };
  if (shown === 'unserved')
    return { lead, rest: 'An open run or a source that is off cuts it from every source.' };
  if (shown === 'unjudged') return { lead, rest: 'No limit is set for it.' };
  return { lead, rest: limitText ? `Total ${totalText} against ${limitText}.` : `Total ${totalText}.` };
}

const spoken = (reason: string): string => reason.replace(' > ', ' against ').replace(' < ', ' against ');
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** A recommendation that is missed is not a violation, and the two are told apart. */
export function forceSentence(shown: VerdictKind, force: Force, basis: string | null): string | null {
  if (shown !== 'over' && shown !== 'rise') return null;
  const ground = basis ?? 'the limits that were set';
  return force === 'recommendation'
    ? `Exceeds the recommendation of ${ground}: not a violation by itself.`
    : `Exceeds a limit that ${ground} makes mandatory.`;
}
