/** One source: the comments above the functions. Help pages and document tables are made of it and must not drift. */
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { execFileSync } from 'node:child_process';
import { JSDOM } from 'jsdom';
import { readFunctionDocs, splitExample } from '../../scripts/function-docs.cjs';
import { documentsWithTable, helpPages, withTable } from '../../scripts/help-pages.cjs';

const root = path.resolve(__dirname, '../..');
const docs = readFunctionDocs(root);
const pages = new Map(helpPages(docs, root));

it('has a page for every function, each reached from the index and from its neighbours', () => {
  expect(docs).toHaveLength(21);
  const reached = new Set<string>();
  for (const [file, content] of pages) {
    if (!file.endsWith('.html')) continue;
    for (const link of new JSDOM(content).window.document.querySelectorAll('a, link')) {
      const target = link.getAttribute('href')!;
      expect([file, target, pages.has(target)]).toEqual([file, target, true]);
      if (file === 'index.html') reached.add(target);
    }
  }
  for (const { page } of docs) expect(reached).toContain(page);
});

describe.each(docs)('$id', (doc) => {
  it('documents every parameter and what it gives', () => {
    for (const one of doc.parameters) expect([one.name, one.text.length > 0]).toEqual([one.name, true]);
    expect(doc.text).toMatch(/\.$/);
    expect(doc.returns.length).toBeGreaterThan(5);
  });

  it('has examples that could be typed: brackets close, and no more arguments than parameters', () => {
    const formulas = [doc.example, ...doc.examples.map((one) => one.formula)];
    expect(doc.examples.length).toBeGreaterThan(0);
    for (const formula of formulas) {
      const calls = [...formula.matchAll(/SPANROW\.([A-Z]+)\(([^()]*)\)/g)];
      expect(calls.length).toBeGreaterThan(0);
      for (const [, id, inside] of calls) {
        const called = docs.find((one) => one.id === id)!;
        const given = inside === '' ? 0 : inside!.replace(/"[^"]*"/g, '""').split(',').length;
        expect(given).toBeLessThanOrEqual(called.parameters.length);
        expect(given).toBeGreaterThanOrEqual(called.parameters.filter((one) => !one.optional).length);
      }
    }
    for (const one of doc.examples) expect(one.text.length).toBeGreaterThan(10);
  });

  it('has words in its examples that its parameters know', () => {
    for (const { formula } of doc.examples) {
      const [, inside] = /^=SPANROW\.[A-Z]+\(([^()]*)\)/.exec(formula) ?? [];
      const given = (inside ?? '').split(',').map((one) => one.trim());
      doc.parameters.forEach((parameter, i) => {
        const word = /^"(.*)"$/.exec(given[i] ?? '')?.[1];
        if (word === undefined || parameter.words.length === 0) return;
        expect(parameter.words.map((one) => one.word)).toContain(word);
      });
    }
  });
});

it('splits an example where its formula ends', () => {
  expect(splitExample('=F(a, "b) c")-G(1) what it shows')).toEqual({
    formula: '=F(a, "b) c")-G(1)',
    text: 'what it shows',
  });
});

it('keeps what a reader typed out of the markup', () => {
  expect(pages.get('peak.html')).toContain('&quot;moment&quot;');
  expect(pages.get('peak.html')).not.toMatch(/<script|onerror|javascript:/);
});

describe('tables in documents', () => {
  it('are up to date (npm run docs writes them anew)', () => {
    for (const file of documentsWithTable(root)) {
      const text = fs.readFileSync(file, 'utf8');
      expect(withTable(text, docs)).toBe(text);
    }
    expect(() =>
      execFileSync(process.execPath, [path.join(root, 'scripts/help.mjs'), '--check']),
    ).not.toThrow();
  });

  it('are written between their two marks and nowhere else', () => {
    const text = 'before\n<!-- functions: begin -->\nold\n<!-- functions: end -->\nafter\n';
    const fresh = withTable(text, docs);
    expect(fresh).toMatch(/^before\n<!-- functions: begin -->\n\n\| Function/);
    expect(fresh).toMatch(/\n\n<!-- functions: end -->\nafter\n$/);
    expect(fresh).not.toContain('old');
    expect(fresh.match(/^\| `/gm)).toHaveLength(21);
    expect(withTable(fresh, docs)).toBe(fresh);
    expect(withTable('no marks', docs)).toBe('no marks');
  });

  it('are found in README, DEVELOPERS and docs/', () => {
    const place = fs.mkdtempSync(path.join(os.tmpdir(), 'spanrow-docs-'));
    fs.mkdirSync(path.join(place, 'docs'));
    const mark = '<!-- functions: begin -->\n<!-- functions: end -->\n';
    fs.writeFileSync(path.join(place, 'README.md'), mark);
    fs.writeFileSync(path.join(place, 'docs/functions.md'), mark);
    fs.writeFileSync(path.join(place, 'docs/other.md'), 'nothing');
    expect(documentsWithTable(place).map((file) => path.relative(place, file))).toEqual([
      'README.md',
      path.join('docs', 'functions.md'),
    ]);
    fs.rmSync(place, { recursive: true });
  });
});
