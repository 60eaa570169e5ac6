// What is wrong with expressions, each told once, however many patches and years meet it.
import { nearestName } from '../diagnostic/nearest.ts';
import type { SpecPath } from '../spec/document.ts';
import type { Fault } from '../spec/expression/evaluate.ts';
import type { Finding } from '../spec/finding.ts';
import type { Measured } from '../spec/quantity.ts';

/** What may be read where a name was not found. */
export interface KnownNames {
  readonly attributes: ReadonlySet<string>;
  readonly parameters: readonly string[];
  readonly drivers: readonly string[];
}

export class NumberMistakes {
  readonly #findings: Finding[];
  readonly #told = new Set<string>();

  constructor(findings: Finding[]) {
    this.#findings = findings;
  }

  tellUnreadable(error: Extract<Measured, { readonly ok: false }>['error'], path: SpecPath): void {
    const { message, ...details } = error;
    const { code, span, ...told } = details;
    this.#findings.push({ severity: 'error', code, message, path, span, details: told });
  }

  /** A number that is read once changes with the year by way of this name. */
  tellDated(name: string, path: SpecPath): void {
    if (!this.#isNew(JSON.stringify(path))) return;
    this.#findings.push({
      severity: 'error',
      code: 'fixed-in-time',
      message: `This number is the same in all years, and \`${name}\` changes with the year`,
      path,
      details: { expected: 'a number or an expression that does not depend on the year' },
    });
  }

  tellCycle(name: string, path: SpecPath, names: readonly string[]): void {
    if (!this.#isNew(JSON.stringify(path))) return;
    this.#findings.push({
      severity: 'error',
      code: 'parameter-cycle',
      message: `The ${path[0] === 'parameters' ? 'parameter' : 'attribute'} \`${name}\` is made from itself`,
      path,
      details: { found: names.join(', '), fix: 'Give one of them a number of its own.' },
    });
  }

  /** `patch` is that of the place, if it belongs to one. */
  tellFault(fault: Fault, path: SpecPath, { patch, known }: { patch: string | undefined; known: KnownNames }): void {
    const { code, message, span } = fault;
    if (!this.#isNew(JSON.stringify([path, code, span]))) return;
    const told =
      code === 'unknown-name'
        ? unknownName(fault.name ?? '', patch, known)
        : { message: message + (patch === undefined ? '' : ` in ${patch}`) };
    this.#findings.push({ severity: 'error', code, ...told, path, span });
  }

  #isNew(key: string): boolean {
    const isNew = !this.#told.has(key);
    this.#told.add(key);
    return isNew;
  }
}

function unknownName(name: string, patch: string | undefined, known: KnownNames): Pick<Finding, 'message' | 'details'> {
  if (known.attributes.has(name)) {
    if (patch === undefined) {
      return {
        message: `\`${name}\` belongs to a patch and cannot be read here`,
        details: { found: name, expected: 'a number, a parameter or `year`' },
      };
    }
    return {
      message: `The patch \`${patch}\` has no \`${name}\``,
      details: { fix: `Give every patch its \`${name}\`.` },
    };
  }
  return {
    message: `There is no \`${name}\` here`,
    details: {
      found: name,
      expected: 'the name of a parameter, of an attribute of the patches, or `year`',
      nearest: nearestName(name, [...known.parameters, ...known.attributes, ...known.drivers, 'year']),
      fix: `Add it under \`parameters\`, or correct the name.`,
    },
  };
}
