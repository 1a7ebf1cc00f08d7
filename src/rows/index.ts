/** The row language: cells -> compiled table -> beam model. */
export { isBlank, isErrorCell, normaliseCell, showCell, type Cell } from './cell';
export { compileTable, type CompiledTable } from './compile';
export type { BuildResult, Reading } from './build';
export type { Layout, RowInfo } from './layout';
export { COLUMNS, type ColumnName, type ItemName } from './words';
export { NO_BINDINGS, readBindings, type Bindings, type BindingsResult } from './bindings';
export { readCombination, type CombinationResult } from './combine';
export { readLimit, type LimitResult } from './limit';
export { readPosition, type PositionResult } from './position';
export { readTextRows, type TextRow } from './text';
export { showNumber } from './show';
