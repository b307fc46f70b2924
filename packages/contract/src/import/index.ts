export { CELL_MAX, type Cells, COLUMNS_MAX, columnLetters, type ImportProblem, ROWS_MAX } from './cells.ts';
export { IMPORT_FIELDS, type ImportField } from './headings.ts';
export { IMPORT_OPTIONS, type ImportOptions } from './import-defaults.ts';
export * from './panel-title.ts';
export * from './preview-import.ts';
export * from './recognise-columns.ts';
