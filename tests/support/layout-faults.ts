import type { Page } from 'playwright-core';

/** A piece of drawn text or a mark, with where it stands on screen (CSS px). */
interface Piece {
  what: string;
  /** Marks of one layer must not overlap each other; texts neither. What floats over the page is a layer of its own. */
  layer: string;
  box: { left: number; top: number; right: number; bottom: number };
}
interface Drawn {
  texts: Piece[];
  marks: Piece[];
  cut: string[];
}

/** Texts that a box or the screen's edge cuts; pairs of texts or marks that overlap by more than a pixel. */
export async function layoutFaults(page: Page): Promise<string[]> {
  await page.evaluate(() => document.fonts.ready);
  const { texts, marks, cut } = await page.evaluate(drawn);
  return [...cut, ...overlaps(texts), ...overlaps(marks)];
}

const TOLERANCE = 1;
function overlaps(pieces: readonly Piece[]): string[] {
  const sorted = [...pieces].sort((a, b) => a.box.left - b.box.left);
  const found: string[] = [];
  sorted.forEach((a, i) => {
    for (const b of sorted.slice(i + 1)) {
      if (b.box.left >= a.box.right - TOLERANCE) break;
      const both = a.layer === b.layer && Math.min(a.box.bottom, b.box.bottom) - Math.max(a.box.top, b.box.top) > TOLERANCE;
      if (both) found.push(`${a.what} overlaps ${b.what} at ${Math.round(b.box.left)},${Math.round(b.box.top)}`);
    }
  });
  return found;
}

/** Runs in the page. Texts count by the height of their capitals: line boxes hold air above and below. */
function drawn(): Drawn {
  const MARKS = 'body > * footer, .strip, .return, .bar, .night-bar, .night-warm, .cap-in > svg, .cap-clock, .cap-words, .balls, .redo, .rig, .row-strip, .row-boards, .row-deck';
  const CAPITALS = 0.72;
  const shown = (element: Element): boolean => {
    const { opacity, visibility } = getComputedStyle(element);
    const { width, height } = element.getBoundingClientRect();
    return width > 1 && height > 1 && visibility === 'visible' && opacity !== '0' && element.checkVisibility({ opacityProperty: true, visibilityProperty: true });
  };
  const ancestors = (element: Element): Element[] => (element.parentElement ? [element, ...ancestors(element.parentElement)] : [element]);
  /** How an element cuts what is in it, asked once: a page has far more texts than boxes. */
  const boxes = new Map<Element, { x: boolean; y: boolean; hides: boolean; scrolls: boolean; floats: boolean; outer: DOMRect }>();
  const boxOf = (element: Element) => {
    const known = boxes.get(element);
    if (known) return known;
    const { overflowX, overflowY, overflow, clipPath, position, contain } = getComputedStyle(element);
    const cuts = (way: string): boolean => way === 'hidden' || way === 'clip' || /paint|strict|content/.test(contain);
    const box = {
      x: cuts(overflowX), y: cuts(overflowY), hides: clipPath !== 'none' || (element.clientWidth <= 1 && overflow === 'hidden'),
      scrolls: ['auto', 'scroll'].includes(overflowX) && element.scrollWidth > element.clientWidth,
      floats: position === 'fixed' || position === 'sticky' || element.matches('dialog, [popover], [role=dialog]'), outer: element.getBoundingClientRect(),
    };
    boxes.set(element, box);
    return box;
  };
  const name = (element: Element): string => `${element.tagName.toLowerCase()}${typeof element.className === 'string' && element.className ? `.${element.className.split(' ')[0]}` : ''}`;
  const layerOf = (chain: readonly Element[]): string => {
    const floats = chain.find((one) => boxOf(one).floats);
    return floats ? `${name(floats)} ${floats.id}` : '';
  };
  const pen = document.createElement('canvas').getContext('2d')!;
  /** Of a chosen option with its padding, px: the browser doesn't say whether it shows it whole. */
  const textWidth = (text: string, field: Element): number => {
    const { font, paddingLeft, paddingRight } = getComputedStyle(field);
    pen.font = font;
    return pen.measureText(text).width + parseFloat(paddingLeft) + parseFloat(paddingRight);
  };
  const result: Drawn = { texts: [], marks: [], cut: [] };
  const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
  for (let node = walker.nextNode(); node; node = walker.nextNode()) {
    const parent = node.parentElement;
    const text = node.textContent?.trim() ?? '';
    if (!parent || text === '' || parent.closest('script, style, noscript, select') || !shown(parent)) continue;
    const chain = ancestors(parent);
    if (chain.some((one) => boxOf(one).hides)) continue;
    const range = document.createRange();
    range.selectNodeContents(node);
    const half = (parseFloat(getComputedStyle(parent).fontSize) * CAPITALS) / 2;
    for (const rect of range.getClientRects()) {
      const middle = (rect.top + rect.bottom) / 2;
      const box = { left: rect.left, right: rect.right, top: middle - half, bottom: middle + half };
      let seen = true;
      let whole = true;
      for (const one of chain) {
        const { x, y, outer } = boxOf(one);
        if (x && (box.right <= outer.left || box.left >= outer.right)) seen = false;
        if (y && (box.bottom <= outer.top || box.top >= outer.bottom)) seen = false;
        if (x && (box.left < outer.left - 1 || box.right > outer.right + 1)) whole = false;
        if (y && (box.top < outer.top - 1 || box.bottom > outer.bottom + 1)) whole = false;
      }
      if (!seen) continue;
      const scroller = chain.findIndex((one) => boxOf(one).scrolls);
      if (!whole) result.cut.push(`“${text}” in ${name(parent)} is cut`);
      else if (scroller < 0 && (box.left < -1 || box.right > document.documentElement.clientWidth + 1)) result.cut.push(`“${text}” in ${name(parent)} leaves the screen`);
      result.texts.push({ what: `“${text}”`, layer: `${layerOf(chain)} ${scroller < 0 ? '' : [...boxes.keys()].indexOf(chain[scroller]!)}`, box });
    }
  }
  for (const field of document.querySelectorAll('input, select, textarea')) {
    const chosen = field instanceof HTMLSelectElement ? field.selectedOptions[0]?.text : undefined;
    if (chosen && shown(field) && textWidth(chosen, field) > field.clientWidth - 1) result.cut.push(`select “${chosen}” is cut`);
    if (shown(field) && field.scrollWidth > field.clientWidth + 1) result.cut.push(`${name(field)} “${(field as HTMLInputElement).value}” is cut`);
  }
  const marks = [...document.querySelectorAll(MARKS)].filter(shown);
  for (const mark of marks) {
    const holder = marks.find((other) => other !== mark && other.contains(mark));
    const { left, right, top, bottom } = mark.getBoundingClientRect();
    result.marks.push({ what: `${name(mark)} ${mark.closest('[data-lane]')?.getAttribute('data-lane') ?? mark.getAttribute('aria-label') ?? ''}`, layer: holder ? `in ${marks.indexOf(holder)}` : '', box: { left, right, top, bottom } });
  }
  return result;
}
