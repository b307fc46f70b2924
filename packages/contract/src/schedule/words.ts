import type { LoadClass, Material, Raceway } from '@farlug/solver/job';

/** What schedules write, in English and in other common languages, as words of the job file. */

export const plainWords = (text: string): string =>
  text
    .normalize('NFKD')
    .replace(/[\u0300-\u036f]/g, '')
    .toLowerCase()
    .trim();

/** Whole words, and beginnings of words, that tell a class of load; the first that fits wins. */
const CLASSES: readonly [ofClass: LoadClass, words: string, beginnings: string][] = [
  ['fire-pump', 'fire pump|jockey pump', 'feuerloschpump'],
  ['emergency', 'exit sign|exit signs|egress', 'emerg|notbeleucht|sicherheitsbel|secours'],
  ['ev', 'ev|evse|ev charger|car charger|wallbox', 'ladestation|borne de recharge'],
  ['generation', 'pv|solar|inverter', 'photovolt|fotovolt|wechselrichter'],
  [
    'lighting',
    'lts|ltg|led|leds|lamp|lamps|luci|track',
    'light|luminaire|beleucht|licht|eclairage|iluminacion|alumbrado|illuminaz|lighting',
  ],
  [
    'receptacle',
    'rec|recs|rcpt|recpt|recp|outlet|outlets|socket|sockets|duplex|plug|plugs|prise|prises|presa|prese',
    'receptacle|recept|convenience|steckdose|enchufe|tomacorriente',
  ],
  [
    'cooling',
    'ac|a c|ac unit|rtu|fridge|clim|frigo|cooler',
    'air cond|condens|chiller|cooling|freezer|refrig|klima|kuhl|climatis|aire acond',
  ],
  [
    'kitchen',
    'oven|range|hob|cooker|ofen|herd|forno',
    'fryer|griddle|kettle|dishwash|kitchen|cuisine|cocina|cucina|combi oven',
  ],
  ['heat', 'wh|ewh|htr|uh|kiln|boiler', 'heat|furnace|heizung|chauff|calef|riscald'],
  [
    'motor',
    'mtr|fan|fans|ahu|ef|saw|lathe|mill|press|hoist|lift|elevator|drill|grinder|crane',
    'motor|pump|exhaust|compress|conveyor|pumpe|lufter|pompe|moteur|bomba|ventil',
  ],
  ['sensitive', 'ups|it rack|rack|data|server|bms', 'computer|server|telecom|fire alarm|alarm|edv|informati'],
];
const PATTERNS = CLASSES.map(([ofClass, words, beginnings]): [LoadClass, RegExp] => [
  ofClass,
  new RegExp(`(?:^|[^a-z])(?:(?:${words})(?![a-z])|(?:${beginnings}))`),
]);

/** The class that a description suggests; null where it suggests none. */
export function classFromText(text: string): LoadClass | null {
  const words = plainWords(text).replace(/[^a-z0-9]+/g, ' ');
  return PATTERNS.find(([, pattern]) => pattern.test(words))?.[0] ?? null;
}

export function materialFromText(text: string): Material | null {
  const word = plainWords(text);
  if (/^(cu|copper|kupfer|cuivre|cobre|rame)$/.test(word)) return 'copper';
  if (/^(al|alum|aluminum|aluminium|aluminio|alluminio)$/.test(word)) return 'aluminum';
  return null;
}

const RACEWAYS: readonly [RegExp, Raceway][] = [
  [/\b(pvc|plastic|ent|hdpe|kunststoff|plastique|plastico)\b/, 'pvc'],
  [/\b(al|alum|aluminum|aluminium)\b/, 'aluminum'],
  [/\b(emt|rmc|rgs|grc|imc|fmc|lfmc|steel|stahl|acier|acero|acciaio)\b/, 'steel'],
  [/\b(cable|kabel|mc|ac|nm|nmc|uf|ser|tray|trunking|nym|nyy|cavo)\b/, 'cable'],
];

/** `3/4 EMT`, `1" PVC`, `steel`: what it is made of, and the text itself where it says more than that. */
export function racewayFromText(text: string): { raceway: Raceway; size: string | null } | null {
  const words = plainWords(text);
  const found = RACEWAYS.find(([pattern]) => pattern.test(words));
  if (!found) return null;
  return { raceway: found[1], size: words === found[1] ? null : text.trim() };
}

const YES = /^(y|yes|x|true|1|c|cont|continuous|ja|oui|si|✓|✔)$/;
const NO = /^(n|no|false|0|-|nc|non|nein|noncontinuous|non-continuous|)$/;
export function yesOrNo(text: string): boolean | null {
  const word = plainWords(text).replace(/\.$/, '');
  return YES.test(word) ? true : NO.test(word) ? false : null;
}
