import { mountPane, type MountedPane } from '../../taskpane/pane';
import { MemoryPort } from '../helpers/memory-port';

const HEAD = ['Item', 'At', 'To', 'Value', 'End value', 'Unit', 'Case', 'Note'];
const ROWS: unknown[][] = [
  HEAD,
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 6],
  ['E', null, null, 210, null, 'GPa'],
  ['I', null, null, 8400, null, 'cm4'],
  ['uniform', 0, 6, 12, null, 'kN/m', 'Q'],
];

let port: MemoryPort;
let pane: MountedPane;
let root: HTMLElement;

async function settle(milliseconds = 60): Promise<void> {
  await new Promise((resolve) => setTimeout(resolve, milliseconds));
}

async function open(cell: string, rows = ROWS, formula = '=SPANROW.DEFLECTION(B4:I10, 3)'): Promise<void> {
  localStorage.clear();
  document.body.innerHTML = '<div id="pane"></div>';
  port = new MemoryPort('Beams', 'Other');
  port.fill('B4', rows);
  port.fill('L2', [[formula]]);
  port.selectCell(cell);
  pane = mountPane(document.getElementById('pane') as HTMLElement, port);
  await settle();
  root = document.querySelector('.sp-pane') as HTMLElement;
}
afterEach(() => pane.dispose());

const words = (selector: string): string => root.querySelector(selector)?.textContent ?? '';
const button = (name: string): HTMLButtonElement => {
  const found = Array.from(root.querySelectorAll('button')).find((one) =>
    (one.getAttribute('aria-label') ?? one.textContent ?? '').includes(name),
  );
  if (!found) throw new Error(`no button ${name}`);
  return found;
};
const tab = (name: string): void => (root.querySelector(`#sp-tab-${name}`) as HTMLElement).click();
const field = (label: string): HTMLInputElement => {
  const found = root.querySelector(`input[aria-label="${label}"]`);
  if (!found) throw new Error(`no field ${label}`);
  return found as HTMLInputElement;
};
function type(label: string, text: string, commit = true): void {
  const input = field(label);
  input.focus();
  input.value = text;
  input.dispatchEvent(new Event('input', { bubbles: true }));
  if (commit) input.blur();
}
const press = (element: Element, key: string, more: KeyboardEventInit = {}): void => {
  element.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...more }));
};

