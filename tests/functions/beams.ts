/** Beams with answers worked by hand, for the tests of the worksheet functions. */
import { BLANK, rows } from './host';

const b = BLANK;

/**
 * A simple span of 6 m, EI = 210 GPa x 8360 cm4 = 17,556 kN·m², G = 12 kN/m and Q = 5 kN/m over the whole of it.
 * Midspan (closed forms, 5wL⁴/384EI and wL²/8): deflection of G 5·12·6⁴/(384·17556) m, moment of G 54 kN·m.
 */
export const SIMPLE = rows(
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 6],
  ['E', b, b, 210, b, 'GPa'],
  ['I', b, b, 8360, b, 'cm4'],
  ['uniform', 0, 6, 12, b, 'kN/m', 'G'],
  ['uniform', 0, 6, 5, b, 'kN/m', 'Q'],
  ['limit', b, b, 'span/300', b, b, 'G + Q'],
);
export const SIMPLE_EI = (210e6 * 8360) / 1e8; // kN/m² x m⁴ = kN·m²
/** deflection of a simple span of 6 m at midspan under w kN/m, in mm */
export const simpleMid = (w: number): number => ((5 * w * 6 ** 4) / (384 * SIMPLE_EI)) * 1000;

/** A cantilever of 2 with EI = 1000 and a tip force of 3, in one consistent system without units: tip PL³/3EI, end moment -PL. */
export const CANTILEVER = rows(['fixed', 0], ['point', 2, b, 3], ['EI', b, b, 1000]);

/** Two spans of 4 and an overhang of 1, a hinge, a couple, a settlement; every kind of jump. */
export const RICH = rows(
  ['# a remark'],
  ['units', 'kN', 'm', 'mm'],
  ['fixed', 0],
  ['pin', 4],
  ['roller', 8],
  [],
  ['hinge', 5],
  ['E', b, b, '200 GPa'],
  ['I', 0, 4, '8000 cm4'],
  ['I', 4, 9, '5000 cm4'],
  ['udl', 0, 8, '10 kN/m', b, b, 'G'],
  ['point', 9, b, 4, b, 'kN', 'Q'],
  ['couple', 2, b, 6, b, 'kN m', 'Q'],
  ['varying', 4, 8, 0, 6, 'kN/m', 'Q'],
  ['settlement', 4, b, 2, b, 'mm', 'S'],
);

/** A template of a simple span: names for the span, the load and the section. */
export const TEMPLATE = rows(
  ['units', 'kN', 'm', 'mm'],
  ['pin', 0],
  ['pin', 'L'],
  ['E', b, b, '210 GPa'],
  ['I', b, b, 'Iy', b, 'cm4'],
  ['uniform', 0, 'L', 'w', b, 'kN/m', 'G'],
);
export const TEMPLATE_NAMES = [['L', 'w', 'Iy']];
