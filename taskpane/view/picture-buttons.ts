/** Buttons that take the drawing out of the pane: as a file, or into the sheet with alternative text. */
import { h } from '../dom';
import { download, exportPng, exportSvg, fromBase64 } from '../drawing/export';
import type { Drawing } from '../drawing/drawing';
import type { Area, WorkbookPort } from '../port';
import { texts } from '../texts';

/** Pixels of the PNG per pixel of the drawing: sharp on a high-resolution screen and in print. */
const SHARP = 3;
/** points per CSS pixel */
const POINTS = 0.75;

export interface PictureHost {
  drawing(): Drawing | null;
  name(): string;
  target(): Area | null;
  say(words: string): void;
  failed(reason: unknown): void;
}

export function pictureButtons(port: WorkbookPort, host: PictureHost): HTMLElement {
  const guarded = (run: (drawing: Drawing) => Promise<void>) => (): void => {
    const drawing = host.drawing();
    if (drawing) run(drawing).catch((reason: unknown) => host.failed(reason));
  };
  const button = (words: string, run: (drawing: Drawing) => Promise<void>): HTMLElement =>
    h('button', { type: 'button', class: 'sp-tool', click: guarded(run) }, words);
  const buttons = [
    button(texts.view.saveSvg, async (drawing) => {
      download(`${host.name()}.svg`, new Blob([exportSvg(drawing)], { type: 'image/svg+xml' }));
      return Promise.resolve();
    }),
    button(texts.view.savePng, async (drawing) => {
      const png = await exportPng(drawing, SHARP);
      download(`${host.name()}.png`, new Blob([fromBase64(png)], { type: 'image/png' }));
    }),
  ];
  const place = port.addPicture?.bind(port);
  if (place && port.can('pictures')) {
    buttons.push(
      button(texts.view.placePicture, async (drawing) => {
        const target = host.target();
        if (!target) return;
        const words = drawing.root.getAttribute('aria-label') ?? '';
        const png = await exportPng(drawing, SHARP);
        await place(target, png, words, drawing.width * POINTS, drawing.height * POINTS);
        host.say(texts.view.pictureDone);
      }),
    );
  }
  return h('div', { class: 'sp-tools' }, buttons);
}
