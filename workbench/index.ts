/**
 * The workbench: the add-in without Excel. It loads the same functions bundle into an embedded spreadsheet and mounts the same
 * pane beside it. Everything is on this page's own server; nothing leaves the machine.
 */
import './workbench.css';
import { createBar } from './bar';
import type { Book } from './book';
import { loadBundle } from './bundle';
import { wireDivider } from './divider';
import { openFile, saveFile } from './files';
import { wireFoot } from './foot';
import { createGrid, showErrorsOnHover } from './grid';
import { createNotice } from './notice';
import { createSignals } from './signals';
import { mountSidePane } from './side-pane';
import { createThemeSwitch } from './theme';
import { moveBetweenRegions } from './regions';

const UNTITLED = 'untitled.xlsx';

function byId(id: string): HTMLElement {
  const element = document.getElementById(id);
  if (element === null) throw new Error(`the page has no #${id}`);
  return element;
}

/** The demo workbook as the build left it beside the page; an empty one where there is none. */
async function openStart(book: Book): Promise<string> {
  const blank = new URLSearchParams(location.search).has('blank');
  const response = blank ? null : await fetch('covered-market.json');
  if (response === null || !response.ok) {
    await book.open({
      id: 'blank',
      name: UNTITLED,
      sheetOrder: ['s1'],
      sheets: { s1: { id: 's1', name: 'Sheet1' } },
    });
    return UNTITLED;
  }
  await book.open((await response.json()) as Parameters<Book['open']>[0]);
  return 'covered-market.xlsx';
}

async function start(): Promise<void> {
  const theme = createThemeSwitch();
  const notice = createNotice(byId('notice'));
  wireDivider(byId('divider'), byId('desk'));
  moveBetweenRegions([byId('bar'), byId('grid'), byId('pane')]);

  const bundle = await loadBundle('../');
  byId('waiting').remove();
  const { book, setDark } = createGrid(byId('grid'), bundle);
  setDark(theme.dark);
  theme.onChange(setDark);
  const signals = createSignals(book);
  wireFoot(byId('foot'), book, signals);

  let name = UNTITLED;
  let changed = false;
  let opening = true;
  const show = (next: boolean) => bar.show(name, (changed = next));
  const guard = (work: Promise<void>, what: string) => {
    work.catch((error: unknown) =>
      notice.show(`${what} failed: ${error instanceof Error ? error.message : String(error)}`),
    );
  };

  async function open(file: File): Promise<void> {
    opening = true;
    try {
      const opened = await openFile(file, book, notice);
      if (opened === null) return;
      name = opened;
      show(false);
      signals.opened();
    } finally {
      // results of the first calculation still arrive in this task
      setTimeout(() => (opening = false), 0);
    }
  }

  const bar = createBar(byId('bar'), theme.choice, {
    open: (file) => guard(open(file), 'Opening'),
    save: () =>
      guard(
        saveFile(name, book, notice).then(() => show(false)),
        'Saving',
      ),
    blankCells: (habit) => {
      book.host.blankCells = habit;
      guard(book.recalculate(), 'Recalculation');
    },
    colours: (choice) => theme.choose(choice),
  });
  signals.onChange(({ typed }) => {
    if (typed && !opening && !changed) show(true);
  });
  addEventListener('beforeunload', (event) => {
    if (changed) event.preventDefault();
  });

  name = await openStart(book);
  show(false);
  showErrorsOnHover(book);
  signals.opened();
  opening = false;
  await mountSidePane(byId('pane'), book, signals, theme);
  document.documentElement.dataset.ready = 'true';
}

start().catch((error: unknown) => {
  const place = document.getElementById('waiting') ?? document.getElementById('grid');
  if (place !== null)
    place.textContent = `The workbench could not start: ${error instanceof Error ? error.message : String(error)}. Run "npm run build" and serve the dist folder.`;
});