describe('review', () => {
  test('the beam behind the selected formula: title, answer at x, reactions, crosshair at x', async () => {
    await open('L2');
    expect(words('.sp-title')).toBe('Beam B4:I10');
    expect(words('.sp-sub')).toContain('DEFLECTION in L2');
    // 5wL⁴/384EI = 5·12·6⁴/(384·210e6·8400e-8) m (textbook) = 11.4796 mm
    expect(words('.sp-asked')).toContain('11.4796 mm');
    expect(Array.from(root.querySelectorAll('.sp-second-left td'), (cell) => cell.textContent)).toContain(
      '36',
    );
    expect(root.querySelector('.sp-crosshair')?.getAttribute('aria-valuetext')).toContain(
      'Deflection 11.48 mm',
    );
  });

  test('another cell without a beam keeps the last one and says so; a beam cell shows its beam', async () => {
    await open('L2');
    port.selectCell('Z50');
    await settle();
    expect(words('.sp-sub')).toContain('the selected cell has no beam');
    expect(root.querySelectorAll('.sp-curve').length).toBe(4);
    port.selectCell('C6');
    await settle();
    expect(words('.sp-sub')).toContain('read as in L2');
  });

  test('held, the beam stays while other formulas are selected, and follows its own cells', async () => {
    await open('L2');
    port.fill('L3', [['=SPANROW.USED("pin 0; pin 1; EI value=1; uniform 0 1 1","span/1")']]);
    button('Hold').click();
    port.selectCell('L3');
    await settle();
    expect(words('.sp-title')).toBe('Beam B4:I10');
    port.fill('E10', [[24]]);
    port.changed();
    await settle();
    expect(words('.sp-asked')).toContain('22.9592 mm');
    button('Hold').click();
    await settle();
    expect(words('.sp-title')).toContain('written in the formula');
  });

  test('errors stand in words, with what can be sketched; they go when their cause goes', async () => {
    await open('L2', [...ROWS.slice(0, 3), ['pinn', 6], ...ROWS.slice(4)]);
    expect(words('.sp-wrong-box:not([hidden])')).toMatch(/Row 4.*pinn.*pin/s);
    expect(words('.sp-without')).toBe('Sketch without row 4.');
    expect(root.querySelectorAll('.sp-beam').length).toBe(1);
    port.fill('B7', [['pin']]);
    port.changed();
    await settle();
    expect(root.querySelector('.sp-wrong-box:not([hidden])')).toBeNull();
    expect(root.querySelectorAll('.sp-curve').length).toBe(4);
  });

  test('a call that cannot be followed is explained; the standing cautions are always there', async () => {
    await open('L2', ROWS, '=SPANROW.USED(INDIRECT("B4:I10"))');
    expect(words('.sp-wrong-box:not([hidden])')).toContain('INDIRECT(…)');
    expect(words('.sp-standing')).toContain('qualified engineer');
  });

  test('the crosshair moves by keys and reads all quantities', async () => {
    await open('L2');
    const cross = root.querySelector('.sp-crosshair') as HTMLElement;
    cross.focus();
    press(cross, 'Home');
    expect(cross.getAttribute('aria-valuetext')).toContain('at 0 m, Shear 36 kN, Bending moment 0 kN·m');
    press(cross, 'PageDown');
    expect(cross.getAttribute('aria-valuenow')).toBe('3');
    press(cross, 'ArrowRight', { shiftKey: true });
    expect(cross.getAttribute('aria-valuenow')).toBe('3.6');
    expect(words('.sp-part-moment .sp-reading')).toBe('51.84'); // wx(L−x)/2 = 12·3.6·2.4/2 (textbook)
  });

  test('several calls in one formula can be chosen', async () => {
    await open('L2', ROWS, '=SPANROW.MOMENT(B4:I10,2)+SPANROW.SHEAR(B4:I10,1)');
    expect(words('.sp-asked')).toContain('Bending moment at 2 m');
    const select = root.querySelector('.sp-which select') as HTMLSelectElement;
    select.value = '1';
    select.dispatchEvent(new Event('change'));
    await settle();
    expect(words('.sp-asked')).toContain('Shear at 1 m');
  });

  test("the host's theme and separators are taken over", async () => {
    await open('L2');
    port.setTheme({ dark: true, background: '#101010', text: '#fafafa' });
    expect([root.dataset['theme'], root.style.getPropertyValue('--sp-paper')]).toEqual(['dark', '#101010']);
    pane.dispose();
    port.numberSeparators = { decimal: ',', group: '.', list: ';' };
    pane = mountPane(document.getElementById('pane') as HTMLElement, port);
    await settle();
    root = document.querySelector('.sp-pane') as HTMLElement;
    expect(words('.sp-asked')).toContain('11,4796 mm');
  });
});

