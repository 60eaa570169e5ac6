// Saving a figure as SVG or PNG. The picture carries the title and the hash of what it was drawn from.
import type { ReportView } from '../view/contract.ts';
import { eachElement } from './arrival.ts';
import { paper } from '../view/palette.ts';

/** `refresh` draws again what has changed out of sight. */
export function mountSave(view: ReportView, refresh: () => void): void {
  eachElement('figure, .smalls', (figure) => {
    const row = document.createElement('div');
    row.className = 'save';
    const take = (save: Save) => () => {
      refresh();
      save(picture(figure, view));
    };
    row.append(button('Save as SVG', take(saveSvg)), button('Save as PNG', take(savePng)));
    if (figure.tagName === 'FIGURE') figure.append(row);
    else (figure.nextElementSibling ?? figure).after(row);
  });
}

type Save = (picture: Picture) => void;

interface Picture {
  readonly name: string;
  readonly text: string;
  readonly width: number;
  readonly height: number;
}

function button(words: string, click: () => void): HTMLButtonElement {
  const made = document.createElement('button');
  made.type = 'button';
  made.textContent = words;
  made.addEventListener('click', click);
  return made;
}

/** All pictures of the figure that can be seen, side by side where there are many. */
function picture(figure: HTMLElement, view: ReportView): Picture {
  const parts = [...figure.querySelectorAll('svg')].filter((svg) => svg.getClientRects().length > 0);
  const columns = Math.min(4, parts.length);
  const [cellWidth, cellHeight] = [Math.max(...parts.map(width)), Math.max(...parts.map(height))];
  const sheet = document.createElementNS('http://www.w3.org/2000/svg', 'svg');
  const size = { width: cellWidth * columns, height: cellHeight * Math.ceil(parts.length / columns) };
  sheet.setAttribute('viewBox', `0 0 ${size.width} ${size.height}`);
  sheet.setAttribute('width', String(size.width));
  sheet.setAttribute('height', String(size.height));
  const origin = document.createElementNS('http://www.w3.org/2000/svg', 'desc');
  origin.textContent = `${view.title}. Drawn from the run with hash ${view.hash}.`;
  sheet.append(origin);
  parts.forEach((part, i) => {
    const copy = part.cloneNode(true);
    if (!(copy instanceof SVGElement)) return;
    copy.setAttribute('x', String((i % columns) * cellWidth));
    copy.setAttribute('y', String(Math.floor(i / columns) * cellHeight));
    sheet.append(copy);
  });
  return { name: name(figure, view), text: new XMLSerializer().serializeToString(sheet), ...size };
}

function width(svg: SVGSVGElement): number {
  return svg.viewBox.baseVal.width;
}

function height(svg: SVGSVGElement): number {
  return svg.viewBox.baseVal.height;
}

function name(figure: HTMLElement, view: ReportView): string {
  const section = figure.closest('section')?.id ?? 'figure';
  const index = figure.querySelector<HTMLElement>('[data-index]')?.dataset['index'];
  const words = [...view.title.toLowerCase().matchAll(/[a-z0-9]+/g)].slice(0, 6).map(([word]) => word);
  return [...words, section, ...(index === undefined ? [] : [String(Number(index) + 1)])].join('-');
}

function saveSvg({ name, text }: Picture): void {
  download(new Blob([text], { type: 'image/svg+xml' }), `${name}.svg`);
}

function savePng({ name, text, width, height }: Picture): void {
  const scale = 2;
  const image = new Image();
  const address = URL.createObjectURL(new Blob([text], { type: 'image/svg+xml' }));
  image.addEventListener('load', () => {
    const canvas = document.createElement('canvas');
    [canvas.width, canvas.height] = [width * scale, height * scale];
    const brush = canvas.getContext('2d');
    if (brush === null) return;
    brush.fillStyle = paper;
    brush.fillRect(0, 0, canvas.width, canvas.height);
    brush.drawImage(image, 0, 0, canvas.width, canvas.height);
    URL.revokeObjectURL(address);
    canvas.toBlob((blob) => {
      if (blob !== null) download(blob, `${name}.png`);
    });
  });
  image.src = address;
}

function download(blob: Blob, file: string): void {
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = file;
  link.click();
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
