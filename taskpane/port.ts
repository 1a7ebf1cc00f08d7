/**
 * The one interface between the pane and a workbook. Two adapters implement it: `excel-port.ts` (Office.js)
 * and `workbench/port.ts` (the embedded spreadsheet); tests use a small one in memory.
 *
 * Rules every adapter keeps:
 * - rows and columns are zero-based; a sheet is its name; nothing but this file's types crosses;
 * - a promise rejects only when the host refuses (message in words); "not there" is null, never a rejection;
 * - formulas are in the invariant form of a file: English names, comma between arguments, point as decimal;
 * - listeners hear what the person at this computer does (and recalculation), not the edits of co-authors;
 * - `write` never replaces a filled cell unless it is the caller's own or the person has confirmed it.
 */

/** A rectangle of cells on one sheet. */
export interface Area {
  readonly sheet: string;
  /** zero-based, of the top left cell */
  readonly row: number;
  readonly column: number;
  /** how many, at least 1 */
  readonly rows: number;
  readonly columns: number;
}

/** What is selected: the whole selection and the one active cell in it (rows = columns = 1). */
export interface Selection {
  readonly area: Area;
  readonly active: Area;
}

/** Cells as read. Both matrices have the shape of `area`, which is the asked area cut to the used part of the sheet. */
export interface Block {
  readonly area: Area;
  /** raw values as the host gives them: number, text, boolean, null or '' when empty, rich objects, error texts such as "#DIV/0!" */
  readonly values: readonly (readonly unknown[])[];
  /** formula text starting with "=", or '' where the cell holds no formula of its own (empty, literal, or spilled into) */
  readonly formulas: readonly (readonly string[])[];
}

/** One cell to write. A string is text exactly as it stands (never read as a date or a formula); null empties the cell. */
export type CellInput = number | string | boolean | null | { readonly formula: string };

export interface Writing {
  readonly area: Area;
  /** shape of the area; undefined leaves that cell alone */
  readonly cells: readonly (readonly (CellInput | undefined)[])[];
}

export interface WriteOptions {
  /** cells in here are the caller's own and may be replaced */
  readonly own?: readonly Area[];
  /** the person has seen the list of filled cells and said yes */
  readonly confirmed?: boolean;
  /** what to call the step in an undo list, where the host has one */
  readonly label?: string;
}

/** Either everything was written (one undo step where the host allows), or nothing, and these filled cells stand in the way. */
export type WriteResult =
  | { readonly written: true }
  | {
      readonly written: false;
      readonly occupied: readonly string[]; /* "Sheet1!B4" style, sheet name left out on the active sheet */
    };

/** What a defined name stands for. */
export type NameMeaning =
  | { readonly kind: 'area'; readonly area: Area }
  | { readonly kind: 'value'; readonly value: unknown }
  | { readonly kind: 'formula'; readonly formula: string };

export interface TableInfo {
  readonly name: string;
  /** header, data and total rows together */
  readonly area: Area;
  readonly header: boolean;
  readonly totals: boolean;
  readonly columns: readonly string[];
}

/** How the host writes numbers and separates arguments; used for showing only. */
export interface Separators {
  readonly decimal: string;
  readonly group: string;
  readonly list: string;
}

export interface Theme {
  readonly dark: boolean;
  /** CSS colours of the host's pane; null = use our own */
  readonly background: string | null;
  readonly text: string | null;
}

/** Optional abilities of a host, tested at run time; the pane hides what is not there. */
export type Ability =
  'tables' | 'insert' | 'pictures' | 'charts' | 'print' | 'addTable' | 'addSheet' | 'undoGroup' | 'select';

export interface ChartRequest {
  /** PROFILE's spilled area or plain cells: first column x, header in the first row */
  readonly data: Area;
  /** top left cell of the chart */
  readonly at: Area;
  readonly title: string;
  /** zero-based columns of `data` to plot against its first */
  readonly columns: readonly number[];
}

export type Unsubscribe = () => void;

export interface WorkbookPort {
  /** a word for messages: "Excel", "workbench" */
  readonly host: string;
  can(ability: Ability): boolean;

  selection(): Promise<Selection | null>;
  onSelection(listener: (selection: Selection) => void): Unsubscribe;
  /** cells changed or were recalculated; area null = anywhere */
  onChange(listener: (change: { readonly area: Area | null }) => void): Unsubscribe;
  select(area: Area): Promise<void>;

  /** one round trip for any number of areas; an area wholly outside the used part, or on no such sheet, gives null */
  read(areas: readonly Area[]): Promise<readonly (Block | null)[]>;
  sheetNames(): Promise<readonly string[]>;
  /** the used part of a sheet; null when the sheet is empty or unknown */
  used(sheet: string): Promise<Area | null>;
  /** a defined name as seen from a sheet (its own names first, then the workbook's) */
  name(name: string, sheet: string): Promise<NameMeaning | null>;
  table(name: string): Promise<TableInfo | null>;
  /** the area that a dynamic array formula in this cell spills into, itself included (`B2#`) */
  spill(cell: Area): Promise<Area | null>;

  /** filled cells of an area as short addresses ("B4"), in reading order; spilled-into cells count as filled */
  occupied(area: Area): Promise<readonly string[]>;
  write(writings: readonly Writing[], options?: WriteOptions): Promise<WriteResult>;
  /** ability 'insert': puts empty cells at `area` and moves what was there, and everything below it in these columns, down; references follow */
  insert(area: Area): Promise<void>;

  separators(): Promise<Separators>;
  theme(): Theme;
  onTheme(listener: (theme: Theme) => void): Unsubscribe;
  /** today in the host's short date form, for the record */
  today(): string;

  /** ability 'addTable': turns written cells into a table with a header row; gives its name */
  addTable?(area: Area): Promise<string>;
  /** ability 'addSheet': adds a sheet, the name made free with a number when taken; gives the final name */
  addSheet?(name: string): Promise<string>;
  /** ability 'pictures': png as base64 without prefix, placed with its top left at a cell; size in points */
  addPicture?(at: Area, png: string, alternative: string, width: number, height: number): Promise<void>;
  /** ability 'charts' */
  addChart?(request: ChartRequest): Promise<void>;
  /** ability 'print': portrait page fitted to one page wide, this area */
  setPrint?(area: Area, paper: 'a4' | 'letter'): Promise<void>;
}
