import { refuseColumns, refuseRows } from './sheet-limits.mjs';

const SHEET = /<(?:\w+:)?sheet\s([^>]*?)\/?>/g;
const RELATION = /<(?:\w+:)?Relationship\s([^>]*?)\/?>/g;
const FORMULA_CELL = /<(?:\w+:)?c\s([^<>]*)>\s*<(?:\w+:)?f(?:\s[^<>]*)?(?:\/>|>([^<]*)<)/g;

/**
 * Puts `=…` where a cell was calculated: a workbook stores the result that some program found last, and a result
 * whose inputs are not in the schedule is for a person to judge, not to be taken as typed.
 * @param {{ name: string, cells: string[][] }[]} sheets
 * @param {Map<string, string>} parts texts of the workbook's parts by their path
 */
export function overlayFormulas(sheets, parts) {
  const paths = sheetPaths(parts);
  for (const sheet of sheets) {
    const xml = parts.get(paths.get(sheet.name) ?? '');
    if (xml === undefined) continue;
    for (const [, attributes = '', formula = ''] of xml.matchAll(FORMULA_CELL)) {
      const place = placeOf(attribute(attributes, 'r'));
      if (place === null) continue;
      refuseRows(place.row, sheet.name);
      refuseColumns(place.column + 1, sheet.name, place.row + 1);
      while (sheet.cells.length <= place.row) sheet.cells.push([]);
      const row = /** @type {string[]} */ (sheet.cells[place.row]);
      while (row.length <= place.column) row.push('');
      row[place.column] = `=${unescapeXml(formula).replace(/^=/, '') || '…'}`;
    }
  }
}

/** @param {Map<string, string>} parts */
function sheetPaths(parts) {
  /** @type {Map<string, string>} */
  const targets = new Map();
  for (const [, attributes = ''] of (parts.get('xl/_rels/workbook.xml.rels') ?? '').matchAll(RELATION))
    targets.set(attribute(attributes, 'Id'), attribute(attributes, 'Target').replace(/^\/?(xl\/)?/, 'xl/'));
  /** @type {Map<string, string>} */
  const paths = new Map();
  for (const [, attributes = ''] of (parts.get('xl/workbook.xml') ?? '').matchAll(SHEET))
    paths.set(
      unescapeXml(attribute(attributes, 'name')),
      targets.get(attribute(attributes, '\\w+:id')) ?? '',
    );
  return paths;
}

/**
 * @param {string} attributes
 * @param {string} name
 */
function attribute(attributes, name) {
  const found = new RegExp(`(?:^|\\s)${name}\\s*=\\s*(?:"([^"]*)"|'([^']*)')`).exec(attributes);
  return found?.[1] ?? found?.[2] ?? '';
}

/** @param {string} reference as `AB12` */
function placeOf(reference) {
  const found = /^([A-Z]{1,3})([1-9]\d{0,6})$/.exec(reference);
  if (!found) return null;
  let column = 0;
  for (const letter of /** @type {string} */ (found[1])) column = column * 26 + letter.charCodeAt(0) - 64;
  return { row: Number(found[2]) - 1, column: column - 1 };
}

/** @type {Record<string, string>} */
const ENTITIES = { lt: '<', gt: '>', quot: '"', apos: "'", amp: '&' };

/** @param {string} text */
function unescapeXml(text) {
  return text.replace(/&(#x?[0-9a-f]{1,6}|\w{2,4});/gi, (whole, name) => {
    if (!name.startsWith('#')) return ENTITIES[name] ?? whole;
    const code = name[1] === 'x' ? Number.parseInt(name.slice(2), 16) : Number(name.slice(1));
    return code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });
}