describe('rows', () => {
  beforeEach(async () => {
    await open('L2');
    tab('rows');
    await settle();
  });

  test('typing previews in the sketch and in words; only leaving the cell writes it', async () => {
    type('Row 7, Value', '20', false);
    expect(words('.sp-loads text')).toBe('Q 20 kN/m');
    expect(port.valueAt('E10')).toBe(12);
    type('Row 7, Unit', 'kN', false);
    expect(words('.sp-row-message')).toContain('Row 7');
    expect(port.valueAt('G10')).toBe('kN/m');
    press(field('Row 7, Unit'), 'Escape'); // closes the list
    press(field('Row 7, Unit'), 'Escape'); // takes the typing back
    expect(root.querySelector('.sp-row-message')).toBeNull();
    type('Row 7, Value', '20');
    await settle();
    expect(port.valueAt('E10')).toBe(20);
  });

  test('undo and redo write the sheet, too', async () => {
    type('Row 7, Value', '20');
    await settle();
    button('Undo').click();
    await settle();
    expect(port.valueAt('E10')).toBe(12);
    button('Redo').click();
    await settle();
    expect(port.valueAt('E10')).toBe(20);
  });

  test('quick typing over several cells: nothing typed is lost while earlier cells are still being written', async () => {
    const write = port.write.bind(port);
    port.write = async (...args) => {
      await settle(80); // a slow host
      return write(...args);
    };
    type('Row 7, Value', '20');
    type('Row 7, At', '1');
    await settle(100); // the first is written and read again, the second still on its way
    type('Row 7, To', '5', false);
    await settle(250);
    expect([port.valueAt('E10'), port.valueAt('C10')]).toEqual([20, 1]);
    expect(document.activeElement).toBe(field('Row 7, To'));
    expect(field('Row 7, To').value).toBe('5');
    field('Row 7, To').blur();
    await settle(200);
    expect(port.valueAt('D10')).toBe(5);
    button('Undo').click();
    await settle(200);
    expect([port.valueAt('D10'), port.valueAt('C10')]).toEqual([6, 1]);
  });

  test('an item that needs another column gets it, and the focus goes where it was going', async () => {
    field('Row 7, Item').focus();
    type('Row 7, Item', 'varying', false);
    field('Row 7, At').focus();
    await settle();
    expect(document.activeElement?.getAttribute('aria-label')).toBe('Row 7, At');
    expect(field('Row 7, End value')).toBeTruthy();
  });

  test('completion of item words by keys', async () => {
    type('Row 4, Item', 'ro', false);
    const options = Array.from(root.querySelectorAll('[role=option]'), (option) => option.textContent);
    expect(options[0]).toBe('roller');
    press(field('Row 4, Item'), 'ArrowDown');
    press(field('Row 4, Item'), 'Enter');
    field('Row 4, Item').blur();
    await settle();
    expect(port.valueAt('B7')).toBe('roller');
  });

  test('add, move, copy and remove reach the sheet; the range grows and its formulas follow', async () => {
    field('Row 7, Item').focus();
    button('Add a row').click();
    await settle();
    type('Row 8, Item', 'point');
    await settle();
    expect(port.formulaAt('L2')).toBe('=SPANROW.DEFLECTION(B4:I11, 3)');
    expect([port.valueAt('B10'), port.valueAt('B11')]).toEqual(['uniform', 'point']);
    type('Row 8, At', '2');
    type('Row 8, Value', '5');
    type('Row 8, Unit', 'kN');
    await settle();
    expect(root.querySelector('.sp-wrong-box:not([hidden])')).toBeNull();
    field('Row 8, Item').focus();
    button('Move this row up').click();
    await settle();
    expect([port.valueAt('B10'), port.valueAt('B11'), port.valueAt('E11')]).toEqual(['point', 'uniform', 12]);
    field('Row 7, Item').focus();
    button('Remove this row').click();
    await settle();
    expect([port.valueAt('B10'), port.valueAt('B11')]).toEqual(['uniform', null]);
  });

  test('cells below a full range are named before they move, and stay when the person says no', async () => {
    port.fill('C12', [['note of the checker']]);
    field('Row 7, Item').focus();
    button('Add a row').click();
    type('Row 8, Item', 'hinge');
    await settle();
    expect(words('[role=alertdialog]')).toContain('C12');
    button('Cancel').click();
    await settle();
    expect([port.valueAt('C12'), port.valueAt('B11')]).toEqual(['note of the checker', null]);
  });

  test('a block pasted from a sheet fills cells and adds rows', async () => {
    const input = field('Row 7, Item');
    input.focus();
    const event = new Event('paste', { bubbles: true, cancelable: true });
    Object.assign(event, { clipboardData: { getData: () => 'uniform\t0\t6\t5\npoint\t2\t\t7,5' } });
    input.dispatchEvent(event);
    await settle();
    expect([port.valueAt('E10'), port.valueAt('B11'), port.valueAt('C11'), port.valueAt('E11')]).toEqual([
      5,
      'point',
      2,
      '7,5',
    ]);
  });

  test('a formula in a cell is shown by its value, edited as a formula, and kept', async () => {
    port.fill('E10', [['=4*3']]);
    port.changed();
    await settle();
    const input = field('Row 7, Value');
    input.focus();
    expect(input.value).toBe('=4*3');
    input.blur();
    type('Row 7, Value', '=5*3');
    await settle();
    expect(port.formulaAt('E10')).toBe('=5*3');
  });

  test('rows written as text in one cell are edited as rows and written back as text', async () => {
    port.fill('N1', [['pin 0; pin 6; EI value=100; uniform 0 6 "2" case=G']]);
    port.fill('L3', [['=SPANROW.DEFLECTION(N1, 3)']]);
    port.selectCell('L3');
    await settle();
    type('Row 4, Value', '5');
    await settle();
    expect(port.valueAt('N1')).toBe('pin 0; pin 6; EI value=100; uniform 0 6 5 case=G');
  });
});

