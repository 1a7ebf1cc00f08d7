/**
 * What happens in the spreadsheet, as two signals: the selection moved, cells changed (typed, undone, recalculated). Both are gathered
 * until the current task is over, so that pasting a thousand cells is one signal.
 */
import { ICommandService } from '@univerjs/core';
import { SetFormulaCalculationResultMutation } from '@univerjs/engine-formula';
import {
  SetSelectionsOperation,
  SetWorksheetActiveOperation,
  SheetsSelectionsService,
} from '@univerjs/sheets';
import type { Book, Rectangle } from './book';

export interface SelectedCells {
  readonly sheet: string;
  readonly range: Rectangle;
  readonly active: { readonly row: number; readonly column: number };
}

export interface Signals {
  selection(): SelectedCells | null;
  onSelection(listener: (selected: SelectedCells) => void): () => void;
  /** `typed`: something other than a calculation changed, so the workbook differs from its file */
  onChange(listener: (change: { readonly typed: boolean }) => void): () => void;
  /** another workbook was opened: everything is new */
  opened(): void;
}

const SELECTING = new Set<string>([SetSelectionsOperation.id, SetWorksheetActiveOperation.id]);
/** Mutations that move cells: the host this stands in for computes custom functions again after them. */
const MOVING = /^sheet\.mutation\.(insert|remove|move)-(row|col|rows|cols|range|rows-cols|columns)/;

export function createSignals(book: Book): Signals {
  const injector = book.univer.__getInjector();
  const selecting = new Set<(selected: SelectedCells) => void>();
  const changing = new Set<(change: { readonly typed: boolean }) => void>();
  let pendingSelection = false;
  let pendingChange: { typed: boolean } | null = null;
  let pendingRun = false;

  function selection(): SelectedCells | null {
    if (book.api.getActiveWorkbook() === null) return null;
    const last = injector.get(SheetsSelectionsService).getCurrentLastSelection();
    const sheet = book.model.getActiveSheet();
    if (!last || !sheet) return null;
    const { startRow, startColumn, endRow, endColumn } = last.range;
    const range = {
      startRow: Number.isNaN(startRow) ? 0 : startRow,
      startColumn: Number.isNaN(startColumn) ? 0 : startColumn,
      endRow: Number.isNaN(endRow) ? sheet.getRowCount() - 1 : endRow,
      endColumn: Number.isNaN(endColumn) ? sheet.getColumnCount() - 1 : endColumn,
    };
    return {
      sheet: sheet.getName(),
      range,
      active: {
        row: last.primary?.actualRow ?? range.startRow,
        column: last.primary?.actualColumn ?? range.startColumn,
      },
    };
  }

  function signalSelection(): void {
    if (pendingSelection) return;
    pendingSelection = true;
    queueMicrotask(() => {
      pendingSelection = false;
      const selected = selection();
      if (selected !== null) for (const listener of [...selecting]) listener(selected);
    });
  }

  function signalChange(typed: boolean): void {
    if (pendingChange !== null) {
      pendingChange.typed ||= typed;
      return;
    }
    pendingChange = { typed };
    setTimeout(() => {
      const change = pendingChange ?? { typed };
      pendingChange = null;
      for (const listener of [...changing]) listener(change);
    }, 0);
  }

  function runAgain(): void {
    if (pendingRun) return;
    pendingRun = true;
    setTimeout(() => {
      pendingRun = false;
      book.api.getFormula().executeCalculation();
    }, 0);
  }

  injector.get(ICommandService).onCommandExecuted((command, options) => {
    if (SELECTING.has(command.id)) signalSelection();
    else if (command.id === SetFormulaCalculationResultMutation.id) signalChange(false);
    else if (command.id.startsWith('sheet.mutation.')) {
      // The engine writes its own results with a mutation too; those carry this mark.
      const calculated = (options as { fromFormula?: boolean } | undefined)?.fromFormula === true;
      signalChange(!calculated && !command.id.includes('auto-height'));
      if (MOVING.test(command.id)) runAgain();
    }
  });

  return {
    selection,
    onSelection: (listener) => {
      selecting.add(listener);
      return () => void selecting.delete(listener);
    },
    onChange: (listener) => {
      changing.add(listener);
      return () => void changing.delete(listener);
    },
    opened: () => {
      signalSelection();
      signalChange(false);
    },
  };
}
