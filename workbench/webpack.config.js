/**
 * Builds the embedded spreadsheet: the page (dist/workbench/) and its headless twin for Node (dist/node/). Both load the functions
 * bundle at run time, so they test the file that ships. Nothing built here is part of the add-in.
 */
const path = require('node:path');
const CopyPlugin = require('copy-webpack-plugin');
const HtmlWebpackPlugin = require('html-webpack-plugin');
const MinimizerPlugin = require('minimizer-webpack-plugin');
const MiniCssExtractPlugin = require('mini-css-extract-plugin');
const { IgnorePlugin } = require('webpack');

const root = path.resolve(__dirname, '..');

/**
 * The spreadsheet's text layout can hyphenate in fifty languages, one file each; cells are never hyphenated. Only English, its default,
 * stays.
 */
const hyphenation = new IgnorePlugin({
  checkResource: (file, folder) =>
    /engine-render[\\/]lib[\\/]es$/.test(folder) &&
    /^\.\/(?!en-)[a-z]{2,5}(-[\w-]+)?-[\w-]{8}\.js$/.test(file),
});

module.exports = (_, argv = {}) => {
  const mode = argv.mode ?? 'production';
  const shared = {
    mode,
    context: root,
    devtool: false,
    resolve: { extensions: ['.ts', '.tsx', '.mjs', '.js'] },
    performance: { hints: false },
    stats: 'errors-warnings',
    cache: { type: 'filesystem', buildDependencies: { config: [__filename] } },
  };
  const script = {
    test: /\.tsx?$/,
    exclude: /node_modules/,
    loader: 'swc-loader',
    options: {
      swcrc: false,
      jsc: { parser: { syntax: 'typescript', tsx: true }, target: 'es2020' },
      module: { type: 'es6' },
    },
  };

  const page = {
    ...shared,
    name: 'workbench',
    cache: { ...shared.cache, name: 'workbench' },
    target: 'web',
    // the grid's library is large: the native minimizer takes seconds where the default takes minutes
    optimization: { minimizer: [new MinimizerPlugin({ minify: MinimizerPlugin.swcMinify })] },
    entry: { workbench: './workbench/index.ts' },
    output: {
      path: path.join(root, 'dist/workbench'),
      filename: '[name].js',
      chunkFilename: '[name].js',
      clean: true,
    },
    module: {
      rules: [
        script,
        { test: /\.css$/, use: [MiniCssExtractPlugin.loader, 'css-loader'] },
        { test: /\.(svg|png|woff2?)$/, type: 'asset/inline' },
      ],
    },
    plugins: [
      hyphenation,
      new HtmlWebpackPlugin({ template: './workbench/index.html', scriptLoading: 'defer' }),
      new MiniCssExtractPlugin({ filename: '[name].css', chunkFilename: '[name].css', ignoreOrder: true }),
      // written by `npm run demo`
      new CopyPlugin({ patterns: [{ from: 'workbench/demo/covered-market.*', to: '[name][ext]' }] }),
    ],
  };

  const headless = {
    ...shared,
    name: 'headless',
    cache: { ...shared.cache, name: 'headless' },
    target: 'node20',
    entry: { headless: './workbench/headless.ts' },
    output: {
      path: path.join(root, 'dist/node'),
      filename: '[name].js',
      library: { type: 'commonjs2' },
      clean: true,
    },
    // One readable file: it is run from the repository, never downloaded.
    optimization: { minimize: false, splitChunks: false },
    module: { rules: [script] },
    plugins: [hyphenation],
  };

  return [page, headless];
};
