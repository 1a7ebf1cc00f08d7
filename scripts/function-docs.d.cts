export interface WordDoc {
  word: string;
  text: string;
}
export interface ParameterDoc {
  name: string;
  text: string;
  optional: boolean;
  words: WordDoc[];
}
export interface ExampleDoc {
  formula: string;
  text: string;
}
export interface FunctionDoc {
  id: string;
  /** file name of its help page */
  page: string;
  text: string;
  example: string;
  returns: string;
  parameters: ParameterDoc[];
  examples: ExampleDoc[];
  signature: string;
  /** name of the source file it stands in */
  theme: string;
}
export function readFunctionDocs(root: string): FunctionDoc[];
export function splitExample(text: string): ExampleDoc;
