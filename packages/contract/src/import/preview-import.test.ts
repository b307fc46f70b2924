import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { workshop } from '../../test/workshop.ts';
import { applyEdit, invertEdit } from '../edit/index.ts';
import { jobFromRows } from '../job/index.ts';
import type { JobRows } from '../rows/index.ts';
import { scheduleView } from '../schedule/index.ts';
import type { Cells } from './cells.ts';
import { panelTitle } from './panel-title.ts';
import { previewImport } from './preview-import.ts';
import { recogniseColumns } from './recognise-columns.ts';

const NEW = {
  newPanel: {
    code: 'RP-1',
    feed: null,
    panel: { spaces: 42, lines: ['L1' as const, 'L2' as const, 'L3' as const] },
  },
};
const sheet = (text: string): Cells =>
  text
    .trim()
    .split('\n')
    .map((line) => line.split('|').map((cell) => cell.trim()));
const preview = (
  text: string,
  rows: JobRows = workshop(),
  target: Parameters<typeof previewImport>[3] = NEW,
) => {
  const cells = sheet(text);
  return previewImport(rows, cells, recogniseColumns(cells), target, 'schedule.csv');
};
const fields = (text: string) => recogniseColumns(sheet(text)).columns.map((column) => column.field);
const written = (text: string) => {
  const rows = workshop();
  const { edit, problems } = preview(text, rows);
  if (!edit) throw new Error(JSON.stringify(problems));
  const outcome = applyEdit(rows, edit);
  if (!outcome.ok) throw new Error(JSON.stringify(outcome));
  return scheduleView(outcome.rows).panels.find((panel) => panel.code === 'RP-1')!.circuits;
};

describe('columns', () => {
  test('are recognised by their headings, wherever these stand', () => {
    const cells = sheet(`
      Panel RP-1 |||||
      208Y/120 V, 225 A main |||||
      |||||
      Ckt No. | Load Description | Breaker | Wire Size | Length (m) | Load (VA) | PF
      1 | Receptacles | 20/1 | #12 | 30 | 1080 | 0.9
    `);
    const mapping = recogniseColumns(cells);
    expect(mapping.headingRow).toBe(3);
    expect(mapping.columns.map((column) => column.field)).toEqual([
      'space',
      'description',
      'breaker',
      'size',
      'length',
      'load',
      'powerFactor',
    ]);
    expect(mapping.columns[4]?.unit).toBe('m');
    expect(mapping.columns[5]?.unit).toBe('VA');
  });

  test.each([
    [
      'Stromkreis | Bezeichnung | Sicherung | Querschnitt | Länge | Leistung (W) | Raum',
      '1 | Licht Flur | B16 | 1,5 mm² | 12 m | 300 | 1.02',
    ],
    [
      'Circuit | Désignation | Disjoncteur | Section | Longueur | Puissance (W) | Local',
      '1 | Éclairage couloir | C16 | 1,5 mm² | 12 m | 300 | Hall',
    ],
    [
      'Circuito | Descripción | Interruptor | Sección | Longitud | Potencia (W) | Ubicación',
      '1 | Alumbrado | C16 | 1,5 mm² | 12 m | 300 | Sala',
    ],
    [
      'Circuito | Descrizione | Interruttore | Sezione | Lunghezza | Potenza (W) | Locale',
      '1 | Illuminazione | C16 | 1,5 mm² | 12 m | 300 | Sala',
    ],
  ])('are recognised in other languages: %s', (headings, row) => {
    expect(fields(`${headings}\n${row}`)).toEqual([
      'space',
      'description',
      'breaker',
      'size',
      'length',
      'load',
      'room',
    ]);
  });

  test('are judged by their cells where a heading names more than one thing', () => {
    expect(fields('Ckt | Load | Breaker\n1 | Lights | 20')).toEqual(['space', 'description', 'breaker']);
    expect(fields('Ckt | Description | Load | Breaker\n1 | Lights | 900 | 20')).toEqual([
      'space',
      'description',
      'load',
      'breaker',
    ]);
  });

  test('take the unit of the heading above them', () => {
    const { columns } = recogniseColumns(
      sheet(
        'Ckt | Description | Load (kVA) || | Trip\n| | A | B | C |\n1 | Lights | 0.9 | | | 20\n3 | Sockets | | 1.2 | | 20',
      ),
    );
    expect(columns.map((column) => column.field)).toEqual([
      'space',
      'description',
      'vaL1',
      'vaL2',
      'vaL3',
      'breaker',
    ]);
    expect(columns[3]?.unit).toBe('kVA');
  });

  test('are found without headings by what their cells hold', () => {
    expect(
      fields('1 | Corridor lighting | 20/1 | #12 | 84 ft\n3 | Reception sockets | 20/1 | #12 | 47 ft'),
    ).toEqual(['space', 'description', 'breaker', 'size', 'length']);
  });
});

