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
      moduleNameMapper: { '\\.css$': '<rootDir>/tests/helpers/no-styles.cjs' },
    }),
    project('workbench'),
    project('browser'),
  ],
};
