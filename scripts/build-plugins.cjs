/** What our build does beyond bundling: addresses, icons, help pages, and the size of functions.js. */
const fs = require('node:fs');
const path = require('node:path');
const zlib = require('node:zlib');
const { Compilation, sources } = require('webpack');
const { renderIcon, ICON_SIZES } = require('./icons.cjs');
const { readFunctionDocs } = require('./function-docs.cjs');
const { helpPages } = require('./help-pages.cjs');

/** Runs `work(compilation)` when the assets of the main compilation stand, at the given stage. */
function onAssets(compiler, name, stage, work) {
  compiler.hooks.thisCompilation.tap(name, (compilation) => {
    compilation.hooks.processAssets.tap({ name, stage: Compilation[stage] }, () => work(compilation));
  });
}

/** Writes the address of the serving place into the manifest and the metadata, and lays the metadata's text on one line. */
class AddressPlugin {
  constructor({ from, to }) {
    this.from = from;
    this.to = to;
  }
  apply(compiler) {
    onAssets(compiler, 'AddressPlugin', 'PROCESS_ASSETS_STAGE_OPTIMIZE', (compilation) => {
      const rewrite = (file, change) => {
        if (!compilation.getAsset(file)) return;
        compilation.updateAsset(file, (source) => new sources.RawSource(change(source.source().toString())));
      };
      const address = (text) => text.split(this.from).join(this.to);
      rewrite('manifest.xml', address);
      rewrite('functions.json', (text) => `${JSON.stringify(oneLine(JSON.parse(address(text))), null, 2)}\n`);
    });
  }
}

/** JSDoc wraps its sentences; a tooltip should not. */
function oneLine(value) {
  if (typeof value === 'string') return value.replace(/\s*\n\s*/g, ' ');
  if (Array.isArray(value)) return value.map(oneLine);
  if (value && typeof value === 'object') {
    return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, oneLine(inner)]));
  }
  return value;
}

/** One drawing, every size the manifest asks for. */
class IconPlugin {
  constructor({ svg }) {
    this.svg = svg;
  }
  apply(compiler) {
    onAssets(compiler, 'IconPlugin', 'PROCESS_ASSETS_STAGE_ADDITIONAL', (compilation) => {
      compilation.fileDependencies.add(this.svg);
      const svg = fs.readFileSync(this.svg, 'utf8');
      for (const size of ICON_SIZES) {
        compilation.emitAsset(`assets/icon-${size}.png`, new sources.RawSource(renderIcon(svg, size)));
      }
    });
  }
}

/** One page per function, from the comment above it. */
class HelpPlugin {
  constructor({ root }) {
    this.root = root;
  }
  apply(compiler) {
    onAssets(compiler, 'HelpPlugin', 'PROCESS_ASSETS_STAGE_ADDITIONAL', (compilation) => {
      compilation.fileDependencies.add(path.join(this.root, 'scripts/help.css'));
      const pages = helpPages(readFunctionDocs(this.root), this.root);
      for (const [file, content] of pages)
        compilation.emitAsset(`help/${file}`, new sources.RawSource(content));
    });
  }
}

/** Prints what the functions cost to download, and fails the build when that is over budget. */
class SizePlugin {
  constructor({ file, budget }) {
    this.file = file;
    this.budget = budget;
  }
  apply(compiler) {
    compiler.hooks.afterEmit.tap('SizePlugin', (compilation) => {
      if (compilation.errors.length > 0) return;
      const bytes = fs.readFileSync(path.join(compiler.outputPath, this.file));
      const packed = zlib.gzipSync(bytes, { level: 9 }).length;
      const words = `${this.file}: ${kB(bytes.length)}, ${kB(packed)} gzip (budget ${kB(this.budget)} gzip)`;
      console.log(words);
      if (packed > this.budget) compilation.errors.push(new Error(`Over budget: ${words}`));
    });
  }
}

const kB = (bytes) => `${(bytes / 1000).toFixed(1)} kB`;

module.exports = { AddressPlugin, HelpPlugin, IconPlugin, SizePlugin };
