/** The members of an invented covered market. Sections are ordinary sizes given as plain numbers; loads are of the usual order. */
import type { Member } from './member';

const CAUTION =
  'Linear elastic, small deflections. Limits, loads and combinations are for the engineer and the governing code to decide.';

export const canopy: Member = {
  id: 'canopy',
  sheet: 'Canopy beam',
  title: 'Canopy beam over the main gate',
  mark: 'C-01',
  about: 'Rolled steel, simply supported, 9.0 m. Carries the roof, a sign board, and wind from below.',
  rows: [
    ['units', 'kN', 'm', 'mm', null, null, null, 'forces, lengths, deflections'],
    ['pin', 0, null, null, null, null, null, 'on column A1'],
    ['pin', 9, null, null, null, null, null, 'on column A2'],
    ['E', null, null, 210, null, 'GPa'],
    ['I', null, null, 23130, null, 'cm4', null, 'rolled section about 400 mm deep'],
    ['uniform', null, null, 4.2, null, 'kN/m', 'G', 'glass roof and own weight'],
    ['point', 3.6, null, 8, null, 'kN', 'G', 'sign board'],
    ['uniform', null, null, 6, null, 'kN/m', 'S', 'snow'],
    ['uniform', null, null, -7.5, null, 'kN/m', 'W', 'wind from below'],
    ['limit', null, null, 'span/360', null, null, 'S', 'snow alone'],
    ['limit', null, null, 'span/250', null, null, 'G + S', 'sag of the finished roof'],
  ],
  results: [
    {
      label: 'Deflection at the sign board, G + S',
      formula: '=SPANROW.DEFLECTION({beam},3.6,"G + S")',
      unit: 'mm',
      pattern: '0.0',
      note: 'at x = 3.6 m',
    },
    {
      label: 'Largest deflection, G + S',
      formula: '=SPANROW.MAXDEFLECTION({beam},"G + S")',
      unit: 'mm',
      pattern: '0.0',
    },
    {
      label: 'where',
      formula: '=SPANROW.PEAK({beam},"deflection","largest","position","G + S")',
      unit: 'm',
      pattern: '0.00',
    },
    {
      label: 'Largest lift, G + W',
      formula: '=SPANROW.PEAK({beam},"deflection","lowest","value","G + W")',
      unit: 'mm',
      pattern: '0.0',
      note: 'negative: upward',
    },
    {
      label: 'Largest moment, 1.35 G + 1.5 S',
      formula: '=SPANROW.PEAK({beam},"moment","highest","value","1.35 G + 1.5 S")',
      unit: 'kN·m',
      pattern: '0.0',
    },
    {
      label: 'Limits used',
      formula: '=SPANROW.USED({beam})',
      unit: '',
      pattern: '0%',
      note: 'worst of the limit rows',
    },
    {
      label: 'I that would just do',
      formula: '=SPANROW.REQUIREDI({beam})',
      unit: 'cm4',
      pattern: '#,##0',
      note: 'for the next size down',
    },
  ],
  tables: [
    { heading: 'Check of the limits', formula: '=SPANROW.CHECK({beam})', lines: 4, pattern: '0.00' },
    { heading: 'Reactions, G + S', formula: '=SPANROW.REACTIONS({beam},"G + S")', lines: 4, pattern: '0.0' },
  ],
  notes: [CAUTION, 'Straw-coloured cells are input. Change one and every result follows.'],
};

export const purlin: Member = {
  id: 'purlin',
  sheet: 'Purlin',
  title: 'Roof purlin, three spans',
  mark: 'P-01',
  about: 'Continuous over three bays of 5.0, 5.5 and 5.0 m. Snow may lie on any bay.',
  rows: [
    ['units', 'kN', 'm', 'mm'],
    ['pin', 0, null, null, null, null, null, 'frame 1'],
    ['pin', 5, null, null, null, null, null, 'frame 2'],
    ['pin', 10.5, null, null, null, null, null, 'frame 3'],
    ['pin', 15.5, null, null, null, null, null, 'frame 4'],
    ['E', null, null, 210, null, 'GPa'],
    ['I', null, null, 420, null, 'cm4', null, 'hollow section about 140 mm deep'],
    ['uniform', null, null, 1.1, null, 'kN/m', 'G', 'covering and own weight'],
    ['uniform', null, null, 2.4, null, 'kN/m', 'S', 'snow, full'],
    ['limit', null, null, 'span/250', null, null, 'G + S', 'full snow'],
  ],
  results: [
    {
      label: 'Largest deflection, G + S',
      formula: '=SPANROW.MAXDEFLECTION({beam},"G + S")',
      unit: 'mm',
      pattern: '0.0',
    },
    {
      label: 'where',
      formula: '=SPANROW.PEAK({beam},"deflection","largest","position","G + S")',
      unit: 'm',
      pattern: '0.00',
    },
    {
      label: 'Middle of the middle bay, G + S',
      formula: '=SPANROW.DEFLECTION({beam},7.75,"G + S")',
      unit: 'mm',
      pattern: '0.0',
      note: 'at x = 7.75 m',
    },
    {
      label: 'Hogging moment over frame 2, G + S',
      formula: '=SPANROW.MOMENT({beam},5,"G + S")',
      unit: 'kN·m',
      pattern: '0.00',
      note: 'negative: hogging',
    },
    {
      label: 'Reaction at frame 2, G + S',
      formula: '=SPANROW.REACTION({beam},5,"force","G + S")',
      unit: 'kN',
      pattern: '0.0',
    },
    { label: 'Limits used', formula: '=SPANROW.USED({beam})', unit: '', pattern: '0%' },
  ],
  tables: [
    { heading: 'Check of the limits', formula: '=SPANROW.CHECK({beam})', lines: 5, pattern: '0.00' },
    { heading: 'Reactions, G + S', formula: '=SPANROW.REACTIONS({beam},"G + S")', lines: 6, pattern: '0.00' },
    {
      heading: 'Deflection with snow on any bays: lowest and highest',
      formula: '=SPANROW.ENVELOPE({beam},"deflection","G + S","S",4)',
      lines: 18,
      pattern: '0.00',
    },
  ],
  notes: [CAUTION, 'The last table lets the snow (case S) lie only where it makes things worse, bay by bay.'],
};

