/**
 * A workbook in memory behind the pane's port: sheets of values and formulas, names, tables, a selection. It keeps the
 * port's rules (nothing filled is replaced unasked); it calculates nothing: tests set values beside formulas.
 */
import { addressFrom, contains, intersect, parseArea, shortAddress } from '../../taskpane/address';
import type {
  Ability,
  Area,
  Block,
  CellInput,
  NameMeaning,
  Selection,
  Separators,
  TableInfo,
  Theme,
  WorkbookPort,
} from '../../taskpane/port';

interface Stored {
  value: unknown;
  formula: string;
}

export class MemoryPort implements WorkbookPort {
  readonly host = 'memory';
  readonly sheets = new Map<string, Map<string, Stored>>();
  readonly names = new Map<string, NameMeaning>();
  readonly tables = new Map<string, TableInfo>();
  readonly spills = new Map<string, Area>();
  readonly abilities = new Set<Ability>(['insert', 'select']);
  readonly pictures: { at: Area; alternative: string }[] = [];
  numberSeparators: Separators = { decimal: '.', group: ',', list: ',' };
  themeNow: Theme = { dark: false, background: null, text: null };
  private selected: Selection | null = null;
  private readonly selectionListeners = new Set<(selection: Selection) => void>();
  private readonly changeListeners = new Set<(change: { area: Area | null }) => void>();
  private readonly themeListeners = new Set<(theme: Theme) => void>();

  constructor(...sheets: string[]) {
    for (const name of sheets.length > 0 ? sheets : ['Sheet1']) this.sheets.set(name, new Map());
  }

  can(ability: Ability): boolean {
    return this.abilities.has(ability);
  }

  /** `fill('B4', rows)`: a string starting with "=" is a formula without a value. */
  fill(address: string, rows: readonly (readonly unknown[])[], sheet = this.firstSheet()): void {
    const corner = parseArea(address, sheet);
    if (!corner) throw new Error(`no address: ${address}`);
    rows.forEach((row, r) =>
      row.forEach((value, c) => {
        const formula = typeof value === 'string' && value.startsWith('=') ? value : '';
        this.set(sheet, corner.row + r, corner.column + c, { value: formula === '' ? value : null, formula });
      }),
    );
  }

  area(address: string, sheet = this.firstSheet()): Area {
    const area = parseArea(address, sheet);
    if (!area) throw new Error(`no address: ${address}`);
    return area;
  }

  valueAt(address: string, sheet = this.firstSheet()): unknown {
    const { row, column } = this.area(address, sheet);
    return this.get(sheet, row, column)?.value ?? null;
  }

  formulaAt(address: string, sheet = this.firstSheet()): string {
    const { row, column } = this.area(address, sheet);
    return this.get(sheet, row, column)?.formula ?? '';
  }

  selectCell(address: string, sheet = this.firstSheet()): void {
    const area = this.area(address, sheet);
    this.selected = { area, active: { ...area, rows: 1, columns: 1 } };
    for (const listener of this.selectionListeners) listener(this.selected);
  }

  changed(): void {
    for (const listener of this.changeListeners) listener({ area: null });
  }

  setTheme(theme: Theme): void {
    this.themeNow = theme;
    for (const listener of this.themeListeners) listener(theme);
  }

  private firstSheet(): string {
    return this.sheets.keys().next().value ?? 'Sheet1';
  }

  private get(sheet: string, row: number, column: number): Stored | undefined {
    return this.sheets.get(sheet)?.get(`${row},${column}`);
  }

  private set(sheet: string, row: number, column: number, stored: Stored): void {
    const cells = this.sheets.get(sheet);
    if (!cells) throw new Error(`There is no sheet "${sheet}".`);
    const blank = stored.formula === '' && (stored.value === null || stored.value === '');
    if (blank) cells.delete(`${row},${column}`);
    else cells.set(`${row},${column}`, stored);
  }

  async selection(): Promise<Selection | null> {
    return this.selected;
  }
  onSelection(listener: (selection: Selection) => void) {
    this.selectionListeners.add(listener);
    return () => this.selectionListeners.delete(listener);
  }
  onChange(listener: (change: { area: Area | null }) => void) {
    this.changeListeners.add(listener);
    return () => this.changeListeners.delete(listener);
  }
  async select(area: Area): Promise<void> {
    this.selectCell(shortAddress(area), area.sheet);
  }

