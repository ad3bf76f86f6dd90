import type { Result } from '@/lib/language/index';
import {
  CAUTION,
  type ExportedCell,
  type ExportedNotebook,
  type ExportedResults,
  resultsOf,
} from './notebook';
import { listTex } from './tex-list';
import { noteTex } from './tex-note';
import { compartments, markTex, resultTex } from './tex-result';
import { escapeTex, typewriter } from './tex-text';

/**
 * A notebook as a complete LaTeX document: title block, every entry with its mark, exact value, decimal, cut size and
 * reach in words, the notes, and the caution. Needs amsmath and nothing else; any TeX engine compiles it, as it is
 * ASCII. No text of the notebook reaches TeX as a command.
 */
export function writeNotebookTex(notebook: ExportedNotebook, results: ExportedResults): string {
  return [
    '\\documentclass[a4paper]{article}',
    '\\usepackage{amsmath}',
    '\\setlength{\\parindent}{0pt}',
    '\\setlength{\\parskip}{0.5\\baselineskip}',
    '\\allowdisplaybreaks',
    '\\emergencystretch=3em',
    '\\begin{document}',
    titleBlock(notebook),
    ...notebook.cells.map((cell) => cellTex(cell, resultsOf(cell, results))),
    '\\bigskip\\hrule\\medskip',
    `{\\small\\textbf{Caution.} ${escapeTex(CAUTION)}\\par}`,
    '\\end{document}',
    '',
  ].join('\n\n');
}

/** One cell, as it stands in the document; to be copied into another that loads amsmath. */
export function cellTex(cell: ExportedCell, results: readonly Result[]): string {
  switch (cell.kind) {
    case 'note':
      return noteTex(cell.source);
    case 'section':
      return `\\section*{${escapeTex(cell.source.trim())}}`;
    case 'dimension':
      return results.map(entryTex).join('\n\n');
  }
}

function entryTex(result: Result): string {
  const mark = markTex(result);
  const head = mark === null ? '' : `\\fbox{${mark}}\\quad `;
  const lines = compartments(result).map(
    ({ name, tex }) => `{\\small\\textbf{${name}:} ${tex}\\par}`,
  );
  return [
    `\\medskip\\noindent ${head}${typewriter(result.source.trim())}\\par`,
    resultTex(result),
    ...(result.kind === 'list' ? [listTex(result)] : []),
    ...lines,
  ].join('\n');
}

const ROUNDING_WORDS: Readonly<Record<ExportedNotebook['settings']['rounding'], string>> = {
  'half-even': 'to the nearest step, ties to the even one',
  'half-up': 'to the nearest step, ties up',
  up: 'up to a step',
  down: 'down to a step',
};

function titleBlock(notebook: ExportedNotebook): string {
  const { settings } = notebook;
  const fields: [string, string][] = [
    ...identityFields(notebook),
    ['Unit', settings.unit],
    [
      'Cutting step',
      settings.step === null ? 'none' : `${settings.step}, ${ROUNDING_WORDS[settings.rounding]}`,
    ],
  ];
  const rows = fields.map(([name, value]) => `\\textbf{${name}:} ${escapeTex(value)}\\par`);
  return [
    '\\hrule\\medskip',
    `{\\Large\\bfseries ${escapeTex(notebook.title)}\\par}`,
    '\\medskip',
    ...rows,
    '\\medskip\\hrule\\bigskip',
  ].join('\n');
}

/** Which sheet it is: an issued revision by its title block, a version by who saved it. */
function identityFields(notebook: ExportedNotebook): [string, string][] {
  const { version, revision, titleBlock: block } = notebook;
  if (revision === undefined || block === undefined) {
    return [
      ['Workshop', notebook.workshop],
      ['Notebook', notebook.id],
      ['Version', String(version.number)],
      ['Saved', momentOf(version.savedAt)],
      ['Author', version.author],
    ];
  }
  const superseded =
    revision.supersededBy === null ? '' : `, superseded by ${revision.supersededBy}`;
  const fields: [string, string | null][] = [
    ['Legal owner', block.legalOwner],
    ['Identification number', block.identificationNumber],
    ['Supplementary title', block.supplementaryTitle],
    ['Revision', `${revision.letter}${superseded}`],
    ['Purpose', revision.purpose],
    ['Date of issue', momentOf(revision.issuedAt)],
    ['Note', revision.note],
    ['Created by', block.creator],
    ['Checked by', revision.checkedBy],
    ['Approved by', block.approvalPerson],
    ['Sheet', block.sheet],
    ['Tolerance class (ISO 2768-1)', block.toleranceClass],
    ['Version', String(version.number)],
    ['Check code', revision.checkCode],
  ];
  return fields.flatMap(([name, value]): [string, string][] => (value ? [[name, value]] : []));
}

const momentOf = (at: string): string => `${at.slice(0, 16).replace('T', ' ')} UTC`;
