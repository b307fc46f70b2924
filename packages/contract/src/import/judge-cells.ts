import { parseBreaker, parseLength, parsePower } from '@farlug/solver/units';
import { spacesFromText } from '../job/index.ts';
import { classFromText, materialFromText, racewayFromText, yesOrNo } from '../schedule/words.ts';
import type { ImportField } from './headings.ts';
import { bareSpace } from './space-text.ts';
import { readWire } from './wire-text.ts';

/** Whether a cell looks like what a field holds. */
const LOOKS: Record<ImportField, (text: string) => boolean> = {
  space: (text) => spacesFromText(bareSpace(text).replace(/[ab]$/i, '')) !== null,
  breaker: looksLikeBreaker,
  poles: (text) => /^[123]\s*p?$/i.test(text),
  line: (text) => /^(l?[123]|[abc]{1,3}|l[123]([-,/ ]l[123])*|[abc]([-,/ ][abc])+)$/i.test(text),
  description: (text) => /[a-zà-ÿ]{3}/i.test(text),
  room: (text) => text.length <= 40,
  loadType: (text) => /^[a-z]{1,2}$/i.test(text) || classFromText(text) !== null,
  load: (text) => isNumber(text) || parsePower(text).ok,
  vaL1: (text) => isNumber(text) || parsePower(text).ok,
  vaL2: (text) => isNumber(text) || parsePower(text).ok,
  vaL3: (text) => isNumber(text) || parsePower(text).ok,
  powerFactor: (text) => Number(text.replace(',', '.')) > 0 && Number(text.replace(',', '.')) <= 1,
  demand: (text) => /%$/.test(text) || isNumber(text) || /va$/i.test(text),
  continuous: (text) => yesOrNo(text) !== null,
  class: (text) => classFromText(text) !== null,
  material: (text) => materialFromText(text) !== null,
  size: (text) => readWire(text) !== null,
  neutral: (text) => /^(none|same|yes|no)$/i.test(text) || readWire(text) !== null,
  ground: (text) => readWire(text) !== null,
  sets: (text) => /^\d{1,2}$/.test(text) && Number(text) <= 50,
  raceway: (text) => racewayFromText(text) !== null || /^\d(\s*\d\/\d|\/\d)?\s*"?$/.test(text),
  length: (text) => parseLength(text, 'ft').ok,
  notes: () => true,
};

function looksLikeBreaker(text: string): boolean {
  const read = parseBreaker(text);
  return read.ok && read.amps >= 6;
}
const isNumber = (text: string): boolean => /^-?[\d,. ]*\d$/.test(text);

/** The share of filled cells that look like a field's, 0 to 1; 0.5 where none is filled. */
export function likeness(field: ImportField, cells: readonly string[]): number {
  const filled = cells.filter((text) => text !== '' && !/^[-–—"']+$/.test(text));
  if (filled.length === 0) return 0.5;
  return filled.filter(LOOKS[field]).length / filled.length;
}
