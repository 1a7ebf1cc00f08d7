/** DEFLECTION, SLOPE, MOMENT, SHEAR: one diagram of the beam, read at one position or at a range of them. */
import { ask, openBeam } from "../src/index";
import { spread } from "./host";

/**
 * Deflection of a beam at x, in the deflection unit of its units row, positive along its y axis (down unless an
 * axis row says up). Example: =SPANROW.DEFLECTION(B4:I11, 3.6)
 * @customfunction DEFLECTION
 * @helpurl https://localhost:3000/help/deflection.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param x Position along the beam: a number, text such as "3.5 m", or "3-" and "3+" for the two sides of a jump. A range gives one result per cell.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns The deflection at each x, in the shape of x.
 * @example =SPANROW.DEFLECTION(B4:I11, 3.6) the deflection 3.6 from the origin, every load acting
 * @example =SPANROW.DEFLECTION(B4:I11, K4:K14, "G + 0.3 Q") spills the deflections at the positions in K4:K14
 * @example =SPANROW.DEFLECTION(Template, 2, , $A$1:$F$1, A2:F2) one member of a schedule, to be filled down
 */
export function deflection(
  beam: any[][],
  x: any[][],
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number[][] {
  return spread(() => ask.value(openBeam({ beam, combination, names, values }), "deflection", x));
}

/**
 * Slope of a beam at x in radians (dv/dx; the rotation of the cross-section when GA is given), clockwise positive
 * unless an axis row says up. Example: =SPANROW.SLOPE(B4:I11, 0)
 * @customfunction SLOPE
 * @helpurl https://localhost:3000/help/slope.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param x Position along the beam: a number, text such as "3.5 m", or "3-" and "3+" for the two sides of a hinge. A range gives one result per cell.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns The slope at each x, in the shape of x.
 * @example =SPANROW.SLOPE(B4:I11, 0) the rotation over a support at 0
 * @example =SPANROW.SLOPE(B4:I11, "4-") the slope just left of a hinge at 4
 */
export function slope(
  beam: any[][],
  x: any[][],
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number[][] {
  return spread(() => ask.value(openBeam({ beam, combination, names, values }), "slope", x));
}

/**
 * Bending moment of a beam at x, positive when it sags, in force times length of its units row.
 * Example: =SPANROW.MOMENT(B4:I11, 3)
 * @customfunction MOMENT
 * @helpurl https://localhost:3000/help/moment.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param x Position along the beam: a number, text such as "3.5 m", or "3-" and "3+" for the two sides of a couple. A range gives one result per cell.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns The bending moment at each x, in the shape of x.
 * @example =SPANROW.MOMENT(B4:I11, 3, "1.35 G + 1.5 Q") the bending moment at 3 under that combination
 * @example =SPANROW.MOMENT(B4:I11, "2-") the bending moment just left of a couple at 2
 */
export function moment(
  beam: any[][],
  x: any[][],
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number[][] {
  return spread(() => ask.value(openBeam({ beam, combination, names, values }), "moment", x));
}

/**
 * Shear force of a beam at x (dM/dx: positive when it pushes the left part up), in the force unit of its units row.
 * Example: =SPANROW.SHEAR(B4:I11, "3-")
 * @customfunction SHEAR
 * @helpurl https://localhost:3000/help/shear.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param x Position along the beam: a number, text such as "3.5 m", or "3-" and "3+" for the two sides of a support or a point load. A range gives one result per cell.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns The shear force at each x, in the shape of x.
 * @example =SPANROW.SHEAR(B4:I11, 0) the shear force at the left end
 * @example =SPANROW.SHEAR(B4:I11, "3-")-SPANROW.SHEAR(B4:I11, "3+") the force that acts on the beam at 3
 */
export function shear(
  beam: any[][],
  x: any[][],
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number[][] {
  return spread(() => ask.value(openBeam({ beam, combination, names, values }), "shear", x));
}
