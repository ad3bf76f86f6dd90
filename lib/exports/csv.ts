import type { Bare, ItemResult, NumberPart, NumberResult, Result } from '@/lib/language/index';
import { maximumError } from './error-bound';
import { type ExportedNotebook, type ExportedResults, resultsOf } from './notebook';
import { figureParts } from './tex-size';

const HEAD = [
  'id',
  'quantity',
  'exact',
  'decimal',
  'unit',
  'cut size',
  'step',
  'maximum error',
  'version',
  'revision',
];

type Row = [
  id: string,
  quantity: string,
  exact: string,
  decimal: string,
  unit: string,
  cut: string,
  step: string,
  error: string,
];

/**
 * The marks of a notebook as a table for saws and spreadsheets: UTF-8, comma, point decimal, CRLF, a
 * field in quotes where it needs them (RFC 4180). Figures and lists have a row for each of their
 * numbers. The maximum error is that of the cut size, or of the decimal where there is none.
 */
export function writeNotebookCsv(notebook: ExportedNotebook, results: ExportedResults): string {
  const of = [String(notebook.version.number), notebook.revision?.letter ?? ''];
  const rows = notebook.cells
    .filter(({ kind }) => kind === 'dimension')
    .flatMap((cell) => resultsOf(cell, results))
    .flatMap((result) => (result.mark === null ? [] : rowsOf(result, result.mark)));
  return [HEAD, ...rows.map((row) => [...row, ...of])].map(writeRow).join('');
}

const writeRow = (fields: readonly string[]): string => `${fields.map(quoted).join(',')}\r\n`;

const quoted = (field: string): string =>
  /[",\r\n]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field;

function rowsOf(result: Result, id: string): Row[] {
  switch (result.kind) {
    case 'error':
      return [[id, `fault: ${result.error.code}`, '', '', '', '', '', '']];
    case 'truth':
    case 'function':
      return [];
    default:
      return itemRows(result, id);
  }
}

function itemRows(item: ItemResult, id: string): Row[] {
  switch (item.kind) {
    case 'number':
      return [numberRow(id, item)];
    case 'angle': {
      const { exact, decimal } = item;
      return [
        [id, 'angle', exact.text, decimal.re, 'deg', '', '', maximumError(decimal, undefined)],
      ];
    }
    case 'list':
      return item.items.flatMap((one, index) => itemRows(one, `${id}[${index + 1}]`));
    default:
      return figureParts(item).map(([name, part]) => numberRow(`${id}: ${name}`, part));
  }
}

function numberRow(id: string, part: NumberPart | Bare<NumberResult>): Row {
  const { exact, decimal, unit, cut } = part;
  const { re, im } = decimal;
  const imaginary = im === null ? '' : `${im.startsWith('-') ? '' : '+'}${im} i`;
  return [
    id,
    quantityOf(unit),
    exact.text,
    `${re}${imaginary}`,
    unit ?? '',
    cut?.value ?? '',
    cut?.step ?? '',
    maximumError(decimal, cut),
  ];
}

function quantityOf(unit: string | null): string {
  if (unit === null) return 'number';
  const power = unit.split('^')[1] ?? '1';
  return { '1': 'length', '2': 'area', '3': 'volume' }[power] ?? `length to the power ${power}`;
}
