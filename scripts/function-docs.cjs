/**
 * Reads the comments above the worksheet functions: the one source of the tooltips (functions.json, through the metadata
 * generator), of the help pages and of the function tables in the documents.
 */
const fs = require('node:fs');
const path = require('node:path');
const ts = require('typescript');

/** The functions in the order of functions/files.json */
function readFunctionDocs(root) {
  const files = JSON.parse(fs.readFileSync(path.join(root, 'functions/files.json'), 'utf8'));
  return files.flatMap((file) => readFile(path.join(root, file)));
}

function readFile(file) {
  const source = ts.createSourceFile(file, fs.readFileSync(file, 'utf8'), ts.ScriptTarget.Latest, true);
  const enums = new Map();
  const found = [];
  for (const statement of source.statements) {
    if (ts.isEnumDeclaration(statement)) enums.set(statement.name.text, readWords(statement, source));
    if (ts.isFunctionDeclaration(statement)) {
      const doc = readFunction(statement, enums, path.basename(file, '.ts'));
      if (doc) found.push(doc);
    }
  }
  return found;
}

function readWords(declaration, source) {
  return declaration.members.map((member) => {
    const [range] = ts.getLeadingCommentRanges(source.text, member.getFullStart()) ?? [];
    const comment = range ? source.text.slice(range.pos, range.end) : '';
    return { word: member.initializer.text, text: comment.replace(/^\/\*\*\s*|\s*\*\/$/g, '') };
  });
}

function readFunction(declaration, enums, theme) {
  const tags = ts.getJSDocTags(declaration);
  const tag = (name) =>
    tags.filter((one) => one.tagName.text.toLowerCase() === name).map((one) => line(one.comment));
  const [id] = tag('customfunction');
  if (!id) return null;
  // "What it gives. Example: =…" is one sentence for the tooltip, two things for a page
  const [text, example] = line(declaration.jsDoc.at(-1).comment).split(/\s+Example:\s+/);
  const parameters = declaration.parameters.map((parameter) => {
    const [doc] = ts.getJSDocParameterTags(parameter);
    const type =
      parameter.type && ts.isTypeReferenceNode(parameter.type) ? parameter.type.typeName.getText() : '';
    return {
      name: parameter.name.getText(),
      text: line(doc?.comment),
      optional: parameter.questionToken !== undefined,
      words: enums.get(type) ?? [],
    };
  });
  return {
    id,
    page: `${id.toLowerCase()}.html`,
    text,
    example: example ?? '',
    returns: tag('returns')[0] ?? '',
    parameters,
    examples: tag('example').map(splitExample),
    signature: `SPANROW.${id}(${parameters.map((p) => (p.optional ? `[${p.name}]` : p.name)).join(', ')})`,
    theme,
  };
}

/** "=F(a, G(b))-F(c) what it shows" -> formula and words: the formula ends at the blank after its last bracket closes. */
function splitExample(text) {
  let depth = 0;
  let quoted = false;
  for (let i = 0; i < text.length; i++) {
    const c = text[i];
    if (c === '"') quoted = !quoted;
    else if (quoted) continue;
    else if (c === '(') depth++;
    else if (c === ')') depth--;
    else if (c === ' ' && depth === 0) return { formula: text.slice(0, i), text: text.slice(i + 1) };
  }
  return { formula: text, text: '' };
}

const line = (comment) =>
  (typeof comment === 'string' ? comment : (ts.getTextOfJSDocComment(comment) ?? ''))
    .replace(/\s*\n\s*/g, ' ')
    .trim();

module.exports = { readFunctionDocs, splitExample };
