// Whether every patch has a place of its own, where a distance is needed.
import { fail, type Context } from './context.ts';

/** Patches that touch have no distance between their edges; two middles at one place are a slip. */
export function requirePlaces(context: Context, phase: string, between = 'centroids'): boolean {
  const without = context.patches.find((patch) => patch.at === null);
  if (without !== undefined) {
    fail(context, 'missing-place', ['patches', without.fileOrder], {
      message: `\`${without.name}\` has no place, and \`${phase}\` needs distances`,
      details: { expected: 'such as `at: [3.2, 9.1]`, or an `outline`' },
    });
    return false;
  }
  if (between === 'nearest edges') return true;
  const seen = new Map<string, string>();
  let apart = true;
  for (const { name, at, degrees, fileOrder } of context.patches) {
    const key = String(degrees ?? at);
    const other = seen.get(key);
    if (other !== undefined && at !== null) {
      apart = false;
      fail(context, 'same-place', ['patches', fileOrder, 'at'], {
        message: `\`${name}\` lies where \`${other}\` lies`,
        details: { found: `[${(degrees ?? at).join(', ')}]`, expected: 'a place of its own for every patch' },
      });
    }
    seen.set(key, name);
  }
  return apart;
}
