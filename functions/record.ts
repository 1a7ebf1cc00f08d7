/** VERIFY and VERSION: what an office files with a calculation. */
import { VERSION, verify as runPublishedCases } from "../src/index";
import { type Shown, matrix, scalar } from "./host";

/**
 * Spills the published cases run live in this workbook: case, source, published value, computed value, relative
 * difference. Example: =SPANROW.VERIFY()
 * @customfunction VERIFY
 * @helpurl https://localhost:3000/help/verify.html
 * @returns A table with a header, one row per published value.
 * @example =SPANROW.VERIFY() file the result as proof of the installed version
 */
export function verify(): any[][] {
  return matrix<Shown>(() => runPublishedCases());
}

/**
 * Version of this add-in, for the calculation record. Example: =SPANROW.VERSION()
 * @customfunction VERSION
 * @helpurl https://localhost:3000/help/version.html
 * @returns Text, the name and the version.
 * @example =SPANROW.VERSION() beside the date and the name of the checker
 */
export function version(): string {
  return scalar(() => VERSION);
}
