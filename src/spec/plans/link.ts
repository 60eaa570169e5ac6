// A corridor, a crossing or a barrier: what becomes of the way between two patches in one dispersal, or in every one.
import type { SpecPath } from '../document.ts';
import type { DispersalSpec } from '../schema/spec.ts';
import type { Draft, NamedAction } from './draft.ts';
import { addEffect } from './targets.ts';
import { tellMistake, tellUnknown } from './tell.ts';
import { whenOf } from './when.ts';

type Link = NonNullable<DispersalSpec['links']>[number];

export function layLink(draft: Draft, { name, spec }: NamedAction<'link'>): void {
  const path = ['actions', name];
  const dispersals = dispersalsFor(draft, spec.dispersal, path);
  const patches = new Set(draft.spec.patches.map((patch) => patch.name));
  const unknown = spec.between.findIndex((patch) => !patches.has(patch));
  if (unknown >= 0) {
    const told = { code: 'unknown-patch', what: 'patch', known: [...patches], part: 'value' } as const;
    tellUnknown(draft, [...path, 'between', unknown], { ...told, name: spec.between[unknown] ?? '' });
    return;
  }
  if (spec.between[0] === spec.between[1]) {
    tellMistake(draft, 'plan-shape', [...path, 'between'], {
      message: 'A link leads from a patch to itself',
      details: { expected: 'two different patches' },
    });
    return;
  }
  const effects = ['crossing-death', 'turn-back', 'distance', 'share'] as const;
  if (effects.every((key) => spec[key] === undefined)) {
    tellMistake(draft, 'plan-shape', path, {
      message: `\`${name}\` changes nothing`,
      part: 'key',
      details: { expected: 'one or more of `crossing-death`, `turn-back`, `distance` and `share`' },
    });
  }
  for (const dispersal of dispersals) layIn(draft, dispersal, { name, spec });
}

function dispersalsFor(draft: Draft, asked: string | undefined, path: SpecPath): readonly string[] {
  const { named, year } = draft.spec;
  const known = Object.keys(named).filter((name) => named[name]?.kind === 'dispersal' && year.includes(name));
  if (asked === undefined && known.length === 0) {
    tellMistake(draft, 'plan-shape', path, {
      message: 'No phase of the year is a dispersal that could use this link',
      part: 'key',
      details: { expected: 'a phase with `kind: dispersal` in the year' },
    });
  }
  if (asked === undefined || known.includes(asked)) return asked === undefined ? known : [asked];
  const told = { code: 'unknown-phase', what: 'dispersal in the year called', known, part: 'value' } as const;
  tellUnknown(draft, [...path, 'dispersal'], { ...told, name: asked });
  return [];
}

function layIn(draft: Draft, dispersal: string, { name, spec }: NamedAction<'link'>): void {
  const path = ['actions', name];
  const when = whenOf(draft, spec, path);
  const section = draft.spec.named[dispersal];
  if (section?.kind !== 'dispersal') return;
  const [a, b] = spec.between;
  const words = `the link between ${a} and ${b}`;
  if (spec.share !== undefined) {
    if (section.shares === undefined) tellNoShares(draft, dispersal, path);
    else
      for (const [from, to] of [
        [a, b],
        [b, a],
      ] as const)
        layShare(draft, { dispersal, from, to, name, spec });
  }
  const { distance } = spec;
  if (spec['crossing-death'] === undefined && spec['turn-back'] === undefined && distance === undefined) return;
  const index = linkBetween(section, [a, b], () =>
    draft.origins.set(JSON.stringify([dispersal, 'links', section.links?.length ?? 0]), path),
  );
  const at = [dispersal, 'links', index];
  const link = section.links?.[index];
  if (link === undefined) return;
  for (const key of ['crossing-death', 'turn-back'] as const) {
    const effect = spec[key];
    if (effect === undefined) continue;
    const target = () => ({
      base: link[key] ?? 0,
      dimension: 'share' as const,
      words: `the ${key} of ${words}`,
      write: (expression: number | string) => void (link[key] = expression),
    });
    addEffect(draft, [...at, key], { target, effect, place: { when, path: [...path, key] } });
  }
  if (distance !== undefined) layDistance(draft, { at, link, words, name, spec });
}

interface Distance extends NamedAction<'link'> {
  readonly at: SpecPath;
  readonly link: Link;
  readonly words: string;
}

/** A distance that is measured is not known here: of it a multiple is kept, and what is added. */
function layDistance(draft: Draft, { at, link, words, name, spec }: Distance): void {
  const path = ['actions', name, 'distance'];
  const place = { when: whenOf(draft, spec, ['actions', name]), path };
  const { distance: effect = {} } = spec;
  const target = (key: 'distance' | 'distance-times' | 'distance-add', base: number | string) => () => ({
    base,
    dimension: key === 'distance-times' ? ('share' as const) : ('length' as const),
    words: `the distance of ${words}`,
    write: (expression: number | string) => void (link[key] = expression),
  });
  if (link.distance !== undefined) {
    addEffect(draft, [...at, 'distance'], { target: target('distance', link.distance), effect, place });
    return;
  }
  const { set, times } = effect;
  const factor = { ...(set === undefined ? {} : { set: 0 }), ...(times === undefined ? {} : { times }) };
  addEffect(draft, [...at, 'distance-times'], {
    target: target('distance-times', link['distance-times'] ?? 1),
    effect: factor,
    place,
  });
  addEffect(draft, [...at, 'distance-add'], {
    target: target('distance-add', link['distance-add'] ?? 0),
    effect,
    place,
  });
}

/** The link of two patches in a draft, which is made where there is none. */
function linkBetween(section: DispersalSpec, [a, b]: readonly [string, string], made: () => void): number {
  const links = section.links ?? [];
  const index = links.findIndex(({ between }) => between.includes(a) && between.includes(b));
  if (index >= 0) return index;
  made();
  section.links = [...links, { between: [a, b] }];
  return links.length;
}

interface Share extends NamedAction<'link'> {
  readonly dispersal: string;
  readonly from: string;
  readonly to: string;
}

function layShare(draft: Draft, { dispersal, from, to, name, spec }: Share): void {
  const section = draft.spec.named[dispersal];
  const { share } = spec;
  if (section?.kind !== 'dispersal' || section.shares === undefined || share === undefined) return;
  const { shares } = section;
  const target = () => ({
    base: shares[from]?.[to] ?? 0,
    dimension: 'share' as const,
    words: `the share that goes from ${from} to ${to}`,
    write: (expression: number | string) => void (shares[from] = { ...shares[from], [to]: expression }),
  });
  const path = ['actions', name, 'share'];
  addEffect(draft, [dispersal, 'shares', from, to], {
    target,
    effect: share,
    place: { when: whenOf(draft, spec, ['actions', name]), path },
  });
}

function tellNoShares(draft: Draft, dispersal: string, path: SpecPath): void {
  tellMistake(draft, 'plan-shape', [...path, 'share'], {
    message: `\`${dispersal}\` has no table of shares`,
    part: 'key',
    details: { expected: '`distance`, `crossing-death` or `turn-back`, which fit a dispersal with a kernel' },
  });
}