describe('the lines above the headings', () => {
  test.each([
    ['Panel LP-5', '208Y/120 V, 225 A main, surface', 'LP-5', '225'],
    ['PANELBOARD: HP2', 'Mains: 400 A', 'HP2', '400'],
    ['Panel schedule "RP-1A"', '100A MLO', 'RP-1A', '100'],
    ['Verteiler UV-3', '', 'UV-3', null],
    ['Second floor', 'see plans', null, null],
  ])('“%s / %s” name the panel and its main', (first, second, code, mainAmps) => {
    const cells = [[first], [second], ['Ckt', 'Description', 'Breaker'], ['1', 'Lights', '20']];
    expect(panelTitle(cells, recogniseColumns(cells))).toEqual({ code, mainAmps });
  });
});

describe('circuits', () => {
  test('are written with everything that the sheet says', () => {
    const [one] = written(`
      Ckt | Description | Room | Type | Breaker | Wire | Conduit | Length (ft) | Load (VA) | PF | Cont. | Notes
      5 | Corridor lighting | 101 | L | 20 | 2#12, 1#12 G | 3/4 EMT | 84 | 900 | 0.95 | yes | existing fixtures
    `);
    expect(one?.code).toBe('RP-1-5');
    const texts = Object.fromEntries(Object.entries(one!.fields).map(([field, view]) => [field, view.text]));
    expect(texts).toMatchObject({
      description: 'Corridor lighting',
      room: '101',
      loadType: 'L',
      breaker: '20',
      size: '12 AWG',
      ground: '12 AWG',
      raceway: '3/4 EMT',
      length: '84 ft',
      load: '900 VA',
      powerFactor: '0.95',
      continuous: 'yes',
      class: 'lighting',
      notes: 'existing fixtures',
    });
    expect(one?.lines).toEqual(['L3']);
    expect(one?.form).toBe('spread');
  });

  test.each([
    ['1,3,5', '30/3', '1,3,5'],
    ['1/3', '20/2', '1,3'],
    ['2-4', '20/2', '2,4'],
    ['7', '20/2', '7,9'],
    ['9a', '20', '9a'],
    ['RP-1-11', '20', '11'],
  ])('spaces “%s” with breaker %s are %s', (space, breaker, expected) => {
    const [one] = written(`Ckt | Description | Breaker\n${space} | Heater | ${breaker}`);
    expect(one?.fields.spaces.text).toBe(expected);
  });

  test('a two-pole breaker may be repeated on the row of its second pole', () => {
    const circuits = written(`
      Ckt | Description | Breaker | Poles | VA A | VA B | VA C
      1 | Water heater | 30 | 2 | 2250 | |
      3 | | | | | 2250 |
      5 | Range | 40 | 2 | | | 4000
      7 | Range | 40 | 2 | 4000 | |
      9 | Lighting | 20 | 1 | | 800 |
    `);
    expect(circuits.map((circuit) => [circuit.fields.spaces.text, circuit.fields.load.text])).toEqual([
      ['1,3', '4500 VA'],
      ['5,7', '8000 VA'],
      ['9', '800 VA'],
    ]);
    expect(circuits[0]?.loads[0]?.terminals).toBe('L1-L2');
  });

  test('both sides of a panel are read from one row', () => {
    const circuits = written(`
      Ckt | Description | Breaker | Breaker | Description | Ckt
      1 | Lighting | 20/1 | 20/1 | Receptacles | 2
      3 | Heater | 30/2 | 20/1 | Sign | 4
      5 | | | 20/1 | Spare | 6
    `);
    expect(
      circuits.map((circuit) => [
        circuit.fields.spaces.text,
        circuit.fields.description.text,
        circuit.circuit.kind,
      ]),
    ).toEqual([
      ['1', 'Lighting', 'branch'],
      ['2', 'Receptacles', 'branch'],
      ['3,5', 'Heater', 'branch'],
      ['4', 'Sign', 'branch'],
      ['6', 'Spare', 'spare'],
    ]);
  });

  test('receptacles are judged at 80 % of their breaker, and count upstream what the sheet states', () => {
    const [one] = written('Ckt | Description | Breaker | Load (VA)\n1 | Office receptacles | 20 | 1080');
    expect(one?.loads[0]).toMatchObject({
      size: '16 A',
      sizeAssumed: true,
      demandVa: '1080',
      class: 'receptacle',
    });
  });

  test('a sheet without space numbers fills the open spaces in turn', () => {
    const circuits = written('Description | Breaker | Length\nLighting | 20 | 30 ft\nHeater | 30/2 | 40 ft');
    expect(circuits.map((circuit) => circuit.fields.spaces.text)).toEqual(['1', '2,4']);
  });

  test('rows of totals and repeated headings are passed over with a remark', () => {
    const { problems, circuits } = preview(`
      Ckt | Description | Load (VA)
      1 | Lighting | 900
      Ckt | Description | Load (VA)
      3 | Heater | 1500
      | Total connected load | 2400
    `);
    expect(circuits).toHaveLength(2);
    expect(problems.map(({ row, severity }) => [row, severity])).toEqual([
      [3, 'remark'],
      [5, 'remark'],
    ]);
  });

  test('an import is one edit, undone by its inverse', () => {
    const rows = workshop();
    const { edit } = preview('Ckt | Description | Breaker\n1 | Lighting | 20\n3 | Heater | 20', rows);
    expect(edit?.label).toBe('Import of schedule.csv');
    const after = applyEdit(rows, edit!);
    if (!after.ok) throw new Error(JSON.stringify(after));
    const back = applyEdit(after.rows, invertEdit(edit!, 'undo'));
    if (!back.ok) throw new Error(JSON.stringify(back));
    expect(jobFromRows(back.rows).job).toEqual(jobFromRows(rows).job);
  });

  test('into a panel that exists, spares give way and circuits do not', () => {
    const rows = workshop();
    const panelId = scheduleView(rows).panels.find((panel) => panel.code === 'LP-1')!.id;
    const { edit, problems } = preview('Ckt | Description | Breaker\n41 | Heater | 20', rows, { panelId });
    expect(problems.map(({ severity, message }) => [severity, message])).toEqual([
      ['remark', 'Takes the place of the spare in space 41.'],
    ]);
    expect(edit && applyEdit(rows, edit).ok).toBe(true);
    const clash = preview('Ckt | Description | Breaker\n1 | Heater | 20', rows, { panelId });
    expect(clash.edit).toBeNull();
    expect(clash.problems[0]).toMatchObject({
      row: 2,
      column: 1,
      severity: 'error',
      message: 'Space 1 holds “Bench receptacles” already.',
    });
  });
});

