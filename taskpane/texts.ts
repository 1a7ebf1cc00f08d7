/** Every text of the pane, in one place, ready to be translated. Sentences about the beam's rows come from the engine. */

const plural = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

export const texts = {
  quantity: { shear: 'Shear', moment: 'Bending moment', slope: 'Slope', deflection: 'Deflection' },

  drawing: {
    caption: (name: string, unit: string) => (unit === '' ? name : `${name}, ${unit}`),
    valueAt: (value: string, at: string) => `${value} at ${at}`,
    fromTo: (start: string, end: string) => `${start} to ${end}`,
    bothSides: (left: string, right: string) => `${left} | ${right}`,
    zeroEverywhere: (name: string) => `${name} is zero everywhere`,
    loadTitle: (row: number, what: string) => `Row ${row}: ${what}`,
    axial: (value: string, tension: boolean) => `${tension ? 'tension' : 'compression'} ${value}`,
    camber: (value: string) => `camber ${value}`,
    curvature: (value: string) => `curvature ${value}`,
    settlement: (value: string) => `moves ${value}`,
    rotation: (value: string) => `turns ${value}`,
    notActing: (name: string) => `${name} not acting`,
    times: (name: string, factor: string) => `${name} × ${factor}`,
    crosshair: 'Position along the beam',
    atPosition: (x: string) => `at ${x}`,
    summary: (length: string, supports: number, loads: number) =>
      `Beam of length ${length}, ${plural(supports, 'support', 'supports')}, ${plural(loads, 'load', 'loads')}.`,
    summaryPeak: (name: string, value: string, at: string) =>
      `Largest ${name.toLowerCase()} ${value} at ${at}.`,
  },

  columns: {
    Item: 'Item',
    At: 'At',
    To: 'To',
    Value: 'Value',
    'End value': 'End value',
    Unit: 'Unit',
    Case: 'Case',
    Note: 'Note',
  },

  tabs: { beam: 'Beam', rows: 'Rows', working: 'Working', place: 'Place' },
  tabList: 'Views of the beam',

  head: {
    beam: 'Beam',
    noBeam: 'No beam selected',
    selectRows: (address: string) => `Select ${address} in the sheet`,
    inFormula: 'written in the formula',
    joined: 'joined in the formula',
    askedIn: (fn: string, cell: string) => `${fn} in ${cell}`,
    withRows: (cell: string) => `read as in ${cell}`,
    found: 'rows that no formula on this sheet uses yet',
    kept: 'shown before; the selected cell has no beam',
    held: 'held; other cells may be selected',
    hold: 'Hold',
    holdHint: 'Keep this beam while other cells are selected',
    which: 'Which of the beams in this formula',
    combination: (text: string) => `Combination ${text}`,
    everything: 'Every load acts',
    read: 'Cells read',
  },

  empty: {
    title: 'Select a cell whose formula asks about a beam, or a cell inside beam rows.',
    start: 'Or start a beam at the selected cell:',
  },

  lost: {
    title: (cell: string) => `The formula in ${cell} asks about a beam that the pane cannot follow.`,
    function: (what: string) =>
      `Its beam or an argument is worked out by ${what}(…). Give the cells directly, by a name, or by a table to see the beam here. The cell's own result is not affected.`,
    name: (what: string) => `There is no name or table "${what}" in this workbook.`,
    table: (what: string) => `There is no table "${what}" in this workbook.`,
    column: (what: string) => `There is no column ${what}.`,
    sheet: (what: string) => `There is no sheet "${what}" in this workbook.`,
    error: (what: string) => `An argument is ${what}.`,
    operator: (what: string) => `An argument uses "${what}" in a way the pane does not work out.`,
    shape: () => 'A range stands where a single value is expected.',
    deep: (what: string) => `The name "${what}" refers to itself.`,
  },

  messages: {
    title: 'What is wrong',
    cautions: (count: number) => plural(count, 'caution', 'cautions'),
    more: (count: number) => `and ${count} more`,
    row: (words: string) => words,
    hostFailed: (host: string, why: string) => `${host === '' ? 'The workbook' : host} refused: ${why}`,
    sketch: (rows: string) => `Sketch without ${rows}.`,
    sketchRows: (rows: readonly number[]) => `${rows.length === 1 ? 'row' : 'rows'} ${rows.join(', ')}`,
    sketchStiffness: 'the stiffness',
    drawing: 'The rows are in order, but the beam has no answer; it is drawn as far as it is known.',
  },

  standing:
    'Linear elastic theory for small deflections. For review by a qualified engineer: local codes and licensed practice decide limits, loads and combinations.',

  view: {
    options: 'Drawing options',
    show: 'Show',
    enlarge: 'Enlarge',
    none: 'none',
    below: 'Moment on the tension side (sagging below)',
    momentBelow: 'Bending moment is drawn on the tension side: sagging below the line.',
    momentAbove: 'Bending moment is drawn with sagging above the line.',
    exaggerated: (factor: string) => `Deflection is drawn ${factor} times larger than the beam.`,
    reduced: (factor: string) => `Deflection is drawn at ${factor} of its true size.`,
    depth: 'The depth of the strip follows the bending stiffness.',
    envelope: 'Envelope over',
    combinationsHint: '1.35 G + 1.5 Q; G + W',
    pattern: 'Span by span',
    patternHint: 'cases, e.g. Q',
    bands: 'The band behind each diagram is the envelope.',
    keys: 'Arrow keys move along the beam, Page Up and Page Down go to the next support, load or peak.',
    saveSvg: 'Save as SVG',
    savePng: 'Save as PNG',
    placePicture: 'Place in the sheet',
    pictureDone: 'The drawing stands at the selected cell, with a description for those who cannot see it.',
    fileName: 'beam',
  },

  answers: {
    asked: 'Asked',
    askedAt: (quantity: string, x: string) => `${quantity} at ${x}`,
    extremes: 'Largest values',
    quantity: 'Quantity',
    lowest: 'Lowest',
    highest: 'Highest',
    at: 'at',
    reactions: 'Reactions',
    position: 'At',
    support: 'Support',
    force: 'Force',
    couple: 'Couple',
    signs: (deflection: string) => `Force positive upward on the beam; deflection ${deflection}.`,
    limits: 'Deflection limits',
    span: 'Span',
    deflection: 'Deflection',
    allowed: 'Allowed',
    used: 'Used',
    usedBar: (percent: string, exceeded: boolean) =>
      `${percent} of the limit used${exceeded ? ', exceeded' : ''}`,
    noLimit: 'No limit row in this beam. Add a row such as "limit, span/360" to see the used fraction here.',
    fromChord:
      'Deflection of a span is measured from the line between its supports; an overhang counts as twice its length.',
    section: 'Section',
    stretch: 'Stretch',
    stiffness: 'EI',
    selfCheck: 'Self-check',
    residuals: (equilibrium: string, conditions: string) =>
      `Equilibrium holds to ${equilibrium}, support conditions to ${conditions} of their own size.`,
  },

  limits: {
    title: 'Published limits',
    pick: 'Try a published limit',
    none: 'the limits of the beam itself',
    facts: (source: string, member: string, load: string) => `${source}: ${member}; load: ${load}.`,
    status: {
      seen: 'The value was read on a public page.',
      memory: 'The value is recalled, not confirmed.',
    },
    confirm: 'Confirm with the code that governs.',
    add: 'Add as a limit row',
  },

  handles: {
    label: (row: number, item: string, column: string) => `Row ${row}, ${item}, ${column}`,
    hint: 'Drag, or use the arrow keys; with Shift in steps ten times as large.',
  },

  working: {
    intro: (down: boolean, combination: string) =>
      `Double integration with y ${down ? 'down' : 'up'}, region by region; s is measured from the left end of each region.${combination === '' ? '' : ` Combination ${combination}.`}`,
    law: (down: boolean) => (down ? 'EI v″ = −M(s)' : 'EI v″ = M(s)'),
    region: (index: number, from: string, to: string) => `Region ${index}: ${from} to ${to}`,
    stiffness: 'EI',
    load: 'Load w(s)',
    none: 'none',
    constants: 'Constants',
    notPolynomial:
      'M/EI has no polynomial integral here. The solved curves are given as polynomials fitted to them; the largest departure is stated.',
    departure: (size: string) => `within ${size}`,
    conditions: 'Conditions that fix the constants',
    condition: 'Condition',
    left: 'Left side',
    right: 'Right side',
    over: 'Left over',
    copy: 'Copy as text',
    copied: 'The working is on the clipboard, ready to be pasted into cells.',
    cannotCopy:
      'This host does not let the pane use the clipboard. REGIONS puts the same working into cells.',
    unfold: 'Open all',
    fold: 'Close all',
    noAnswer: 'There is no working: the beam has no answer yet.',
  },

  rows: {
    table: 'Rows of the beam',
    toolbar: 'Change rows',
    rowNumber: 'Row',
    cell: (row: number, column: string) => `Row ${row}, ${column}`,
    choices: (column: string) => `Choices for ${column}`,
    actions: {
      add: { label: 'Add', hint: 'Add a row below (Alt+Insert, or Enter in the last row)' },
      copy: { label: 'Copy', hint: 'Copy this row below itself' },
      up: { label: '↑', hint: 'Move this row up (Alt+Up arrow)' },
      down: { label: '↓', hint: 'Move this row down (Alt+Down arrow)' },
      remove: { label: 'Remove', hint: 'Remove this row (Alt+Delete)' },
      undo: { label: '↶', hint: 'Undo the last step here (Ctrl+Z)' },
      redo: { label: '↷', hint: 'Redo (Ctrl+Y)' },
    },
    allColumns: 'All columns',
    undoLabel: 'Change beam rows',
    readOnlyFormula:
      'These rows are written inside the formula. Place them as rows in the sheet to edit them here.',
    readOnlyJoined: 'These rows are put together by the formula and are shown as read.',
    missing: (columns: string) => `This range has no column for ${columns}.`,
    moveDown: (range: string, cells: string, rows: number) =>
      `${range} has no free row. Making room moves ${cells} down by ${rows} ${rows === 1 ? 'row' : 'rows'}; formulas that refer to these cells follow.`,
    moveDownYes: 'Move them down',
    replaceBelow: (range: string, cells: string) =>
      `${range} has no free row, and ${cells} below it would be replaced.`,
    replaceYes: 'Replace them',
    written: (address: string) => `Written to ${address}.`,
    extendRange: (from: string, to: string) =>
      `The rows now take ${to}; formulas that name ${from} do not see the new row yet.`,
  },

  ask: { cancel: 'Cancel' },

  place: {
    formula: 'Formula at the selected cell',
    start: 'New beam at the selected cell',
    quantity: 'Answer',
    x: 'Position x',
    combination: 'Combination',
    everything: 'every load acts',
    preview: 'Formula',
    put: (cell: string) => `Put it in ${cell}`,
    putHere: 'Put it in the selected cell',
    noBeamYet: 'Select a beam first; then pick the cell for its answer.',
    inBeam: 'The selected cell is one of the beam’s own rows. Select another cell for the answer.',
    units: 'Units',
    own: 'no units row',
    placeRows: (what: string) => `Place rows: ${what}`,
    occupied: (cells: string) => `Something stands in ${cells} already.`,
    replace: 'Replace it',
    done: (address: string) => `Placed in ${address}.`,
    typical: 'The numbers are only a start: change them to your own.',
    answers: {
      MAXDEFLECTION: 'Largest deflection',
      DEFLECTION: 'Deflection at x',
      SLOPE: 'Slope at x',
      MOMENT: 'Bending moment at x',
      SHEAR: 'Shear at x',
      PEAK: 'Largest bending moment',
      REACTION: 'Reaction at x',
      REACTIONS: 'All reactions (spills)',
      USED: 'Used part of the limit',
      CHECK: 'Check against limits (spills)',
      PROFILE: 'Diagram values (spills)',
      READBACK: 'How each row was read (spills)',
    },
    arrangements: {
      simple: 'Simple span',
      cantilever: 'Cantilever',
      propped: 'Propped cantilever',
      fixed: 'Built-in span',
      two: 'Two equal spans',
      three: 'Three equal spans',
      overhang: 'Span with overhang',
      hinged: 'Two spans with a hinge',
    },
  },

  start: {
    noHost:
      'This page is the side pane of a spreadsheet and shows beams only there. To use it without one, open the workbench.',
    waiting:
      'The spreadsheet has not answered yet. The functions in the cells are not affected; closing and opening the pane tries again.',
  },

  status: { working: 'Reading the cells …' },
} as const;