describe('place', () => {
  test('a formula goes into an empty cell at once, into a filled one only after a yes that names it', async () => {
    await open('L2');
    tab('place');
    port.selectCell('M2');
    await settle();
    button('Put it in M2').click();
    await settle();
    expect(port.formulaAt('M2')).toBe('=SPANROW.MAXDEFLECTION($B$4:$I$10)');
    port.fill('M3', [['mine']]);
    port.selectCell('M3');
    await settle();
    button('Put it in M3').click();
    await settle();
    expect(words('[role=alertdialog]')).toContain('M3');
    expect(port.valueAt('M3')).toBe('mine');
    button('Replace it').click();
    await settle();
    expect(port.formulaAt('M3')).toContain('SPANROW.MAXDEFLECTION');
  });

  test('x, combination and another sheet are composed into the formula', async () => {
    await open('L2');
    tab('place');
    port.selectCell('A1', 'Other');
    await settle();
    const [answer] = Array.from(root.querySelectorAll('select'));
    const set = (element: HTMLInputElement | HTMLSelectElement, value: string): void => {
      element.value = value;
      element.dispatchEvent(new Event('input', { bubbles: true }));
    };
    set(answer as HTMLSelectElement, 'MOMENT');
    const [x, combination] = Array.from(root.querySelectorAll<HTMLInputElement>('.sp-input'));
    set(x as HTMLInputElement, '3-');
    set(combination as HTMLInputElement, '1.5 Q');
    expect(words('.sp-code')).toBe('=SPANROW.MOMENT(Beams!$B$4:$I$10, "3-", "1.5 Q")');
  });

  test('a limit line is drawn only for the combination that is drawn', async () => {
    const rows = [
      ...ROWS,
      ['uniform', 0, 6, 5, null, 'kN/m', 'G'],
      ['limit', null, null, 'span/360', null, null, 'Q'],
    ];
    const lines = (): number => root.querySelectorAll('.sp-limit').length;
    await open('L2', rows, '=SPANROW.DEFLECTION(B4:I12, 3, "Q")');
    expect(lines()).toBe(1);
    // everything acts, the limit is on Q alone: its line would make the beam look worse than it is
    await open('L2', rows, '=SPANROW.DEFLECTION(B4:I12, 3)');
    expect(lines()).toBe(0);
    // a limit of the formula's own is tested under the formula's combination
    await open('L2', rows, '=SPANROW.USED(B4:I12, "span/300")');
    expect(lines()).toBe(1);
  });

  test('a record sheet holds rows, reading, reactions, extremes, working, date, version and cautions', async () => {
    await open('L2', [...ROWS, ['limit', null, null, 'span/360']], '=SPANROW.DEFLECTION(B4:I11, 3)');
    port.abilities.add('addSheet');
    const sheets = port.sheets;
    Object.assign(port, {
      addSheet: (name: string) => {
        sheets.set(name, new Map());
        return Promise.resolve(name);
      },
    });
    tab('place');
    port.selectCell('L2');
    await settle();
    button('Make a record sheet').click();
    await settle();
    const found = Array.from(sheets.get('Beam record')?.values() ?? [], (cell) => cell.value);
    for (const words of [
      'Beam calculation record',
      'Beams!B4:I11',
      '1 Jan 2030',
      'Reactions',
      'Largest values',
      'Working',
      'within',
    ]) {
      expect(found).toContain(words);
    }
    expect(found.some((value) => String(value).includes('qualified engineer'))).toBe(true);
    expect(found).toContain(36); // the reaction wL/2
    expect(words('.sp-status')).toContain('Beam record');
  });

  test('the answer cannot be put into the rows it is about', async () => {
    await open('L2');
    tab('place');
    port.selectCell('C6');
    await settle();
    expect(button('Put it in').disabled).toBe(true);
  });

  test('every starting point is a beam without an error, in every system of units', async () => {
    await open('Z1');
    for (const units of ['metric', 'american', 'none']) {
      const names = Array.from(root.querySelectorAll('.sp-card'), (card) => card.textContent ?? '');
      expect(names.length).toBe(8);
      for (const [i, name] of names.entries()) {
        port.selectCell(`K${20 + 20 * i}`, 'Other');
        await settle(10);
        const select = root.querySelector('.sp-block select') as HTMLSelectElement;
        if (root.querySelectorAll('.sp-block select').length > 1) throw new Error('more than one list');
        select.value = units;
        select.dispatchEvent(new Event('change'));
        port.sheets.get('Other')?.clear();
        button(name).click();
        await settle();
        port.selectCell(`K${22 + 20 * i}`, 'Other');
        await settle();
        expect([name, units, root.querySelector('.sp-wrong-box:not([hidden])')?.textContent]).toEqual([
          name,
          units,
          undefined,
        ]);
        expect(root.querySelectorAll('.sp-curve').length).toBe(4);
        pane.dispose();
        port.selectCell('Z1');
        pane = mountPane(document.getElementById('pane') as HTMLElement, port);
        await settle(10);
        root = document.querySelector('.sp-pane') as HTMLElement;
      }
    }
  }, 30_000);
});

