import type { FunctionDoc } from './function-docs.cjs';

export function helpPages(docs: FunctionDoc[], root: string): [file: string, content: string][];
export function documentsWithTable(root: string): string[];
export function withTable(text: string, docs: FunctionDoc[]): string;
