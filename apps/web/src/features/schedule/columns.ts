import type { Row } from '@farlug/contract/rows';
import type { CircuitField, CircuitView } from '@farlug/contract/schedule';

export interface GridColumn {
  key: string;
  label: string;
  /** The field that is typed into; null for what is computed. */
  field: CircuitField | null;
  /** Tailwind width of the column. */
  width: string;
  numeric?: boolean;
  /** Shows its field alone; what belongs to it has columns of its own. */
  plain?: boolean;
}

const typed = (
  field: CircuitField,
  label: string,
  width: string,
  more: Partial<GridColumn> = {},
): GridColumn => ({
  key: field,
  label,
  field,
  width,
  ...more,
});
const computed = (key: string, label: string, width: string): GridColumn => ({
  key,
  label,
  field: null,
  width,
  numeric: true,
});

/** What decides, beside its verdict. */
export const RESULT_COLUMNS: readonly GridColumn[] = [
  typed('spaces', 'Space', 'w-16'),
  { key: 'line', label: 'Line', field: null, width: 'w-12' },
  typed('description', 'Serves', 'min-w-48'),
  typed('breaker', 'Breaker', 'w-16'),
  typed('size', 'Wire', 'w-28'),
  typed('length', 'Length', 'w-20', { numeric: true }),
  typed('load', 'Load', 'w-24', { numeric: true }),
  computed('amps', 'Amps', 'w-14'),
  computed('feeder', 'Feeder %', 'w-15'),
  computed('branch', 'Branch %', 'w-15'),
  computed('total', 'Total %', 'w-15'),
  { key: 'bar', label: 'Drop', field: null, width: 'w-24' },
  { key: 'verdict', label: 'Verdict', field: null, width: 'w-24' },
];

/** Every field of a row. */
export const FIELD_COLUMNS: readonly GridColumn[] = [
  typed('spaces', 'Space', 'w-16'),
  { key: 'line', label: 'Line', field: null, width: 'w-12' },
  typed('description', 'Serves', 'min-w-64', { plain: true }),
  typed('room', 'Room', 'w-20'),
  typed('loadType', 'Load type', 'w-24'),
  typed('breaker', 'Breaker', 'w-16'),
  typed('sets', 'Sets', 'w-12', { numeric: true }),
  typed('size', 'Size', 'w-24'),
  typed('material', 'Material', 'w-20'),
  typed('neutral', 'Neutral', 'w-20'),
  typed('ground', 'Ground', 'w-20'),
  typed('raceway', 'Raceway', 'w-20'),
  typed('length', 'Length', 'w-20', { numeric: true }),
  typed('load', 'Load', 'w-24', { numeric: true }),
  typed('powerFactor', 'PF', 'w-14', { numeric: true }),
  typed('demand', 'Demand', 'w-16', { numeric: true }),
  typed('continuous', 'Continuous', 'w-20'),
  typed('class', 'Class', 'w-24'),
  typed('starting', 'Starting', 'w-28'),
  typed('notes', 'Notes', 'min-w-40'),
  { key: 'verdict', label: 'Verdict', field: null, width: 'w-24' },
];

const MATERIAL_SHORT: Record<string, string> = { copper: 'Cu', aluminum: 'Al' };

/** `2 × 3/0 Cu`: the same of a run. */
export function runText(run: Row<'run'>): string {
  if (run.size === null) return run.ohmsR === null ? 'no size yet' : 'impedance stated';
  const plain = run.size.replace(/ AWG$/, '').replace(/mm2$/, 'mm²');
  return `${run.sets > 1 ? `${run.sets} × ` : ''}${plain} ${MATERIAL_SHORT[run.material] ?? ''}`.trim();
}

/** `2 × 3/0 Cu`: how a wire is written in a narrow column. */
export function wireText(circuit: CircuitView): string {
  const { size, sets, material } = circuit.fields;
  if (size.draft || size.text === '') return size.text;
  const plain = size.text.replace(/ AWG$/, '').replace(/mm2$/, 'mm²');
  const many = Number(sets.text) > 1 && !/set/.test(plain) ? `${sets.text} × ` : '';
  return `${many}${plain} ${MATERIAL_SHORT[material.text] ?? ''}`.trim();
}

/** `7`, `2, 4`, `19–23`, `7a`: the spaces of a row in a narrow column. */
export function spacesText({ spaces, breakers }: CircuitView): string {
  const [first = 0, second = 0] = spaces;
  const even = spaces.every((space, i) => space === first + i * (second - first));
  const text = spaces.length > 2 && even ? `${first}–${spaces.at(-1)}` : spaces.join(', ');
  return `${text}${breakers[0]?.half ?? ''}`;
}

/** `20/1P`; breakers that differ stand beside each other. */
export function breakerText({ breakers, fields }: CircuitView): string {
  if (fields.breaker.draft || breakers.some(({ amps }) => amps === null)) return fields.breaker.text;
  return [...new Set(breakers.map(({ amps, poles }) => `${Number(amps)}/${poles}P`))].join(' + ');
}

export const lineText = (circuit: CircuitView): string => {
  const digits = circuit.lines.map((line) => line.replace('L', ''));
  if (digits.length === 0) return '';
  return digits.length === 3 ? '3-ph' : `L${digits.join('-')}`;
};
