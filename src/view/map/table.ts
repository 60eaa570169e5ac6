// The numbers of the map as two tables: patches, and the links between them.
import type { ReportView } from '../contract.ts';
import { mark, type Markup } from '../markup.ts';
import { percent, whole } from '../number.ts';
import { pick } from '../series.ts';
import { arriving, flow, leaving } from './words.ts';

export function mapTables(view: ReportView, count: number): Markup {
  const year = String(pick(view.years, count));
  const moved = view.links.length > 0 && count > 0 ? linkTable(view, count, year) : null;
  return mark`${patchTable(view, count, year)}${moved}`;
}

function patchTable(view: ReportView, count: number, year: string): Markup {
  const empty = view.patches.some((patch) => patch.empty !== null);
  const moving = view.links.length > 0 && count > 0;
  const rows = view.patches.map((patch, p) => {
    const { fan } = patch;
    const chance = patch.empty === null ? '' : percent(pick(patch.empty, count));
    const moves = moving
      ? mark`<td>${flow(arriving(view, p, count))}</td><td>${flow(leaving(view, p, count))}</td>`
      : null;
    return mark`<tr><th scope="row"><bdi>${patch.name}</bdi></th><td>${whole(pick(fan.median, count))}</td><td>${whole(pick(fan.p05, count))}</td><td>${whole(pick(fan.p95, count))}</td><td>${whole(pick(fan.mean, count))}</td>${empty ? mark`<td>${chance}</td>` : null}${moves}<td>${patch.capacity === null ? '' : whole(patch.capacity)}</td></tr>`;
  });
  const head = mark`<th scope="col">patch</th><th scope="col">middle future</th><th scope="col">5 of 100 futures at or under</th><th scope="col">95 of 100 at or under</th><th scope="col">mean</th>${empty ? mark`<th scope="col">chance of being empty</th>` : null}${moving ? mark`<th scope="col">arriving a year</th><th scope="col">leaving for another patch a year</th>` : null}<th scope="col">can hold</th>`;
  return mark`<div class="scroll" tabindex="0" role="region" aria-label="Patches in ${year}"><table><caption>Patches in ${year} (${view.animals})</caption><thead><tr>${head}</tr></thead><tbody>${rows}</tbody></table></div>`;
}

function linkTable(view: ReportView, count: number, year: string): Markup {
  const order = view.links
    .map((link) => ({ link, animals: pick(link.animals, count) }))
    .sort((a, b) => b.animals - a.animals);
  const rows = order.map(
    ({ link, animals }) =>
      mark`<tr><th scope="row"><bdi>${pick(view.patches, link.from).name}</bdi></th><td class="words"><bdi>${pick(view.patches, link.to).name}</bdi></td><td>${flow(animals)}</td></tr>`,
  );
  return mark`<div class="scroll" tabindex="0" role="region" aria-label="Movement in ${year}"><table><caption>Movement in the year to the count of ${year} (${view.animals} that arrive)</caption><thead><tr><th scope="col">from</th><th scope="col">to</th><th scope="col">a year</th></tr></thead><tbody>${rows}</tbody></table></div>`;
}
