// What two manifests differ in, in words, the plainest first.
import type { Manifest } from '../../sweep/manifest.ts';

export function differenceOf(before: string, now: Manifest): string {
  const read = parsed(before);
  if (read === null || read['format'] !== now.format) return 'its manifest cannot be read';
  const kernel = (tool: unknown): unknown => (isRecord(tool) ? tool['kernel'] : undefined);
  const version = (tool: unknown): unknown => (isRecord(tool) ? tool['version'] : undefined);
  if (kernel(read['tool']) !== now.tool.kernel || version(read['tool']) !== now.tool.version) {
    return `it was made by skein ${String(version(read['tool']))} with kernel ${String(kernel(read['tool']))}`;
  }
  const differs = (key: keyof Manifest): boolean => JSON.stringify(read[key]) !== JSON.stringify(now[key]);
  const runsBefore = isRecord(read['runs']) ? read['runs'] : {};
  if (now.runs !== null && runsBefore['seed'] !== undefined && runsBefore['seed'] !== now.runs.seed) {
    return `its seed is ${String(runsBefore['seed'])}`;
  }
  const other = [
    differs('runs') ? 'other replicates or years' : null,
    differs('measures') ? 'other measures' : null,
    differs('design') ? 'another design' : null,
  ].filter((what) => what !== null);
  if (other.length > 0) return `it has ${other.join(', ')}`;
  if (differs('spec')) return 'it is of another model';
  return 'it is of another shape';
}

function parsed(text: string): Readonly<Record<string, unknown>> | null {
  try {
    const value: unknown = JSON.parse(text);
    return isRecord(value) ? value : null;
  } catch {
    return null;
  }
}

function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
