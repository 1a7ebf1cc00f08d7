/** The toolbar: ours, plain buttons and selects in reading order, so that Tab reaches every one. */
import type { BlankCells } from './host';
import type { Choice } from './theme';

export interface BarActions {
  readonly open: (file: File) => void;
  readonly save: () => void;
  readonly blankCells: (habit: BlankCells) => void;
  readonly colours: (choice: Choice) => void;
}

export interface Bar {
  /** name of the open file and whether it differs from what was opened or saved */
  show(name: string, changed: boolean): void;
}

const FILE_TYPES = '.xlsx,application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

export function createBar(bar: HTMLElement, colours: Choice, actions: BarActions): Bar {
  const title = document.createElement('h1');
  const name = document.createElement('span');
  title.append('Spanrow workbench ', name);

  const picker = document.createElement('input');
  picker.type = 'file';
  picker.accept = FILE_TYPES;
  picker.hidden = true;
  picker.addEventListener('change', () => {
    const file = picker.files?.[0];
    picker.value = ''; // the same file may be opened twice in a row
    if (file !== undefined) actions.open(file);
  });

  const files = group([
    button('open', 'Open .xlsx…', 'Open a workbook from this computer', () => picker.click()),
    button('save', 'Save .xlsx', 'Save the workbook with its formulas and values', actions.save),
    picker,
  ]);
  const blanks = chooser<BlankCells>(
    'blank-cells',
    'Blank cells reach functions',
    'Spreadsheet programs differ; a beam gives the same answer either way',
    [
      ['zero', 'as on desktop (0)'],
      ['empty', 'as on the web (empty)'],
    ],
    'zero',
    actions.blankCells,
  );
  const looks = chooser<Choice>(
    'colours',
    'Colours',
    'Light or dark',
    [
      ['system', 'as the system'],
      ['light', 'light'],
      ['dark', 'dark'],
    ],
    colours,
    actions.colours,
  );
  const space = document.createElement('div');
  space.className = 'space';
  bar.append(title, files, space, blanks, looks);

  return {
    show(file, changed) {
      name.textContent = `${file}${changed ? ' (changed)' : ''}`;
      document.title = `${changed ? '• ' : ''}${file} - Spanrow workbench`;
    },
  };
}

function group(children: HTMLElement[]): HTMLElement {
  const element = document.createElement('div');
  element.className = 'group';
  element.append(...children);
  return element;
}

function button(id: string, text: string, hint: string, act: () => void): HTMLButtonElement {
  const element = document.createElement('button');
  element.type = 'button';
  element.id = id;
  element.textContent = text;
  element.title = hint;
  element.addEventListener('click', act);
  return element;
}

function chooser<T extends string>(
  id: string,
  text: string,
  hint: string,
  options: readonly (readonly [T, string])[],
  chosen: T,
  act: (value: T) => void,
): HTMLElement {
  const label = document.createElement('label');
  label.htmlFor = id;
  label.textContent = text;
  label.title = hint;
  const select = document.createElement('select');
  select.id = id;
  select.title = hint;
  for (const [value, words] of options)
    select.add(new Option(words, value, value === chosen, value === chosen));
  select.addEventListener('change', () => act(select.value as T));
  return group([label, select]);
}
