// A value that may have several shapes: found wrong, it is judged by the one that its author meant.
import type { SourceNode } from '../text/source.ts';
import { kindsOf, shapeOfKind } from './kinds.ts';
import { trial, type Report, type Subject } from './report.ts';
import { checkWord, tellWrongType } from './scalar.ts';
import { branchesOf, knownKeys, sortOf, type Shape, type Sort } from './shape.ts';

type Check = (node: SourceNode, shape: Shape, subject: Subject, report: Report) => void;

/** `check` is the check of any shape, handed in since the two call each other. */
export function checkUnion(node: SourceNode, shape: Shape, { subject, report, check }: UnionContext): void {
  const branches = branchesOf(shape);
  const kinds = node.kind === 'map' ? kindsOf(branches) : null;
  if (node.kind === 'map' && kinds !== null) {
    const meantKind = shapeOfKind(node, kinds, subject, report);
    if (meantKind !== undefined) check(node, meantKind, subject, report);
    return;
  }
  const tried = branches.map((branch) => {
    const own = trial(report);
    check(node, branch, subject, own);
    return { branch, report: own, errors: own.found.errors };
  });
  const fitting = tried.find((one) => one.errors === 0);
  if (fitting !== undefined) {
    report.found.add(...fitting.report.found.all);
    return;
  }
  const words = branches.filter((branch) => branch.const !== undefined);
  const alike = tried.filter(({ branch }) => branch.const === undefined && sortOf(branch) === sortOfNode(node));
  if (alike.length === 0 && node.kind === 'scalar' && words.length > 0 && node.value !== null) {
    checkWord(node, words.length === branches.length ? words : branches, subject, report);
    return;
  }
  const meant = alike.toSorted((a, b) => shared(node, b.branch) - shared(node, a.branch) || a.errors - b.errors)[0];
  if (meant !== undefined) report.found.add(...meant.report.found.all);
  else if (node.kind === 'scalar' && node.value === null) report.found.add(...(tried[0]?.report.found.all ?? []));
  else tellWrongType(node, shape, subject, report);
}

export interface UnionContext {
  readonly subject: Subject;
  readonly report: Report;
  readonly check: Check;
}

function sortOfNode(node: SourceNode): Sort | undefined {
  if (node.kind === 'map' || node.kind === 'list') return node.kind;
  if (node.kind === 'hole') return undefined;
  if (typeof node.value === 'string') return 'text';
  if (typeof node.value === 'number') return 'number';
  return typeof node.value === 'boolean' ? 'truth' : undefined;
}

/** How many keys of a section the shape knows by name. */
function shared(node: SourceNode, shape: Shape): number {
  if (node.kind !== 'map') return 0;
  const known = knownKeys(shape);
  return node.entries.filter((entry) => Object.hasOwn(known, entry.key)).length;
}
