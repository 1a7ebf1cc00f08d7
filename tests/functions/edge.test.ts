/** The host's edge itself: what leaves a function when something inside is wrong. From the source, where faults can be staged. */
import { ErrorCode, HostError } from './host';

(globalThis as unknown as { CustomFunctions: unknown }).CustomFunctions = {
  Error: HostError,
  ErrorCode,
  associate: () => undefined,
};
import { matrix, scalar, spread } from '../../functions/host';
import { BeamProblem, type Issue } from '../../src/index';

const thrownBy = (work: () => unknown): HostError => {
  try {
    work();
  } catch (thrown) {
    return thrown as HostError;
  }
  throw new Error('nothing was thrown');
};

const issue = (kind: Issue['kind']): Issue => ({ code: 'no-support', kind, column: 'at', found: '2' });

it('an invalid table is #VALUE!, a missing result #N/A', () => {
  const raise = (kind: Issue['kind']) =>
    thrownBy(() =>
      scalar(() => {
        throw new BeamProblem([issue(kind)], '');
      }),
    );
  expect(raise('invalid').code).toBe('#VALUE!');
  expect(raise('unavailable').code).toBe('#N/A');
  expect(raise('unavailable').message!.length).toBeGreaterThan(10);
});

it('a table that is wrong in any way is #VALUE!, whatever else is not to be had', () => {
  const thrown = thrownBy(() =>
    matrix(() => {
      throw new BeamProblem([issue('unavailable'), issue('invalid')], '');
    }),
  );
  expect(thrown.code).toBe('#VALUE!');
});

it.each([NaN, Infinity, -Infinity, null, undefined, {}, new Date(0)])(
  '%p never leaves as a result',
  (value) => {
    for (const work of [
      () => scalar(() => value as number),
      () => matrix(() => [[1, value as number]]),
      () => spread(() => [[value as number]]),
    ]) {
      const thrown = thrownBy(work);
      expect(thrown).toBeInstanceOf(HostError);
      expect(thrown.code).toBe('#VALUE!');
      expect(thrown.message).toMatch(/fault of Spanrow.*report/s);
    }
  },
);

it('a spill that is no rectangle never leaves', () => {
  expect(thrownBy(() => matrix(() => [[1, 2], [3]])).message).toMatch(/row 2 .* 1 cells, not 2/);
  expect(thrownBy(() => matrix(() => [])).message).toMatch(/empty/);
});

it('an exception of ours says that it is ours, and what it was', () => {
  const thrown = thrownBy(() =>
    scalar(() => {
      throw new TypeError('x is not iterable');
    }),
  );
  expect(thrown.code).toBe('#VALUE!');
  expect(thrown.message).toMatch(
    /^A fault of Spanrow, not of your rows \(TypeError: x is not iterable\)\. Please report/,
  );
});

it('whole results pass unchanged, but minus zero is zero', () => {
  expect(scalar(() => 1.5)).toBe(1.5);
  expect(scalar(() => 'text')).toBe('text');
  expect(
    Object.is(
      scalar(() => -0),
      0,
    ),
  ).toBe(true);
  expect(
    matrix<string | number | boolean>(() => [
      ['x', 1],
      ['y', true],
    ]),
  ).toEqual([
    ['x', 1],
    ['y', true],
  ]);
  expect(spread(() => 2)).toEqual([[2]]);
});
