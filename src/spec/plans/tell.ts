// How actions tell what is wrong with them.
import { nearestName } from '../../diagnostic/nearest.ts';
import type { DiagnosticCode } from '../../diagnostic/codes.ts';
import type { SpecPath } from '../document.ts';
import type { Finding } from '../finding.ts';

interface Found {
  readonly findings: Finding[];
}

/** The same mistake of the same place is told once, however many patches and dispersals meet it. */
export function tellMistake(
  { findings }: Found,
  code: DiagnosticCode,
  path: SpecPath,
  told: Omit<Finding, 'severity' | 'code' | 'path'>,
): void {
  const place = path.join('\0');
  if (findings.some((one) => one.code === code && one.path.join('\0') === place)) return;
  findings.push({ severity: 'error', code, path, ...told });
}

interface Unknown {
  readonly code: DiagnosticCode;
  readonly what: string;
  readonly name: string;
  readonly known: readonly string[];
  readonly part: 'key' | 'value';
}

export function tellUnknown(found: Found, path: SpecPath, { code, what, name, known, part }: Unknown): void {
  const listed = known.slice(0, 12).map((one) => `\`${one}\``);
  const more = known.length > 12 ? ` and ${String(known.length - 12)} more` : '';
  tellMistake(found, code, path, {
    message: `There is no ${what} \`${name}\``,
    part,
    details: {
      found: name,
      expected: known.length > 0 ? `one of ${listed.join(', ')}${more}` : 'none',
      nearest: nearestName(name, known),
    },
  });
}
