/** The drawing as a file of its own: light colours whatever the theme, styles written into the elements, no crosshair. */
import { h } from '../dom';
import type { Drawing } from './drawing';

const KEPT = [
  'fill',
  'fill-opacity',
  'stroke',
  'stroke-width',
  'stroke-dasharray',
  'stroke-linejoin',
  'opacity',
  'paint-order',
  'font-size',
  'font-weight',
] as const;
const FACE = "'Segoe UI', 'Helvetica Neue', Arial, sans-serif";

/** SVG text with everything in it. The page must hold the pane's style sheet. */
export function exportSvg(drawing: Drawing): string {
  const copy = drawing.root.cloneNode(true) as SVGSVGElement;
  copy.querySelector('.sp-overlay')?.remove();
  const stage = h('div', { class: 'sp-pane', 'data-theme': 'light', 'aria-hidden': 'true' }, copy);
  // laid out, so that styles apply, but out of sight
  stage.style.cssText = 'position:fixed;left:-10000px;top:0;width:800px';
  document.body.append(stage);
  try {
    for (const reading of Array.from(copy.querySelectorAll('.sp-reading'))) reading.remove();
    const elements = Array.from(copy.querySelectorAll<SVGElement>('path, circle, rect, text'));
    // read all first: writing in between would make the browser lay out again for every element
    const styles = elements.map((element) => {
      const computed = getComputedStyle(element);
      return KEPT.map((name) => [name, computed.getPropertyValue(name)] as const);
    });
    elements.forEach((element, i) => {
      for (const [name, value] of styles[i] ?? []) {
        const isText = element.tagName === 'text';
        if (value === '' || value === 'normal' || (!isText && name.startsWith('font'))) continue;
        if (/^(none|1|0s)$/.test(value) && !/^(fill|stroke)$/.test(name) && name !== 'opacity') continue;
        element.setAttribute(name, value);
      }
    });
    for (const element of Array.from(copy.querySelectorAll('[class]'))) element.removeAttribute('class');
    copy.removeAttribute('class');
    copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg');
    copy.setAttribute('font-family', FACE);
    const paper = document.createElementNS('http://www.w3.org/2000/svg', 'rect');
    paper.setAttribute('width', '100%');
    paper.setAttribute('height', '100%');
    paper.setAttribute('fill', '#ffffff');
    copy.prepend(paper);
    return new XMLSerializer().serializeToString(copy);
  } finally {
    stage.remove();
  }
}

/** PNG as base64 without prefix, at a multiple of the drawing's size. */
export async function exportPng(drawing: Drawing, times: number): Promise<string> {
  const picture = new Image();
  const source = URL.createObjectURL(new Blob([exportSvg(drawing)], { type: 'image/svg+xml' }));
  try {
    picture.src = source;
    await picture.decode();
    const canvas = document.createElement('canvas');
    canvas.width = Math.round(drawing.width * times);
    canvas.height = Math.round(drawing.height * times);
    const pen = canvas.getContext('2d');
    if (!pen) throw new Error('no canvas');
    pen.drawImage(picture, 0, 0, canvas.width, canvas.height);
    return canvas.toDataURL('image/png').replace(/^data:image\/png;base64,/, '');
  } finally {
    URL.revokeObjectURL(source);
  }
}

/** Hands a file to the person, the way a page can. */
export function download(name: string, blob: Blob): void {
  const link = h('a', { href: URL.createObjectURL(blob), download: name });
  document.body.append(link);
  link.click();
  link.remove();
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000);
}

export function fromBase64(text: string): Uint8Array<ArrayBuffer> {
  return Uint8Array.from(atob(text), (c) => c.charCodeAt(0));
}
