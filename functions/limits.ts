/** CHECK, USED, REQUIREDI, STIFFNESSFACTOR and FREQUENCY: is the beam stiff enough, and how stiff must it be. */
import { ask, openBeam } from "../src/index";
import { type Shown, matrix, scalar } from "./host";

/**
 * Spills every span against every deflection limit: span, deflection, where, allowed, used fraction, span/deflection,
 * within or exceeded. Example: =SPANROW.CHECK(B4:I11, "span/360", "Q")
 * @customfunction CHECK
 * @helpurl https://localhost:3000/help/check.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [limit] "span/360", "20 mm" or a number in the deflection unit; it replaces the beam's limit rows. Left out: those rows.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: each limit row's own.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns A table with a header, one row per span and limit. Deflection is taken from the chord of the span's supports; an overhang or cantilever counts as twice its length (common practice).
 * @example =SPANROW.CHECK(B4:I11) every span against the limit rows of the beam
 * @example =SPANROW.CHECK(B4:I11, "span/250", "G + Q") every span against span/250 under G + Q
 */
export function check(
  beam: any[][],
  limit?: any,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): any[][] {
  return matrix<Shown>(() => ask.check(openBeam({ beam, combination, names, values }), limit));
}

/**
 * The worst used fraction of the deflection limits, one number for a schedule: above 1 a limit is exceeded.
 * Example: =SPANROW.USED(B4:I11, "span/360", "Q")
 * @customfunction USED
 * @helpurl https://localhost:3000/help/used.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [limit] "span/360", "20 mm" or a number in the deflection unit; it replaces the beam's limit rows. Left out: those rows.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: each limit row's own.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number: deflection divided by allowed deflection in the worst span under the worst limit.
 * @example =SPANROW.USED(Template, , , $A$1:$F$1, A2:F2) one member of a schedule, to be filled down
 */
export function used(
  beam: any[][],
  limit?: any,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.used(openBeam({ beam, combination, names, values }), limit));
}

/**
 * Second moment of area at which the deflection limit is just met, one I for the whole beam, in the unit of its I row.
 * Example: =SPANROW.REQUIREDI(B4:I11, "span/360")
 * @customfunction REQUIREDI
 * @helpurl https://localhost:3000/help/requiredi.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [limit] "span/360", "20 mm" or a number in the deflection unit; it replaces the beam's limit rows. Left out: those rows.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: each limit row's own.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number. #N/A when stiffness alone cannot meet the limit (a settlement, for one), or the beam has no one I.
 * @example =SPANROW.REQUIREDI(B4:I11, "span/360", "Q") the I that a section table must offer
 */
export function requiredI(
  beam: any[][],
  limit?: any,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.requiredI(openBeam({ beam, combination, names, values }), limit));
}

/**
 * Factor on every EI of the beam at which the deflection limit is just met: below 1 there is stiffness to spare.
 * Example: =SPANROW.STIFFNESSFACTOR(B4:I11, "span/360")
 * @customfunction STIFFNESSFACTOR
 * @helpurl https://localhost:3000/help/stiffnessfactor.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [limit] "span/360", "20 mm" or a number in the deflection unit; it replaces the beam's limit rows. Left out: those rows.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: each limit row's own.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number, for stepped and tapered beams too. #N/A when stiffness alone cannot meet the limit.
 * @example =SPANROW.STIFFNESSFACTOR(B4:I11) how much stiffer the beam must be for its own limit rows
 */
export function stiffnessFactor(
  beam: any[][],
  limit?: any,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.stiffnessFactor(openBeam({ beam, combination, names, values }), limit));
}

/**
 * Fundamental bending frequency in Hz by Rayleigh's method, the vertical loads of the combination taken as masses.
 * Needs a units row. Example: =SPANROW.FREQUENCY(B4:I11, "G + 0.1 Q")
 * @customfunction FREQUENCY
 * @helpurl https://localhost:3000/help/frequency.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [combination] Load combination whose vertical loads are the masses, such as "G + 0.1 Q". Left out: every load.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number, in Hz.
 * @example =SPANROW.FREQUENCY(B4:I11, "G + 0.1 Q") a floor beam with a tenth of its imposed load
 */
export function frequency(beam: any[][], combination?: any[][], names?: any[][], values?: any[][]): number {
  return scalar(() => ask.frequency(openBeam({ beam, combination, names, values })));
}
