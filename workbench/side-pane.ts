/** Mounts the add-in's pane beside the grid, through the workbench's adapter of its port. */
import type { Book } from './book';
import { createPort } from './port';
import type { Signals } from './signals';
import type { ThemeSwitch } from './theme';

export async function mountSidePane(
  container: HTMLElement,
  book: Book,
  signals: Signals,
  theme: ThemeSwitch,
): Promise<void> {
  const { mountPane } = await import(/* webpackChunkName: "pane" */ '../taskpane/pane');
  mountPane(container, createPort(book, signals, theme));
}
