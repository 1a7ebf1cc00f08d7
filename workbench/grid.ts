/** The embedded spreadsheet on the page: its engine, its screen, our functions with their descriptions, and our words for errors. */
import { LocaleType, LogLevel, Univer, type IDisposable } from '@univerjs/core';
import { FUniver } from '@univerjs/core/facade';
import {
  CalculationMode,
  CellAlertManagerService,
  CellAlertType,
  HoverManagerService,
  UniverSheetsCorePreset,
} from '@univerjs/preset-sheets-core';
import enUS from '@univerjs/preset-sheets-core/locales/en-US';
import '@univerjs/preset-sheets-core/lib/index.css';
import { debounceTime } from 'rxjs';
import { Book } from './book';
import type { FunctionsBundle } from './bundle';
import { createHost } from './host';
import { switchOffColumnIndex } from './tuning';
import { gridTheme } from './theme';

/** The engine shows its own one-line text for an error under this key; ours takes its place. */
const ERROR_ALERT = 'SHEET_FORMULA_ALERT';
/** The engine's own text comes after 100 ms; ours must come later to stand. */
const HOVER_DELAY = 140;

export interface Grid {
  readonly book: Book;
  readonly setDark: (dark: boolean) => void;
}

export function createGrid(container: HTMLElement, bundle: FunctionsBundle): Grid {
  switchOffColumnIndex();
  const host = createHost(bundle);
  const univer = new Univer({
    theme: gridTheme,
    locale: LocaleType.EN_US,
    locales: { [LocaleType.EN_US]: enUS },
    logLevel: LogLevel.ERROR,
  });
  const preset = UniverSheetsCorePreset({
    container,
    header: true, // the row with the formula bar
    toolbar: false,
    footer: { sheetBar: true, statisticBar: true, menus: false, zoomSlider: true },
    disableAutoFocus: true,
    disableTextFormatAlert: true,
    disableTextFormatMark: true,
    sheets: { disableForceStringAlert: true },
    formula: {
      function: host.functions,
      description: host.descriptions,
      initialFormulaComputing: CalculationMode.FORCED,
    },
  });
  for (const plugin of preset.plugins) {
    if (Array.isArray(plugin)) univer.registerPlugin(plugin[0], plugin[1]);
    else univer.registerPlugin(plugin);
  }
  const book = new Book(univer, FUniver.newAPI(univer), host);
  return { book, setDark: (dark) => book.api.toggleDarkMode(dark) };
}

/** Shows the sentence of a function's error when the pointer rests on its cell. Call once a workbook is open. */
export function showErrorsOnHover(book: Book): IDisposable {
  const injector = book.univer.__getInjector();
  const hover = injector.get(HoverManagerService);
  const alerts = injector.get(CellAlertManagerService);
  const subscription = hover.currentCell$.pipe(debounceTime(HOVER_DELAY)).subscribe((cell) => {
    if (cell === null || cell === undefined) return;
    const { row, col, subUnitId } = cell.location;
    const sheet = book.sheets().find((one) => one.getSheetId() === subUnitId);
    if (sheet === undefined) return;
    const message = book.messageAt(sheet, row, col);
    if (message === null) return;
    alerts.showAlert({
      type: CellAlertType.ERROR,
      title: String(book.valueAt(sheet, row, col)),
      message,
      location: cell.location,
      width: 340,
      height: 60 + 20 * Math.ceil(message.length / 44),
      key: ERROR_ALERT,
    });
  });
  return { dispose: () => subscription.unsubscribe() };
}
