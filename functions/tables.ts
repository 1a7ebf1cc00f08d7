/** PROFILE, REGIONS and READBACK: a beam laid out in cells, for a chart, for a checker, for the one who wrote the rows. */
import { ask, openBeam } from "../src/index";
import { type Shown, matrix } from "./host";

/**
 * Spills x, shear, moment, slope and deflection along the beam, ready for a chart; every jump appears twice.
 * Example: =SPANROW.PROFILE(B4:I11, 40)
 * @customfunction PROFILE
 * @helpurl https://localhost:3000/help/profile.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [points] How many equally spaced positions to give at least; every support, load end and jump is added. Left out: 41.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns Five columns with a header: x, shear, moment, slope, deflection.
 * @example =SPANROW.PROFILE(B4:I11) all four diagrams with every load acting
 * @example =SPANROW.PROFILE(B4:I11, 100, "G + 0.3 Q") the same on a finer division under one combination
 */
export function profile(
  beam: any[][],
  points?: any,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): any[][] {
  return matrix<Shown>(() => ask.profile(openBeam({ beam, combination, names, values }), points));
}

/**
 * Spills the double integration for a checker to follow: regions, EI, load, M(s), constants, slope and deflection
 * equations. Example: =SPANROW.REGIONS(B4:I11)
 * @customfunction REGIONS
 * @helpurl https://localhost:3000/help/regions.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns A table of text and numbers; s is measured from each region's left end.
 * @example =SPANROW.REGIONS(B4:I11, "G + Q") the working of one combination
 */
export function regions(beam: any[][], combination?: any[][], names?: any[][], values?: any[][]): any[][] {
  return matrix<Shown>(() => ask.regions(openBeam({ beam, combination, names, values })));
}

/**
 * Spills one sentence per row: how it was read, in which units and direction; then cautions. Errors come as text, so
 * this never fails. Example: =SPANROW.READBACK(B4:I11)
 * @customfunction READBACK
 * @helpurl https://localhost:3000/help/readback.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns Text, one sentence per row of the beam, then what is ignored, then cautions.
 * @example =SPANROW.READBACK(B4:I11) read your own beam back before you trust its numbers
 */
export function readback(beam: any[][], names?: any[][], values?: any[][]): any[][] {
  return matrix<Shown>(() => ask.readback({ beam, names, values }));
}
