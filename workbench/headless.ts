/**
 * The embedded spreadsheet without a screen, for Node: the engine, our functions and nothing else. Built into one CommonJS file
 * (dist/node/headless.js), because the engine's own modules cannot all be imported natively there.
 */
import { LocaleType, LogLevel, Univer } from '@univerjs/core';
import { FUniver } from '@univerjs/core/facade';
import { UniverFormulaEnginePlugin } from '@univerjs/engine-formula';
import { UniverSheetsPlugin } from '@univerjs/sheets';
import { CalculationMode, UniverSheetsFormulaPlugin } from '@univerjs/sheets-formula';
import { evaluateBundle, type FunctionsBundle } from './bundle';
import { Book } from './book';
import { createHost, type BlankCells } from './host';
import { demoWorkbook } from './demo';
import { createPort } from './port';
import { createSignals } from './signals';
import { switchOffColumnIndex } from './tuning';
import { cellName } from './xlsx/address';
import { callsSpanrow } from './xlsx/formula-text';
import { readXlsx } from './xlsx/read';
import { writeXlsx } from './xlsx/write';

export interface HeadlessOptions {
  readonly blankCells?: BlankCells;
}

/** A spreadsheet without a screen. Call `dispose` when done, else timers keep the process alive. */
export interface Headless {
  readonly book: Book;
  dispose(): void;
}

export function createHeadless(bundle: FunctionsBundle, options: HeadlessOptions = {}): Headless {
  switchOffColumnIndex();
  const host = createHost(bundle, options);
  const univer = new Univer({
    locale: LocaleType.EN_US,
    locales: { [LocaleType.EN_US]: {} },
    logLevel: LogLevel.SILENT,
  });
  univer.registerPlugin(UniverFormulaEnginePlugin, { function: host.functions });
  univer.registerPlugin(UniverSheetsPlugin);
  univer.registerPlugin(UniverSheetsFormulaPlugin, {
    description: host.descriptions,
    initialFormulaComputing: CalculationMode.FORCED,
  });
  const book = new Book(univer, FUniver.newAPI(univer), host);
  return { book, dispose: () => univer.dispose() };
}

export {
  callsSpanrow,
  cellName,
  createPort,
  createSignals,
  demoWorkbook,
  evaluateBundle,
  readXlsx,
  writeXlsx,
};
export type { Book, BlankCells, FunctionsBundle };