describe('more of the beam', () => {
  const type2 = (element: HTMLInputElement, value: string): void => {
    element.value = value;
    element.dispatchEvent(new Event('change', { bubbles: true }));
  };

  test('the working: one region per stretch, its constants, and the conditions that fix them', async () => {
    await open('L2', [...ROWS, ['point', 2, null, 9, null, 'kN', 'Q']], '=SPANROW.DEFLECTION(B4:I11, 3)');
    tab('working');
    const regions = Array.from(root.querySelectorAll('.sp-region > summary'), (one) => one.textContent);
    expect(regions).toEqual([
      'Region 1: 0 m to 2 m',
      'Region 2: 2 m to 6 m',
      'Conditions that fix the constants',
    ]);
    // left reaction 12·6/2 + 9·4/6 = 42 kN (statics), so M(s) = 42 s − 6 s²
    const [first] = Array.from(root.querySelectorAll('.sp-equation'));
    expect(first?.textContent?.replace(/\s/g, '')).toBe('M(s)=42s−6s2kN·m');
    expect(root.querySelectorAll('math').length).toBeGreaterThan(10);
  });

  test('an envelope over typed combinations; a wrong one is explained; another beam forgets it', async () => {
    await open('L2');
    const [combinations] = Array.from(root.querySelectorAll<HTMLInputElement>('.sp-fold .sp-input'));
    type2(combinations as HTMLInputElement, '1 Q; -0.5 Q');
    expect(root.querySelectorAll('.sp-band').length).toBe(4);
    type2(combinations as HTMLInputElement, '1 Z');
    expect(words('.sp-wrong-box:not([hidden])')).toContain('Z');
    port.fill('N1', [['pin 0; pin 6; EI value=100; uniform 0 6 2']]);
    port.fill('L3', [['=SPANROW.DEFLECTION(N1, 3)']]);
    port.selectCell('L3');
    await settle();
    expect((combinations as HTMLInputElement).value).toBe('');
    expect(root.querySelectorAll('.sp-band').length).toBe(0);
  });

  test('an ENVELOPE formula draws its own band', async () => {
    await open('L2');
    port.fill('P1', [['Q'], ['-0.5 Q']]);
    port.fill('L4', [['=SPANROW.ENVELOPE(B4:I10,"moment",P1:P2)']]);
    port.selectCell('L4');
    await settle();
    expect(root.querySelectorAll('.sp-part-moment .sp-band').length).toBe(1);
  });

  test('a published limit is tried on the beam, shown with its source, and added as a row', async () => {
    await open('L2', ROWS, '=SPANROW.DEFLECTION(B4:I14, 3)');
    const select = root.querySelector('select[aria-label="Try a published limit"]') as HTMLSelectElement;
    select.value = '0';
    select.dispatchEvent(new Event('change'));
    expect(words('.sp-answers')).toContain('span/360');
    // 6000/360 = 16.67 mm allowed, 11.48 mm used: 68.9 %
    expect(words('.sp-used')).toContain('68.9 %');
    expect(words('.sp-panel')).toContain('Confirm with the code that governs.');
    button('Add as a limit row').click();
    await settle();
    expect([port.valueAt('B11'), port.valueAt('E11')]).toEqual(['limit', 'span/360']);
    expect(port.valueAt('I11')).toContain('IBC Table 1604.3');
  });

  test('a load is moved in the sketch by keys: its row follows, and undo brings it back', async () => {
    await open('L2', [...ROWS, ['point', 2, null, 9, null, 'kN', 'Q']], '=SPANROW.DEFLECTION(B4:I11, 3)');
    tab('rows');
    await settle();
    const handle = (): HTMLElement =>
      root.querySelector('.sp-handle[aria-label="Row 8, point, At"]') as HTMLElement;
    handle().focus();
    press(handle(), 'ArrowRight', { shiftKey: true });
    await settle();
    expect(port.valueAt('C11')).toBe(2.6);
    expect(document.activeElement).toBe(handle()); // the drawing is new, the focus is not lost
    press(handle(), 'ArrowLeft');
    await settle();
    expect(port.valueAt('C11')).toBe(2.55);
    button('Undo').click();
    button('Undo').click();
    await settle();
    expect(port.valueAt('C11')).toBe(2);
  });
});

test('tabs: arrow keys move, and the choice survives closing the pane', async () => {
  await open('L2');
  const first = root.querySelector('#sp-tab-beam') as HTMLElement;
  first.focus();
  press(first, 'ArrowRight');
  expect(root.querySelector('#sp-tab-rows')?.getAttribute('aria-selected')).toBe('true');
  expect(root.querySelector('[role=tabpanel]')?.getAttribute('aria-labelledby')).toBe('sp-tab-rows');
  pane.dispose();
  pane = mountPane(document.getElementById('pane') as HTMLElement, port);
  expect(document.querySelector('#sp-tab-rows')?.getAttribute('aria-selected')).toBe('true');
});

test('a host that refuses is quoted, and the pane goes on', async () => {
  await open('L2');
  const read = port.read.bind(port);
  port.read = () => Promise.reject(new Error('the sheet is protected'));
  port.selectCell('L2');
  await settle();
  expect(words('.sp-wrong-box:not([hidden])')).toContain('the sheet is protected');
  port.read = read;
  port.selectCell('L2');
  await settle();
  expect(root.querySelector('.sp-wrong-box:not([hidden])')).toBeNull();
});
