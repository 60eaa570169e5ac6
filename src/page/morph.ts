// Turns what stands in the page into fresh markup without taking away elements that stay, so that focus stays too.
import type { Markup } from '../view/markup.ts';

export function morph(holder: Element, markup: Markup): void {
  const template = document.createElement('template');
  template.innerHTML = markup.text;
  children(holder, template.content);
}

function children(old: Element, fresh: ParentNode & Node): void {
  const [before, after] = [[...old.childNodes], [...fresh.childNodes]];
  after.forEach((node, i) => {
    const there = before[i];
    if (there === undefined) old.append(node);
    else if (there.isEqualNode(node)) return;
    else if (there instanceof Element && node instanceof Element && there.nodeName === node.nodeName) {
      attributes(there, node);
      children(there, node);
    } else if (there.nodeType === Node.TEXT_NODE && node.nodeType === Node.TEXT_NODE) {
      if (there.nodeValue !== node.nodeValue) there.nodeValue = node.nodeValue;
    } else there.replaceWith(node);
  });
  for (const left of before.slice(after.length)) left.remove();
}

function attributes(old: Element, fresh: Element): void {
  const names = fresh.getAttributeNames();
  for (const name of names) {
    const value = fresh.getAttribute(name) ?? '';
    if (old.getAttribute(name) !== value) old.setAttribute(name, value);
  }
  if (old.attributes.length === names.length) return;
  for (const name of old.getAttributeNames()) if (!fresh.hasAttribute(name)) old.removeAttribute(name);
}
