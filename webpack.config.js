/**
 * Two builds. The add-in: functions.js, the pane and everything an office serves. The workbench: the embedded
 * spreadsheet that shows the add-in without Excel; nothing of it ships.
 *
 *   npm run build                                      addresses of a local server (https://localhost:3000)
 *   npm run build -- --env origin=https://host/path    addresses of that place in the manifest and the help links
 *   npm run build -- --env only=addin                  without the workbench, quicker
 */
const path = require('node:path');
const CopyPlugin = require('copy-webpack-plugin');
const MetadataPlugin = require('custom-functions-metadata-plugin');
const MiniCssExtractPlugin = require('mini-css-extract-plugin');
const { AddressPlugin, HelpPlugin, IconPlugin, SizePlugin } = require('./scripts/build-plugins.cjs');
const { LOCAL_ORIGIN, readOrigin } = require('./scripts/origin.cjs');

const root = __dirname;
const dist = path.join(root, 'dist');
/** The metadata generator and the bundle must read the same files, in the same order. */
const functionFiles = require('./functions/files.json').map((file) => path.join(root, file));

const common = {
  mode: 'production',
  target: ['web', 'es2020'],
  devtool: false,
  context: root,
  resolve: { extensions: ['.ts', '.tsx', '.mjs', '.js'] },
  cache: { type: 'filesystem', buildDependencies: { config: [__filename] } },
  performance: { hints: false },
  stats: { preset: 'errors-warnings' },
  module: {
    rules: [
      {
        test: /\.tsx?$/,
        loader: 'swc-loader',
        options: {
          swcrc: false,
          jsc: {
            parser: { syntax: 'typescript', tsx: true },
            target: 'es2020',
            transform: { react: { runtime: 'automatic' } },
            // plain assignments: without this every field of every object goes through defineProperty
            assumptions: { setPublicClassFields: true },
          },
          module: { type: 'es6' },
        },
      },
      // the engine is pure: what a bundle does not use may be left out of it
      { include: path.join(root, 'src'), sideEffects: false },
      { test: /\.css$/, use: [MiniCssExtractPlugin.loader, 'css-loader'] },
    ],
  },
};

function addin(origin) {
  return {
    ...common,
    name: 'addin',
    entry: {
      functions: { import: functionFiles },
      // the pane stands on the same engine and the same memo as the functions, so it is not downloaded twice
      taskpane: { import: path.join(root, 'taskpane/load.ts'), dependOn: 'functions' },
    },
    output: {
      path: dist,
      filename: '[name].js',
      chunkFilename: '[name].js',
      // chunks stand beside the page; "auto" would need a document, and functions.js must run without one
      publicPath: '',
      // a runtime without a window runs functions.js too
      globalObject: 'globalThis',
      // other builds of this package may stand on the same page (the workbench does)
      uniqueName: 'spanrow_addin',
    },
    optimization: { splitChunks: false, runtimeChunk: false },
    plugins: [
      new MetadataPlugin({ output: 'functions.json', input: functionFiles }),
      new MiniCssExtractPlugin({ filename: '[name].css', chunkFilename: '[name].css' }),
      new CopyPlugin({
        patterns: [
          { from: 'manifest.xml' },
          { from: 'taskpane/taskpane.html' },
          { from: 'assets', to: 'assets' },
        ],
      }),
      new IconPlugin({ svg: path.join(root, 'assets/icon.svg') }),
      new HelpPlugin({ root }),
      new AddressPlugin({ from: LOCAL_ORIGIN, to: origin }),
      new SizePlugin({ file: 'functions.js', budget: 130_000 }),
      new SizePlugin({ file: 'pane.js', budget: 60_000 }),
    ],
  };
}

module.exports = (env = {}, argv = {}) => {
  const builds = [];
  if (env.only !== 'workbench') builds.push(addin(readOrigin(env.origin)));
  if (env.only !== 'addin') builds.push(...[require('./workbench/webpack.config.js')(env, argv)].flat());
  return builds;
};