export const bracket: Member = {
  id: 'bracket',
  sheet: 'Tapered bracket',
  title: 'Tapered bracket of the side awning',
  mark: 'B-01',
  about:
    'Plated steel cantilever, full depth at the column, half the depth at the tip. I falls with the cube of the depth.',
  given: [
    ['L', 2.4, 'm', 'length from the column face'],
    ['I0', 3200, 'cm4', 'second moment of area at the column'],
    ['P', 14, 'kN', 'tie of the awning'],
  ],
  rows: [
    ['units', 'kN', 'm', 'mm'],
    ['fixed', 0, null, null, null, null, null, 'welded to the column'],
    ['E', null, null, 210, null, 'GPa'],
    ['I', 0, 'L', 'I0*(1-0.5*x/L)^3', null, 'cm4', null, 'taper to half the depth'],
    ['uniform', 0, 'L', 2.5, null, 'kN/m', 'G', 'awning and own weight'],
    ['point', 'L', null, 'P', null, 'kN', 'Q', 'at the tip'],
    ['limit', null, null, 'span/180', null, null, 'G + Q', 'cantilever: twice its length counts'],
  ],
  results: [
    {
      label: 'Deflection of the tip, G + Q',
      formula: '=SPANROW.MAXDEFLECTION({beam},"G + Q",{names},{values})',
      unit: 'mm',
      pattern: '0.0',
    },
    {
      label: 'Slope of the tip, G + Q',
      formula: '=SPANROW.SLOPE({beam},$C$6,"G + Q",{names},{values})*1000',
      unit: 'mrad',
      pattern: '0.00',
    },
    {
      label: 'Fixing moment, G + Q',
      formula: '=SPANROW.MOMENT({beam},0,"G + Q",{names},{values})',
      unit: 'kN·m',
      pattern: '0.0',
      note: 'negative: hogging',
    },
    {
      label: 'Limit used',
      formula: '=SPANROW.USED({beam},,"G + Q",{names},{values})',
      unit: '',
      pattern: '0%',
    },
    {
      label: 'Stiffness factor that would just do',
      formula: '=SPANROW.STIFFNESSFACTOR({beam},,"G + Q",{names},{values})',
      unit: '',
      pattern: '0.00',
    },
  ],
  tables: [
    {
      heading: 'Deflected shape in fifths',
      formula: '=SPANROW.PROFILE({beam},6,"G + Q",{names},{values})',
      lines: 9,
      pattern: '0.0000',
    },
  ],
  notes: [
    CAUTION,
    'The names at the top stand in the rows as text: change L, and the supports, loads and taper follow.',
  ],
};

