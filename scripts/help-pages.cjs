/** The help that ships: one plain page per function and an index. No script, one style sheet, readable without either. */
const fs = require('node:fs');
const path = require('node:path');

const THEMES = {
  values: 'The beam at a position',
  extremes: 'The worst of the beam',
  reactions: 'Supports',
  tables: 'Tables to read, chart and check',
  limits: 'Deflection limits and stiffness',
  record: 'For the record',
};

const CAUTION =
  'Linear elastic small-deflection theory; for review by a qualified engineer. Local codes and licensed practice decide limits, loads and combinations.';

/** The pages as pairs of file name and content; their types stand in help-pages.d.cts. */
function helpPages(docs, root) {
  return [
    ['help.css', fs.readFileSync(path.join(root, 'scripts/help.css'), 'utf8')],
    ['index.html', page('Worksheet functions', indexBody(docs))],
    ...docs.map((doc, i) => [
      doc.page,
      page(`SPANROW.${doc.id}`, functionBody(doc, docs[i - 1], docs[i + 1])),
    ]),
  ];
}

function page(title, body) {
  return `<!doctype html>
<html lang="en">
  <head>
    <meta charset="utf-8" />
    <meta name="viewport" content="width=device-width, initial-scale=1" />
    <meta name="color-scheme" content="light dark" />
    <title>${escape(title)} · Spanrow help</title>
    <link rel="stylesheet" href="help.css" />
  </head>
  <body>
    <main>
${body}
      <footer><p>${CAUTION}</p></footer>
    </main>
  </body>
</html>
`;
}

function indexBody(docs) {
  const sections = Object.entries(THEMES).map(([theme, heading]) => {
    const rows = docs
      .filter((doc) => doc.theme === theme)
      .map(
        (doc) =>
          `<tr><th scope="row"><a href="${doc.page}">${doc.id}</a></th><td>${escape(doc.text)}</td></tr>`,
      );
    return `      <h2>${heading}</h2>\n      <table>\n${indent(rows, 8)}\n      </table>`;
  });
  return `      <h1>Worksheet functions</h1>
      <p>A beam is a few rows of cells: what stands in a row, and where. Each function below takes those rows first and answers one question about the beam. A formula begins with <code>=SPANROW.</code></p>
${sections.join('\n')}
      <h2>When a cell shows an error</h2>
      <dl>
        <dt><code>#VALUE!</code></dt><dd>The rows or the arguments are wrong. The error's own text names the row and the column; where a host hides that text, <a href="readback.html">READBACK</a> shows it as ordinary text.</dd>
        <dt><code>#N/A</code></dt><dd>The rows are right, but there is no such result: no support at that position, or a beam that is free to move.</dd>
        <dt><code>#NAME?</code></dt><dd>The add-in is not loaded in this workbook. Open its pane once, or ask the administrator who deployed it; the formulas are kept.</dd>
        <dt><code>#BUSY!</code></dt><dd>The add-in is starting. If it stays, close and reopen the workbook.</dd>
      </dl>`;
}

function functionBody(doc, before, after) {
  const parameters = doc.parameters.map((p) => {
    const words = p.words.map(({ word, text }) => `<li><code>"${word}"</code> ${escape(text)}</li>`);
    const list = words.length > 0 ? `<ul>${words.join('')}</ul>` : '';
    // the list says the words; of the sentence about them only the default is left to say
    const text = words.length > 0 ? (/Left out:.*/.exec(p.text)?.[0] ?? '') : p.text;
    return `<dt><code>${p.name}</code>${p.optional ? ' <em>may be left out</em>' : ''}</dt><dd>${escape(text)}${list}</dd>`;
  });
  const examples = doc.examples.map(
    ({ formula, text }) => `<div class="example"><code>${escape(formula)}</code><p>${escape(text)}</p></div>`,
  );
  const neighbour = (one, mark) => (one ? `<a href="${one.page}">${mark} ${one.id}</a>` : '<span></span>');
  return `      <nav><a href="index.html">All functions</a></nav>
      <h1>SPANROW.${doc.id}</h1>
      <p class="lead">${escape(doc.text)}</p>
      <p class="signature"><code>=${escape(doc.signature)}</code></p>
${parameters.length > 0 ? `      <h2>Arguments</h2>\n      <dl>\n${indent(parameters, 8)}\n      </dl>\n` : ''}      <h2>Gives</h2>
      <p>${escape(doc.returns)}</p>
      <h2>Examples</h2>
${indent(examples, 6)}
      <nav class="neighbours">${neighbour(before, '←')}${neighbour(after, '→')}</nav>`;
}

const TABLE = /(<!-- functions: begin -->\n)[^]*?(<!-- functions: end -->)/;

/** The text of a document with its table of functions made anew; unchanged when it holds none. */
function withTable(text, docs) {
  const rows = docs.map((doc) => {
    const signature = doc.signature.replace('SPANROW.', '');
    return `| \`${signature}\` | ${doc.text.replace(/\|/g, '\\|')} |`;
  });
  // blank lines around it, so that formatters leave it alone
  const table = ['', '| Function | Gives |', '| --- | --- |', ...rows, '', ''].join('\n');
  return text.replace(TABLE, (_, begin, end) => begin + table + end);
}

/** Every document of ours that holds a table of functions. */
function documentsWithTable(root) {
  const pages = path.join(root, 'docs');
  const files = [path.join(root, 'README.md'), path.join(root, 'DEVELOPERS.md')];
  if (fs.existsSync(pages)) files.push(...fs.readdirSync(pages).map((name) => path.join(pages, name)));
  return files.filter(
    (file) => file.endsWith('.md') && fs.existsSync(file) && TABLE.test(fs.readFileSync(file, 'utf8')),
  );
}

const indent = (lines, by) => lines.map((one) => ' '.repeat(by) + one).join('\n');
const ENTITIES = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escape = (text) => text.replace(/[&<>"]/g, (c) => ENTITIES[c]);

module.exports = { helpPages, documentsWithTable, withTable };
