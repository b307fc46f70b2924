import { plainWords } from '../schedule/words.ts';

/** What a column of an uploaded schedule can hold. */
export const IMPORT_FIELDS = [
  'space',
  'breaker',
  'poles',
  'line',
  'description',
  'room',
  'loadType',
  'load',
  'vaL1',
  'vaL2',
  'vaL3',
  'powerFactor',
  'demand',
  'continuous',
  'class',
  'material',
  'size',
  'neutral',
  'ground',
  'sets',
  'raceway',
  'length',
  'notes',
] as const;
export type ImportField = (typeof IMPORT_FIELDS)[number];

/** Headings in English, German, French, Spanish and Italian, without accents; `|` parts them. */
const HEADINGS: Record<ImportField, string> = {
  space:
    'ckt|ckt no|ckt nr|ckt number|circuit|circuit no|circuit number|cct|cct no|cct ref|space|spaces|pole no|pole number|position|way|no|nr|number|stromkreis|stromkreis nr|platz|depart|circuit n|n|circuito|circuito n|num|linea n',
  breaker:
    'breaker|brkr|bkr|brk|cb|c b|ocpd|ocp|trip|amps trip|trip amps|breaker size|breaker amps|breaker rating|circuit breaker|mcb|mcb rating|rating|overcurrent|sicherung|ls schalter|leitungsschutz|disjoncteur|calibre|interruptor|magnetotermico|interruttore|protection|fuse',
  poles: 'poles|pole|p|no of poles|number of poles|polzahl|polig|nb de poles|polos|poli',
  line: 'phase|ph|line|lines|phases|phase letter|bus|aussenleiter|fase',
  description:
    'description|desc|load description|circuit description|serves|serving|load served|load name|name|designation|bezeichnung|beschreibung|verbraucher|utilisation|descripcion|descrizione|utenza|equipment|load',
  room: 'room|location|area|space served|raum|ort|lieu|local|piece|emplacement|sala|ubicacion|locale|ambiente|zona',
  loadType:
    'load type|type|type of load|lt|load code|category|art|typ|art der last|nature|tipo|tipo de carga|tipo carico',
  load: 'load|loads|va|watts|w|kva|kw|amps|amperes|connected load|connected|conn load|connected va|load va|total va|full load amps|fla|current|leistung|last|anschlussleistung|puissance|charge|carga|potencia|carico|potenza|corrente|strom|hp',
  vaL1: 'a|l1|phase a|ph a|phase l1|line 1|va a|a va|l1 va|va l1|phase a va|load a|load phase a|r|phase r',
  vaL2: 'b|l2|phase b|ph b|phase l2|line 2|va b|b va|l2 va|va l2|phase b va|load b|load phase b|s|phase s',
  vaL3: 'c|l3|phase c|ph c|phase l3|line 3|va c|c va|l3 va|va l3|phase c va|load c|load phase c|t|phase t',
  powerFactor:
    'pf|p f|power factor|cos phi|cosphi|cos φ|cos|leistungsfaktor|facteur de puissance|factor de potencia|fattore di potenza',
  demand:
    'demand|demand factor|df|d f|diversity|diversity factor|demand va|demand load|gleichzeitigkeit|simultaneite|simultaneidad',
  continuous: 'cont|continuous|c nc|continuous load|lcl|dauerlast|continu|continua',
  class: 'class|load class|klasse|classe|clase',
  material: 'material|cu al|conductor material|mat|werkstoff|leitermaterial|matiere|materiale',
  size: 'wire|wire size|wires|conductor|conductors|conductor size|size|awg|wire awg|cable|cable size|csa|mm2|querschnitt|leiterquerschnitt|section|seccion|sezione|feeder size',
  neutral: 'neutral|neutral size|neut|neutralleiter|neutre|neutro|n size',
  ground:
    'ground|ground size|gnd|egc|equipment ground|grounding|earth|cpc|pe|erdung|schutzleiter|terre|tierra|terra|g',
  sets: 'sets|no of sets|parallel sets|parallel|runs per phase|systeme|jeux',
  raceway:
    'conduit|conduit size|raceway|wiring method|conduit type|rohr|verlegeart|tube|conduit c|canalisation|tubo|canalizacion',
  length:
    'length|run length|distance|dist|one way|one way length|run|length ft|length m|feet|ft|metres|meters|lange|leitungslange|longueur|longitud|distancia|lunghezza|distanza',
  notes:
    'notes|note|remarks|remark|comments|comment|bemerkung|bemerkungen|remarque|remarques|observaciones|notas|annotazioni',
};

const EXACT = new Map<string, ImportField[]>();
for (const field of IMPORT_FIELDS)
  for (const heading of HEADINGS[field].split('|'))
    EXACT.set(heading, [...(EXACT.get(heading) ?? []), field]);

/** Words of a heading that say the unit of its column. */
const UNITS: readonly [RegExp, string][] = [
  [/\bkva\b/, 'kVA'],
  [/\bkw\b/, 'kW'],
  [/\b(va|volt amps?|volt amperes)\b/, 'VA'],
  [/\b(w|watts?)\b/, 'W'],
  [/\b(hp|horsepower)\b/, 'hp'],
  [/\b(amps?|amperes?|fla|a)\b/, 'A'],
  [/\b(ft|feet|foot)\b|'/, 'ft'],
  [/\b(m|metres?|meters?|metros|metri)\b/, 'm'],
  [/\b(mm2|mm²|sq ?mm)\b/, 'mm2'],
  [/\bawg\b/, 'awg'],
  [/%|\bpercent\b/, '%'],
];

export interface HeadingReading {
  /** Most likely first. */
  fields: ImportField[];
  exact: boolean;
  unit: string | null;
}

/** What a heading says: the fields it may name, and the unit in it. */
export function readHeading(text: string): HeadingReading {
  const raw = plainWords(text);
  const bracket = /[([]([^)\]]*)[)\]]/.exec(raw)?.[1] ?? '';
  const words = squeezed(raw.replace(/[([][^)\]]*[)\]]/g, ' '));
  const unit = unitIn(bracket) ?? unitIn(words);
  const whole = EXACT.get(squeezed(raw)) ?? EXACT.get(words);
  if (whole) return { fields: whole, exact: true, unit };
  const without = EXACT.get(
    squeezed(words.replace(/\b(kva|kw|va|watts?|w|amps?|ft|feet|m|mm2|awg|hp|a)\b/g, ' ')),
  );
  if (without) return { fields: without, exact: true, unit };
  const parts = words.split(' ');
  const found = parts.flatMap((part) => (part.length > 2 ? (EXACT.get(part) ?? []) : []));
  return { fields: [...new Set(found)], exact: false, unit };
}

const squeezed = (text: string): string =>
  text
    .replace(/[^a-z0-9φ%²#]+/g, ' ')
    .replace('#', 'no')
    .trim();
const unitIn = (text: string): string | null => UNITS.find(([pattern]) => pattern.test(text))?.[1] ?? null;
