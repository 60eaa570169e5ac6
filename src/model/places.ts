// Whether every patch has a place of its own, where a distance is needed.
import { fail, type Context } from './context.ts';

export function requirePlaces(context: Context, phase: string): boolean {
  const without = context.patches.find((patch) => patch.at === null);
  if (without !== undefined) {
    fail(context, 'missing-place', ['patches', without.fileOrder], {
      message: `\`${without.name}\` has no place, and \`${phase}\` needs distances`,
      details: { expected: 'such as `at: [3.2, 9.1]`' },
    });
    return false;
  }
  const seen = new Map<string, string>();
  let apart = true;
  for (const { name, at, fileOrder } of context.patches) {
    const key = String(at);
    const other = seen.get(key);
    if (other !== undefined && at !== null) {
      apart = false;
      fail(context, 'same-place', ['patches', fileOrder, 'at'], {
        message: `\`${name}\` lies where \`${other}\` lies`,
        details: { found: `[${at.join(', ')}]`, expected: 'a place of its own for every patch' },
      });
    }
    seen.set(key, name);
  }
  return apart;
}
