// Two sections put together: what stands in both must not contradict.
import { put, type Report } from '../shape/report.ts';
import type { SourceEntry, SourceNode } from '../text/source.ts';

/** The second is from a file, whose report is given. */
export function mergeSections(first: SourceNode | undefined, second: SourceNode, report: Report): SourceNode {
  if (first?.kind !== 'map' || second.kind !== 'map') return second;
  const merged = new Map<string, SourceEntry>(first.entries.map((entry) => [entry.key, entry]));
  for (const entry of second.entries) {
    const before = merged.get(entry.key);
    if (before === undefined) merged.set(entry.key, entry);
    else if (before.value.kind === 'map' && entry.value.kind === 'map') {
      merged.set(entry.key, { ...before, value: mergeSections(before.value, entry.value, report) });
    } else if (entry.value.kind === 'scalar') {
      const message = `\`${entry.key}\` is given here and in the spec`;
      const { span, source } = entry.value;
      put(report, { code: 'csv-repeated', message, span }, { found: source, fix: 'Leave out one of the two.' });
    }
  }
  return { kind: 'map', entries: [...merged.values()], span: first.span };
}
