// Two plans side by side on the map, or how one differs from the other.
import type { MapState, ReportView } from '../../view/contract.ts';
import { drawMap } from '../../view/map/draw.ts';
import { layOut } from '../../view/map/sheet.ts';
import { mark, Markup } from '../../view/markup.ts';
import { pick } from '../../view/series.ts';

const width = 372;

/** `chosen` is the place of the plan that is shown beside the first. */
export function pairOfMaps(view: ReportView, chosen: number): Markup | null {
  const { plans = [] } = view;
  if (plans.length < 2) return null;
  const last = view.years.length - 1;
  const state: MapState = { count: last, show: 'abundance', focus: null };
  const [first, other] = [pick(plans, 0), pick(plans, chosen)];
  const holder = (side: string, plan: string, picture: Markup) =>
    mark`<div data-figure="map" data-side="${side}" data-plan="${plan}" data-width="${String(width)}">${picture}</div>`;
  const difference = { ...other.view, minus: first };
  return mark`<h3 id="side-by-side">Two plans side by side</h3>
<div class="controls" hidden>${choice('left-plan', 'Left', plans, 0)}${choice('right-plan', 'Right', plans, chosen)}
<label><input type="checkbox" id="plan-difference"${new Markup(' checked')}> on the right, the difference only</label></div>
<figure class="map pair"><div class="side">${holder('left', '0', drawMap(state, layOut(first.view, width)))}</div>
<div class="side">${holder('right', `${chosen}-0`, drawMap({ ...state, show: 'difference' }, layOut(difference, width)))}</div>
<figcaption>Left: “<bdi>${first.name}</bdi>”. Right: “<bdi>${other.name}</bdi>” less “<bdi>${first.name}</bdi>”, mean animals in each patch. On a screen both can be chosen; the year and what is shown are those of the map above.</figcaption></figure>`;
}

function choice(id: string, side: string, plans: NonNullable<ReportView['plans']>, selected: number): Markup {
  const options = plans.map(
    ({ name }, i) =>
      mark`<option value="${String(i)}"${i === selected ? new Markup(' selected') : null}>${name}</option>`,
  );
  return mark`<label>${side} <select id="${id}">${options}</select></label>`;
}