export const gallery: Member = {
  id: 'gallery',
  sheet: 'Gallery',
  title: 'Gallery beam with overhang',
  mark: 'G-01',
  about:
    'Glued laminated timber 140 x 420 mm, span 6.4 m, overhang 1.8 m to the balustrade. Shear deformation included.',
  rows: [
    ['units', 'kN', 'm', 'mm'],
    ['pin', 0, null, null, null, null, null, 'wall'],
    ['pin', 6.4, null, null, null, null, null, 'post'],
    ['E', null, null, 12.5, null, 'GPa', null, 'mean value'],
    ['I', null, null, 86436, null, 'cm4', null, '140 x 420 mm'],
    ['GA', null, null, 31850, null, 'kN', null, '5/6 of the area, shear modulus 0.65 GPa'],
    ['uniform', 0, 8.2, 2.9, null, 'kN/m', 'G', 'floor and own weight'],
    ['point', 8.2, null, 1.2, null, 'kN', 'G', 'balustrade'],
    ['uniform', 0, 6.4, 6, null, 'kN/m', 'Qs', 'people on the span'],
    ['uniform', 6.4, 8.2, 6, null, 'kN/m', 'Qo', 'people on the overhang'],
    ['limit', null, null, 'span/300', null, null, 'Qs', 'on load on the span'],
    ['limit', null, null, 'span/300', null, null, 'Qo', 'on load on the overhang'],
    ['limit', null, null, 'span/200', null, null, '1.6 G + Qs', 'with creep of 0.6 on the permanent load'],
  ],
  results: [
    {
      label: 'Span, largest sag, G + Qs',
      formula: '=SPANROW.PEAK({beam},"deflection","highest","value","G + Qs")',
      unit: 'mm',
      pattern: '0.0',
    },
    {
      label: 'The same with creep, 1.6 G + Qs',
      formula: '=SPANROW.PEAK({beam},"deflection","highest","value","1.6 G + Qs")',
      unit: 'mm',
      pattern: '0.0',
    },
    {
      label: 'Tip of the overhang, G + Qo',
      formula: '=SPANROW.DEFLECTION({beam},8.2,"G + Qo")',
      unit: 'mm',
      pattern: '0.0',
    },
    {
      label: 'Tip of the overhang, G + Qs',
      formula: '=SPANROW.DEFLECTION({beam},8.2,"G + Qs")',
      unit: 'mm',
      pattern: '0.0',
      note: 'negative: upward',
    },
    {
      label: 'Reaction at the post, G + Qs + Qo',
      formula: '=SPANROW.REACTION({beam},6.4,"force","G + Qs + Qo")',
      unit: 'kN',
      pattern: '0.0',
    },
    {
      label: 'Hogging over the post, G + Qs + Qo',
      formula: '=SPANROW.PEAK({beam},"moment","lowest","value","G + Qs + Qo")',
      unit: 'kN·m',
      pattern: '0.0',
    },
    {
      label: 'Fundamental frequency, G',
      formula: '=SPANROW.FREQUENCY({beam},"G")',
      unit: 'Hz',
      pattern: '0.0',
      note: "Rayleigh's method, permanent load as mass",
    },
    {
      label: 'Limits used',
      formula: '=SPANROW.USED({beam})',
      unit: '',
      pattern: '0%',
      note: 'worst of the limit rows',
    },
  ],
  tables: [
    { heading: 'Check of the limits', formula: '=SPANROW.CHECK({beam})', lines: 8, pattern: '0.00' },
    { heading: 'How the rows were read', formula: '=SPANROW.READBACK({beam})', lines: 24, head: false },
  ],
  notes: [CAUTION],
};

export const dock: Member = {
  id: 'dock',
  sheet: 'Loading dock (US)',
  title: 'Loading dock girder',
  mark: 'D-01',
  about: 'The same rows in kip, ft and in: rolled steel, 30 ft, with a hoist at 12 ft.',
  rows: [
    ['units', 'kip', 'ft', 'in'],
    ['pin', 0],
    ['pin', 30],
    ['E', null, null, 29000, null, 'ksi'],
    ['I', null, null, 1350, null, 'in4', null, 'rolled section about 24 in deep'],
    ['uniform', null, null, 0.6, null, 'klf', 'D', 'slab and own weight'],
    ['uniform', null, null, 0.9, null, 'klf', 'L', 'goods'],
    ['point', '12\'-6"', null, 9, null, 'kip', 'L', 'hoist'],
    ['limit', null, null, 'span/360', null, null, 'L'],
    ['limit', null, null, 'span/240', null, null, 'D + L'],
  ],
  results: [
    {
      label: 'Largest deflection, D + L',
      formula: '=SPANROW.MAXDEFLECTION({beam},"D + L")',
      unit: 'in',
      pattern: '0.00',
    },
    {
      label: 'Largest deflection, L',
      formula: '=SPANROW.MAXDEFLECTION({beam},"L")',
      unit: 'in',
      pattern: '0.00',
    },
    {
      label: 'Largest moment, 1.2 D + 1.6 L',
      formula: '=SPANROW.PEAK({beam},"moment","highest","value","1.2 D + 1.6 L")',
      unit: 'kip·ft',
      pattern: '0',
    },
    { label: 'Limits used', formula: '=SPANROW.USED({beam})', unit: '', pattern: '0%' },
  ],
  tables: [
    { heading: 'Check of the limits', formula: '=SPANROW.CHECK({beam})', lines: 4, pattern: '0.00' },
    { heading: 'Reactions, D + L', formula: '=SPANROW.REACTIONS({beam},"D + L")', lines: 4, pattern: '0.0' },
  ],
  notes: [CAUTION],
};
