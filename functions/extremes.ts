/** MAXDEFLECTION, PEAK, ENVELOPE, INFLUENCE, ROLLING: the worst of a beam, over x, over combinations, over moving loads. */
import { ask, openBeam } from "../src/index";
import { type Shown, matrix, scalar } from "./host";

// The words below only feed autocompletion; the generator wants them in the file that uses them. A word the reader
// types arrives as it is typed, and the engine is the one that knows the words.

/**
 * Which diagram of the beam is asked for.
 * @customenum {string}
 */
enum Quantity {
  /** Deflection along the y axis, in the deflection unit */
  deflection = "deflection",
  /** Slope in radians */
  slope = "slope",
  /** Bending moment, sagging positive */
  moment = "moment",
  /** Shear force, dM/dx */
  shear = "shear",
}

/**
 * Which effect of a moving load is asked for.
 * @customenum {string}
 */
enum Effect {
  /** Deflection at the section */
  deflection = "deflection",
  /** Slope at the section, in radians */
  slope = "slope",
  /** Bending moment at the section, sagging positive */
  moment = "moment",
  /** Shear force at the section, dM/dx */
  shear = "shear",
  /** Force of the support at the section, up positive */
  reaction = "reaction",
  /** Couple of the support at the section, with the sign of an applied couple */
  couple = "couple",
}

/**
 * Which end of the range of values is asked for.
 * @customenum {string}
 */
enum Sense {
  /** The value of largest magnitude, with its sign */
  largest = "largest",
  /** The algebraically highest value */
  highest = "highest",
  /** The algebraically lowest value */
  lowest = "lowest",
}

/**
 * What to give of a peak.
 * @customenum {string}
 */
enum Give {
  /** The value itself */
  value = "value",
  /** The position x where it occurs */
  position = "position",
}

/**
 * What to give of the worst effect of rolling axles.
 * @customenum {string}
 */
enum GiveRolling {
  /** The effect itself */
  value = "value",
  /** The position of the first axle when it occurs */
  position = "position",
  /** The section where it occurs */
  section = "section",
}

/**
 * The deflection of largest magnitude anywhere on the beam, with its sign, in the deflection unit of its units row.
 * Example: =SPANROW.MAXDEFLECTION(B4:I11, "G + Q")
 * @customfunction MAXDEFLECTION
 * @helpurl https://localhost:3000/help/maxdeflection.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number: the deflection of largest magnitude.
 * @example =SPANROW.MAXDEFLECTION(B4:I11) the largest deflection with every load acting
 * @example =SPANROW.MAXDEFLECTION(Template, "G + Q", $A$1:$F$1, A2:F2) one member of a schedule, to be filled down
 */
export function maxDeflection(
  beam: any[][],
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.maxDeflection(openBeam({ beam, combination, names, values })));
}

/**
 * The extreme deflection, slope, moment or shear anywhere on the beam, or the position where it occurs.
 * Example: =SPANROW.PEAK(B4:I11, "moment", "lowest", "position")
 * @customfunction PEAK
 * @helpurl https://localhost:3000/help/peak.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param quantity "deflection", "slope", "moment" or "shear".
 * @param [sense] "largest" (by magnitude, with its sign), "highest" or "lowest". Left out: "largest".
 * @param [give] "value" or "position". Left out: "value".
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number: the extreme, or where it is.
 * @example =SPANROW.PEAK(B4:I11, "moment") the bending moment of largest magnitude, with its sign
 * @example =SPANROW.PEAK(B4:I11, "moment", "lowest") the largest hogging moment
 * @example =SPANROW.PEAK(B4:I11, "deflection", , "position") where the beam deflects most
 */
export function peak(
  beam: any[][],
  quantity: Quantity,
  sense?: Sense,
  give?: Give,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.peak(openBeam({ beam, combination, names, values }), quantity, sense, give));
}

/**
 * Spills x, lowest and highest of a quantity over a range of combinations, if wished with live load patterned span by
 * span. Example: =SPANROW.ENVELOPE(B4:I11, "moment", K4:K7, "Q")
 * @customfunction ENVELOPE
 * @helpurl https://localhost:3000/help/envelope.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param quantity "deflection", "slope", "moment" or "shear".
 * @param combinations A range with one combination per cell, such as "1.35 G + 1.5 Q".
 * @param [pattern] Cases whose loads act span by span wherever they are unfavourable, such as "Q" or "Q, S".
 * @param [points] How many equally spaced positions to give at least; every support, load end and jump is added. Left out: 41.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns Three columns with a header: x, lowest, highest.
 * @example =SPANROW.ENVELOPE(B4:I11, "moment", K4:K7) the band of bending moments over four combinations
 * @example =SPANROW.ENVELOPE(B4:I11, "deflection", "G + Q", "Q", 40) live load on whichever spans are unfavourable
 */
export function envelope(
  beam: any[][],
  quantity: Quantity,
  combinations: any[][],
  pattern?: any[][],
  points?: any,
  names?: any[][],
  values?: any[][],
): any[][] {
  return matrix<Shown>(() =>
    ask.envelope(openBeam({ beam, names, values }), quantity, combinations, pattern, points),
  );
}

/**
 * Spills the influence line of a quantity at a section: its value there as a unit force travels along the beam.
 * Example: =SPANROW.INFLUENCE(B4:I11, "moment", 3)
 * @customfunction INFLUENCE
 * @helpurl https://localhost:3000/help/influence.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text. Its loads are not used.
 * @param quantity "deflection", "slope", "moment", "shear", "reaction" or "couple".
 * @param at Position of the section, or of the support for "reaction" and "couple".
 * @param [points] How many equally spaced positions to give at least; every support, load end and jump is added. Left out: 41.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns Two columns with a header: position of the unit force, value at the section.
 * @example =SPANROW.INFLUENCE(B4:I11, "moment", 3) the influence line of the bending moment at 3
 * @example =SPANROW.INFLUENCE(B4:I11, "reaction", 6) the influence line of the support at 6
 */
export function influence(
  beam: any[][],
  quantity: Effect,
  at: any,
  points?: any,
  names?: any[][],
  values?: any[][],
): any[][] {
  return matrix<Shown>(() => ask.influence(openBeam({ beam, names, values }), quantity, at, points));
}

/**
 * Worst effect at a section of a train of axle loads as it rolls across the beam either way.
 * Example: =SPANROW.ROLLING(B4:I11, "moment", 3, K4:L6)
 * @customfunction ROLLING
 * @helpurl https://localhost:3000/help/rolling.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text. Its loads are not used.
 * @param quantity "deflection", "slope", "moment", "shear", "reaction" or "couple".
 * @param at Position of the section, or "anywhere" for the worst section.
 * @param axles Two columns: distance of each axle behind the first, and its force.
 * @param [sense] "largest" (by magnitude, with its sign), "highest" or "lowest". Left out: "largest".
 * @param [give] "value", "position" (of the first axle) or "section". Left out: "value".
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number: the effect, or where it occurs.
 * @example =SPANROW.ROLLING(B4:I11, "moment", 3, K4:L6) the largest bending moment at 3 under the axles in K4:L6
 * @example =SPANROW.ROLLING(B4:I11, "moment", "anywhere", K4:L6, , "section") the section where they bend the beam most
 */
export function rolling(
  beam: any[][],
  quantity: Effect,
  at: any,
  axles: any[][],
  sense?: Sense,
  give?: GiveRolling,
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.rolling(openBeam({ beam, names, values }), quantity, at, axles, sense, give));
}
