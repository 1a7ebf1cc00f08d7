/** One runner for every kind of test; each kind is a project so that one can be run alone (`npx jest --selectProjects unit`). */
const transform = { '^.+\\.[jt]sx?$': ['@swc/jest'] };
const project = (name, extra = {}) => ({
  displayName: name,
  testMatch: [`<rootDir>/tests/${name}/**/*.test.ts?(x)`],
  transform,
  testEnvironment: 'node',
  ...extra,
});

module.exports = {
  projects: [
    project('unit'),
    project('published'),
    project('properties'),
    project('functions'),
    project('taskpane', {
      testEnvironment: 'jsdom',
      // styles are the browser tests' business
      moduleNameMapper: {
        '\\.css$': '<rootDir>/tests/helpers/no-styles.cjs',
        // their default entry is an ES module, which jest does not load; the same code stands beside it in the older form
        '^(d3-[a-z]+(-[a-z]+)?|internmap)$': '<rootDir>/node_modules/$1/dist/$1.js',
      },
    }),
    project('workbench'),
    project('browser'),
  ],
};