  async read(areas: readonly Area[]): Promise<readonly (Block | null)[]> {
    return Promise.all(
      areas.map(async (area) => {
        const used = await this.used(area.sheet);
        const common = used ? intersect(area, used) : null;
        if (!common) return null;
        const values: unknown[][] = [];
        const formulas: string[][] = [];
        for (let r = 0; r < common.rows; r++) {
          const cells = Array.from({ length: common.columns }, (_, c) =>
            this.get(common.sheet, common.row + r, common.column + c),
          );
          values.push(cells.map((cell) => cell?.value ?? null));
          formulas.push(cells.map((cell) => cell?.formula ?? ''));
        }
        return { area: common, values, formulas };
      }),
    );
  }
  async sheetNames(): Promise<readonly string[]> {
    return [...this.sheets.keys()];
  }
  async used(sheet: string): Promise<Area | null> {
    const cells = this.sheets.get(sheet);
    if (!cells || cells.size === 0) return null;
    const places = [...cells.keys()].map((key) => key.split(',').map(Number) as [number, number]);
    const rows = places.map(([row]) => row);
    const columns = places.map(([, column]) => column);
    const row = Math.min(...rows);
    const column = Math.min(...columns);
    return {
      sheet,
      row,
      column,
      rows: Math.max(...rows) - row + 1,
      columns: Math.max(...columns) - column + 1,
    };
  }
  async name(name: string): Promise<NameMeaning | null> {
    return this.names.get(name.toLowerCase()) ?? null;
  }
  async table(name: string): Promise<TableInfo | null> {
    return this.tables.get(name.toLowerCase()) ?? null;
  }
  async spill(cell: Area): Promise<Area | null> {
    return this.spills.get(`${cell.sheet}!${shortAddress(cell)}`) ?? null;
  }

  async occupied(area: Area): Promise<readonly string[]> {
    const [block] = await this.read([area]);
    if (!block) return [];
    const found: string[] = [];
    block.values.forEach((row, r) =>
      row.forEach((value, c) => {
        if ((value === null || value === '') && block.formulas[r]?.[c] === '') return;
        found.push(
          shortAddress({
            ...block.area,
            row: block.area.row + r,
            column: block.area.column + c,
            rows: 1,
            columns: 1,
          }),
        );
      }),
    );
    return found;
  }

  async write(...[writings, options = {}]: Parameters<WorkbookPort['write']>) {
    if (!options.confirmed) {
      const occupied: string[] = [];
      for (const { area, cells } of writings) {
        for (const address of await this.occupied(area)) {
          const cell = this.area(address, area.sheet);
          if (cells[cell.row - area.row]?.[cell.column - area.column] === undefined) continue;
          if (!(options.own ?? []).some((one) => contains(one, cell))) {
            occupied.push(addressFrom(cell, this.selected?.active.sheet ?? null));
          }
        }
      }
      if (occupied.length > 0) return { written: false as const, occupied };
    }
    for (const { area, cells } of writings) {
      cells.forEach((row, r) =>
        row.forEach((input, c) => {
          if (input !== undefined) this.set(area.sheet, area.row + r, area.column + c, stored(input));
        }),
      );
    }
    this.changed();
    return { written: true as const };
  }

  /** Moves cells down; references in formulas that hold plain A1 ranges over the place grow or move as a host would do it. */
  async insert(area: Area): Promise<void> {
    const cells = this.sheets.get(area.sheet);
    if (!cells) return;
    const moved: [string, Stored][] = [];
    for (const [key, value] of [...cells]) {
      const [row = 0, column = 0] = key.split(',').map(Number);
      if (row < area.row || column < area.column || column >= area.column + area.columns) continue;
      cells.delete(key);
      moved.push([`${row + area.rows},${column}`, value]);
    }
    for (const [key, value] of moved) cells.set(key, value);
    const shift = (row: number): number => (row - 1 >= area.row ? row + area.rows : row);
    for (const sheet of this.sheets.values()) {
      for (const cell of sheet.values()) {
        cell.formula = cell.formula.replace(
          /(\$?[A-Z]+\$?)(\d+)/g,
          (_, letters: string, row: string) => letters + shift(Number(row)),
        );
      }
    }
    this.changed();
  }

  async separators(): Promise<Separators> {
    return this.numberSeparators;
  }
  theme(): Theme {
    return this.themeNow;
  }
  onTheme(listener: (theme: Theme) => void) {
    this.themeListeners.add(listener);
    return () => this.themeListeners.delete(listener);
  }
  today(): string {
    return '1 Jan 2030';
  }
}

function stored(input: CellInput): Stored {
  if (typeof input === 'object' && input !== null) return { value: null, formula: input.formula };
  return { value: input, formula: '' };
}