describe('problems', () => {
  const BASE = 'Ckt | Description | Breaker | Wire | Length (ft) | Load (VA)';
  test.each([
    ['7 | Lights | 20 | #12 | far | 900', 5, /must be a length/],
    ['7 | Lights | big | #12 | 40 | 900', 3, /not a breaker/],
    ['7 | Lights | 20 | 13 AWG | 40 | 900', 4, /size in the tables/],
    ['7 | Lights | 20 | #12 | 40 | lots', 6, /must be a load/],
    ['seven | Lights | 20 | #12 | 40 | 900', 1, /not a space/],
    ['77 | Lights | 20 | #12 | 40 | 900', 1, /beyond the 42 spaces/],
    ['1,2 | Heater | 20/2 | #12 | 40 | 900', 1, /neighbours/],
    ['| Lights | 20 | #12 | 40 | 900', 1, /space is missing/],
    ['7 | Lights | 20 | #12 | =B2*2 | 900', 5, /formula/],
  ])('%s is refused at column %i', (row, column, message) => {
    const { edit, problems } = preview(`${BASE}\n3 | Good | 20 | #12 | 40 | 900\n${row}`);
    expect(edit).toBeNull();
    const errors = problems.filter((problem) => problem.severity === 'error');
    expect(errors).toHaveLength(1);
    expect(errors[0]).toMatchObject({ row: 3, message: expect.stringMatching(message) });
    expect(errors[0]!.column === column || (column === 1 && errors[0]!.column === 0)).toBe(true);
  });

  test('every problem is reported, and leaving the rows out lets the rest in', () => {
    const text = `${BASE}\n3 | Good | 20 | #12 | 40 | 900\n5 | Lights | 20 | #12 | far | lots\n3 | Twice | 20 | #12 | 40 | 900`;
    const { problems } = preview(text);
    expect(problems.map(({ row, column }) => [row, column])).toEqual([
      [3, 5],
      [3, 6],
      [4, 1],
    ]);
    const cells = sheet(text);
    const rest = previewImport(workshop(), cells, recogniseColumns(cells), NEW, 'x', { skipRows: [3, 4] });
    expect(rest.circuits).toHaveLength(1);
    expect(rest.edit).not.toBeNull();
  });

  test('mixed units are pointed out cell by cell, and each is kept in its own', () => {
    const { problems, circuits } = preview(
      `${BASE}\n1 | A1 | 20 | #12 | 40 | 900\n3 | A2 | 20 | #12 | 12 m | 900\n5 | A3 | 20 | #12 | 50 ft | 900`,
    );
    expect(problems.map(({ row, column, severity }) => [row, column, severity])).toEqual([[3, 5, 'warning']]);
    expect(circuits.map((circuit) => circuit.length)).toEqual(['40 ft', '12 m', '50 ft']);
  });

  test('a load without a unit is taken by its size, with a warning', () => {
    const { problems } = preview('Ckt | Description | Load\n1 | Lights | 900');
    expect(problems).toMatchObject([
      { row: 1, column: 3, severity: 'warning', message: expect.stringMatching(/taken as VA/) },
    ]);
  });

  test('too many columns or rows are refused as a whole', () => {
    const wide = [Array.from({ length: 200 }, (_, i) => `H${i}`), Array.from({ length: 200 }, () => '1')];
    expect(previewImport(workshop(), wide, recogniseColumns(wide), NEW, 'x').problems).toMatchObject([
      { row: 0, column: 0, severity: 'error', message: 'The sheet has 200 columns; at most 60 are read.' },
    ]);
    const tall = Array.from({ length: 5001 }, (_, i) => [String(i), 'Lights']);
    expect(previewImport(workshop(), tall, recogniseColumns(tall), NEW, 'x').edit).toBeNull();
    expect(previewImport(workshop(), [['']], recogniseColumns([['']]), NEW, 'x').edit).toBeNull();
  });

  test('the whole sheet of errors writes nothing', () => {
    const rows = workshop();
    const before = jobFromRows(rows).job;
    preview(`${BASE}\n7 | Lights | 20 | #12 | far | 900`, rows);
    expect(jobFromRows(rows).job).toEqual(before);
  });

  test('whatever a sheet holds, it is reported or written, and what is written can be applied', () => {
    const cell = fc.oneof(
      fc.constantFrom(
        '',
        '1',
        '3',
        '1,3',
        '7a',
        '20',
        '20/2',
        '#12',
        'Lights',
        'Spare',
        '900',
        '40 ft',
        '=A1',
        '-',
        'Total',
      ),
      fc.string({ maxLength: 12 }),
      fc.string({ maxLength: 5, unit: 'binary' }),
    );
    const headings = [
      'Ckt',
      'Description',
      'Breaker',
      'Poles',
      'Wire',
      'Length (ft)',
      'Load (VA)',
      'VA A',
      'PF',
      'Demand',
    ];
    const rows = workshop();
    fc.assert(
      fc.property(
        fc.boolean(),
        fc.array(fc.array(cell, { maxLength: 12 }), { maxLength: 12 }),
        (headed, body) => {
          const cells = headed ? [headings, ...body] : body;
          const { edit, problems } = previewImport(rows, cells, recogniseColumns(cells), NEW, 'random');
          const errors = problems.filter((problem) => problem.severity === 'error');
          expect(edit === null).toBe(errors.length > 0);
          if (edit) expect(applyEdit(rows, edit).ok).toBe(true);
        },
      ),
      { numRuns: 200 },
    );
  });
});
