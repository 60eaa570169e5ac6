// What `skein analyse` says in a terminal: the answer in words, then what it rests on, and last what limits it.
import type { Analysis } from '../../analysis/schema.ts';
import { fittedColumns } from '../fitted-columns.ts';
import { bold, dim, joinBlocks, printable, wrap, type TextStyle } from '../terminal.ts';
import { cautionList } from '../text.ts';
import { answerWords } from './answer.ts';
import {
  chanceWords,
  equilibriumWords,
  firstYears,
  groupWords,
  invasionWords,
  lifeWords,
  networkWords,
} from './sections.ts';
import {
  dependenceTable,
  differenceTable,
  eigenvalueTable,
  fallingTables,
  linkTable,
  numberDifferenceTable,
  patchTable,
  type TextTable,
} from './tables.ts';
import { unanswered } from './unanswered.ts';

/** Rows of the lists of the largest. */
const most = 10;

export function analysisText(analysis: Analysis, style: TextStyle): string {
  const { model, cautions, hash, tool } = analysis;
  return joinBlocks([
    model === undefined ? '' : bold(printable(model), style),
    answerWords(analysis)
      .map((line) => wrap(line, style))
      .join('\n'),
    tableOf('Patches', patchTable(analysis), style),
    tableOf('What the growth depends on most', dependenceTable(analysis, most), style),
    tableOf('Links', linkTable(analysis, most), style),
    tableOf('What makes the difference, by named number', numberDifferenceTable(analysis, most), style),
    tableOf('What makes the difference, by entry', differenceTable(analysis, most), style),
    section('The first years', firstYears(analysis), style),
    section('Lives', lifeWords(analysis), style),
    section('Chance, and what is not known', chanceWords(analysis), style),
    ...fallingTables(analysis).map((table) => tableOf(table.title, table, style)),
    section('From almost nobody', invasionWords(analysis), style),
    section('At capacity', equilibriumWords(analysis), style),
    section('The network and its edge', networkWords(analysis), style),
    section('Groups of states that cannot all reach one another', groupWords(analysis), style),
    tableOf('Eigenvalues', eigenvalueTable(analysis), style),
    section('Not answered', unanswered(analysis), style),
    cautionList(cautions, style),
    hash === undefined || tool === undefined ? '' : dim(`hash ${hash.slice(0, 16)}, skein ${tool.version}`, style),
  ]);
}

function section(title: string, lines: readonly string[], style: TextStyle): string {
  if (lines.length === 0) return '';
  return [bold(title, style), ...lines.map((line) => wrap(line, style, '  '))].join('\n');
}

function tableOf(title: string, table: TextTable | null, style: TextStyle): string {
  if (table === null) return '';
  const { head, rows, below } = table;
  const parts = [
    wrap(title, style)
      .split('\n')
      .map((line) => bold(line, style))
      .join('\n'),
    fittedColumns(head, rows, style),
    ...below.map((line) => wrap(line, style, '  ')),
  ];
  return parts.join('\n');
}
