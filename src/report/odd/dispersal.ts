// Where the leavers of a dispersal end, with all its numbers.
import { meanOverScale, type DispersalKernel } from '../../model/kernel-shape.ts';
import type { DispersalPhase, DispersalRule, Link, Model } from '../../model/model.ts';
import { mark, type Content, type Markup } from '../../view/markup.ts';
import { digits } from './rates.ts';

export function destinations({ rule, links = [] }: DispersalPhase, model: Model): Markup {
  const where = rule.by === 'shares' ? sharesWords : kernelWords(rule);
  const ways: readonly Content[] = links.map((link) => linkWords(link, model));
  return mark`<p>${where}${ways}</p>`;
}

const sharesWords = 'Where leavers end stands in a table of shares from patch to patch in the text of the model.';

function kernelWords(rule: Extract<DispersalRule, { by: 'kernel' }>): string {
  const { reachKm } = rule.kernel;
  const reach = reachKm === null ? '' : `, cut at ${digits(reachKm)} km`;
  const kernel = `Where leavers end follows ${shapeWords(rule.kernel)}${reach}, times the attraction of the target.`;
  const arrive =
    rule.leavers === 'all arrive'
      ? ' Leavers share out over the patches within reach, and isolation costs only what dying on the way costs.'
      : ' The kernel is a density over the plane times the area of the target; leavers that meet no patch are lost.';
  const way = [
    rule.hazardPerKm > 0 ? ` The hazard on the way is ${digits(rule.hazardPerKm)} per km.` : '',
    rule.survivalOnTheWay < 1 ? ` ${digits(rule.survivalOnTheWay)} of the leavers survive the way.` : '',
  ];
  return kernel + arrive + way.join('');
}

function shapeWords({ shape, scaleKm, shapeNumber }: DispersalKernel): string {
  const names = {
    exponential: 'a negative exponential kernel',
    gaussian: 'a Gaussian kernel',
    '2Dt': `a 2Dt kernel with shape number ${digits(shapeNumber)}`,
    'exponential power': `an exponential power kernel with shape number ${digits(shapeNumber)}`,
  } as const;
  const meanKm = scaleKm * meanOverScale(shape, shapeNumber);
  const mean = Number.isFinite(meanKm) ? `mean distance ${digits(meanKm)} km` : 'without a mean distance';
  return `${names[shape]} in the plane with scale ${digits(scaleKm)} km (${mean})`;
}

function linkWords({ between: [a, b], distanceKm, crossingDeath, turnBack }: Link, model: Model): Markup {
  const name = (p: number): string => model.patches[p]?.name ?? '';
  const said = [
    ...(distanceKm === null ? [] : [`the way is ${digits(distanceKm)} km long`]),
    ...(turnBack > 0 ? [`a share of ${digits(turnBack)} turns back and stays at home`] : []),
    ...(crossingDeath > 0 ? [`of those that cross a share of ${digits(crossingDeath)} dies`] : []),
  ];
  return mark` Between <bdi>${name(a)}</bdi> and <bdi>${name(b)}</bdi> ${said.length === 0 ? 'nothing is different' : said.join('; ')}.`;
}
