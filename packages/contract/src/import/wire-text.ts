import { parseConductorSize } from '@farlug/solver/units';
import { materialFromText, racewayFromText } from '../schedule/words.ts';

/** What schedules write in one cell about the conductors: `2#12, #12G, 3/4" EMT`, `3-#8 + #10 G`, `4x16 mm²`, `12/2`. */
export interface WireText {
  size: string;
  sets: number | null;
  material: 'copper' | 'aluminum' | null;
  neutral: string | null;
  ground: string | null;
  raceway: string | null;
}

const COUNTED = /^\(?\d\)?\s*(?:-|x|×|c\b)?\s*(?=#|\d+\/0|no\.?\s)/i;
const ROLE = /\s*\b(g|gnd|ground|egc|e|pe|cpc|n|neut|neutral)\.?$/i;

/** Null where no piece of the text is a size. */
export function readWire(text: string, bareUnit = ''): WireText | null {
  const wire: WireText = { size: '', sets: null, material: null, neutral: null, ground: null, raceway: null };
  const pointed = text.replace(/(\d),(?=\d+\s*mm)/gi, '$1.');
  for (const piece of pointed.split(/\s*[,;+&]\s*|\s+(?=in\s+\d)/).filter((part) => part !== '')) {
    const role = ROLE.exec(piece)?.[1]?.toLowerCase() ?? '';
    const core = piece.replace(ROLE, '').trim();
    const metal = materialFromText(core);
    if (metal) {
      wire.material = metal;
      continue;
    }
    const size = sizeIn(core, bareUnit);
    if (size === null) {
      if (!racewayFromText(piece) && !/^\d?[\d/ ]*("|in|c)/i.test(piece)) return null;
      wire.raceway = piece.replace(/^in\s+/i, '');
    } else if (role === '' && wire.size === '') {
      wire.size = size.size;
      wire.sets = size.sets > 1 ? size.sets : null;
      wire.material = size.material ?? wire.material;
    } else if (/^n/.test(role)) wire.neutral = size.size;
    else if (role !== '' || wire.ground === null) wire.ground = size.size;
  }
  return wire.size === '' ? null : wire;
}

function sizeIn(
  core: string,
  bareUnit: string,
): { size: string; sets: number; material: WireText['material'] } | null {
  const cable = /^(\d{1,2})\s*\/\s*([2-5])$/.exec(core);
  const cores = /^([2-5])\s*(?:c|x|×|g)\s*(\d+(?:[.,]\d+)?\s*mm(?:2|²))/i.exec(core);
  const bare = core.replace(COUNTED, '');
  const plain = cable && cable[2] !== '0' ? cable[1]! : cores ? cores[2]! : bare;
  const read = parseConductorSize(bareUnit && /^\d+([.,]\d+)?$/.test(plain) ? `${plain} ${bareUnit}` : plain);
  return read.ok ? { size: read.size, sets: read.sets, material: read.material } : null;
}
