/** REACTION and REACTIONS: what the supports take. */
import { ask, openBeam } from "../src/index";
import { type Shown, matrix, scalar } from "./host";

/**
 * Which part of a reaction is asked for.
 * @customenum {string}
 */
enum Part {
  /** The vertical force, positive when it pushes up on the beam */
  force = "force",
  /** The couple of a support that holds the rotation, with the sign of an applied couple */
  couple = "couple",
}

/**
 * Force (up positive) or couple with which the support at a position acts on the beam.
 * Example: =SPANROW.REACTION(B4:I11, 6)
 * @customfunction REACTION
 * @helpurl https://localhost:3000/help/reaction.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param at Position of the support.
 * @param [part] "force" or "couple". Left out: "force".
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns One number; #N/A when no support stands there, with the positions of those that do.
 * @example =SPANROW.REACTION(B4:I11, 6) the force of the support at 6
 * @example =SPANROW.REACTION(B4:I11, 0, "couple", "1.35 G") the couple at a fixed end under 1.35 G
 */
export function reaction(
  beam: any[][],
  at: any,
  part?: Part,
  combination?: any[][],
  names?: any[][],
  values?: any[][],
): number {
  return scalar(() => ask.reaction(openBeam({ beam, combination, names, values }), at, part));
}

/**
 * Spills every support with its position, force (up positive) and couple.
 * Example: =SPANROW.REACTIONS(B4:I11, "1.35 G + 1.5 Q")
 * @customfunction REACTIONS
 * @helpurl https://localhost:3000/help/reactions.html
 * @param beam The beam's rows: a range with Item, At, To, Value, End value, Unit, Case, Note, or one cell of text.
 * @param [combination] Load combination such as "1.35 G + 1.5 Q", or a range of case and factor. Left out: everything acts.
 * @param [names] Names used in the rows' expressions: a row or a column of cells.
 * @param [values] Their values: a range of the same size as names.
 * @returns Four columns with a header: position, support, force, couple.
 * @example =SPANROW.REACTIONS(B4:I11) all supports with every load acting
 */
export function reactions(beam: any[][], combination?: any[][], names?: any[][], values?: any[][]): any[][] {
  return matrix<Shown>(() => ask.reactions(openBeam({ beam, combination, names, values })));
}
