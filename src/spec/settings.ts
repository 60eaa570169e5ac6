// A spec with the settings of one command laid over it. No stage after this knows that there were any.
import { nearestName } from '../diagnostic/nearest.ts';
import type { Spec } from './schema/spec.ts';

export interface Settings {
  readonly years?: number;
  readonly replicates?: number;
  readonly seed?: number;
  readonly draws?: number;
  readonly rare?: boolean;
  readonly precision?: number;
  readonly atMost?: number;
  readonly scenario?: string;
  /** Named parameters with their new numbers or expressions. */
  readonly set?: readonly { readonly name: string; readonly value: string }[];
}

/** The name of a setting that does not fit the spec. */
export interface UnknownSetting {
  readonly name: string;
  readonly nearest: string | undefined;
}

export type Applied =
  { readonly ok: true; readonly spec: Spec } | { readonly ok: false; readonly unknown: UnknownSetting };

/** Not applied where a name is unknown; what is wrong with values is told by compiling. */
export function applySettings(spec: Spec, settings: Settings): Applied {
  const known = spec.parameters ?? {};
  const parameters = { ...known };
  for (const { name, value } of settings.set ?? []) {
    const before = known[name];
    if (before === undefined) return { ok: false, unknown: { name, nearest: nearestName(name, Object.keys(known)) } };
    const number = Number(value);
    const expression = value.trim() !== '' && Number.isFinite(number) ? number : value;
    parameters[name] = typeof before === 'object' ? { ...before, value: expression } : expression;
  }
  const { years, replicates, seed, draws, scenario, rare, precision, atMost } = settings;
  // What the author named stays last, so that the spec reads back from its JSON with its keys in the same order.
  const { named, ...core } = spec;
  return {
    ok: true,
    spec: {
      ...core,
      ...(spec.parameters === undefined ? {} : { parameters }),
      ...(years === undefined ? {} : { years }),
      run: {
        ...spec.run,
        ...(replicates === undefined ? {} : { replicates }),
        ...(seed === undefined ? {} : { seed }),
        ...(draws === undefined ? {} : { draws }),
        ...(rare === undefined ? {} : { rare }),
        ...(precision === undefined ? {} : { precision }),
        ...(atMost === undefined ? {} : { 'at-most': atMost }),
        ...(scenario === undefined ? {} : { scenario }),
      },
      named,
    },
  };
}
