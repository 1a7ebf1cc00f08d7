/** functions.json against the contract: ids, parameters, names a host accepts, help that reads well. */
import fs from 'node:fs';
import path from 'node:path';
import { loadBundle, METADATA } from './host';

/** Section 3 of the contract. A released id or parameter never changes; a new parameter is optional and last. */
const CONTRACT = `
DEFLECTION(beam, x, [combination], [names], [values])
SLOPE(beam, x, [combination], [names], [values])
MOMENT(beam, x, [combination], [names], [values])
SHEAR(beam, x, [combination], [names], [values])
MAXDEFLECTION(beam, [combination], [names], [values])
PEAK(beam, quantity, [sense], [give], [combination], [names], [values])
REACTION(beam, at, [part], [combination], [names], [values])
REACTIONS(beam, [combination], [names], [values])
PROFILE(beam, [points], [combination], [names], [values])
REGIONS(beam, [combination], [names], [values])
CHECK(beam, [limit], [combination], [names], [values])
USED(beam, [limit], [combination], [names], [values])
REQUIREDI(beam, [limit], [combination], [names], [values])
STIFFNESSFACTOR(beam, [limit], [combination], [names], [values])
ENVELOPE(beam, quantity, combinations, [pattern], [points], [names], [values])
INFLUENCE(beam, quantity, at, [points], [names], [values])
ROLLING(beam, quantity, at, axles, [sense], [give], [names], [values])
FREQUENCY(beam, [combination], [names], [values])
READBACK(beam, [names], [values])
VERIFY()
VERSION()
`;

const written = METADATA.functions.map(({ id, parameters }) => {
  const names = parameters.map((one) => (one.optional ? `[${one.name}]` : one.name));
  return `${id}(${names.join(', ')})`;
});

it('has the functions of the contract with exactly its parameters', () => {
  expect([...written].sort()).toEqual(CONTRACT.trim().split('\n').sort());
});

it('describes what the bundle registers, and nothing else', () => {
  expect([...loadBundle().keys()].sort()).toEqual(METADATA.functions.map((one) => one.id).sort());
});

it('is the golden file (npm test with UPDATE_GOLDEN=1 writes it anew)', () => {
  const golden = path.join(__dirname, 'golden/functions.json');
  const built = fs.readFileSync(path.resolve(__dirname, '../../dist/functions.json'), 'utf8');
  if (process.env.UPDATE_GOLDEN) fs.writeFileSync(golden, built);
  expect(JSON.parse(built)).toEqual(JSON.parse(fs.readFileSync(golden, 'utf8')));
});

it('spills where a table or a range of x is answered, and gives one cell elsewhere', () => {
  const spilling = METADATA.functions
    .filter((one) => one.result.dimensionality === 'matrix')
    .map((one) => one.id);
  expect(spilling.sort()).toEqual([
    'CHECK',
    'DEFLECTION',
    'ENVELOPE',
    'INFLUENCE',
    'MOMENT',
    'PROFILE',
    'REACTIONS',
    'READBACK',
    'REGIONS',
    'SHEAR',
    'SLOPE',
    'VERIFY',
  ]);
});

it('is never volatile: a memo makes a recalculation cheap, volatility would undo it', () => {
  for (const one of METADATA.functions) expect(one).not.toHaveProperty('options');
});

describe.each(METADATA.functions)('$id', ({ id, name, description, helpUrl, parameters }) => {
  it('has a name that a host accepts and that no cell or old macro has', () => {
    expect(name).toBe(id);
    expect(name).toMatch(/^[A-Z][A-Z0-9_.]{2,127}$/);
    expect(name).not.toMatch(/^[A-Z]{1,3}[0-9]{1,7}$/); // a cell, A1 style
    expect(name).not.toMatch(/^(R[0-9]*)?(C[0-9]*)?$/); // a cell, R1C1 style
    expect([
      'RUN',
      'CALL',
      'EVALUATE',
      'EXEC',
      'HALT',
      'RETURN',
      'SET.VALUE',
      'GOTO',
      'ARGUMENT',
    ]).not.toContain(name);
  });

  it('reads well in autocompletion: one sentence or two, an example that could be typed, help for each parameter', () => {
    expect(description).not.toMatch(/\n/);
    expect(description.length).toBeLessThanOrEqual(255);
    const [, example] = description.split(' Example: ');
    expect(example).toMatch(new RegExp(`^=SPANROW\\.${id}\\(.*\\)$`));
    for (const one of parameters) {
      expect(one.description.length).toBeGreaterThan(15);
      expect(one.description.length).toBeLessThanOrEqual(255);
      expect(one.description).not.toMatch(/\n/);
    }
  });

  it('has a help page that ships', () => {
    expect(helpUrl).toBe(`https://localhost:3000/help/${id.toLowerCase()}.html`);
    const page = fs.readFileSync(path.resolve(__dirname, `../../dist/help/${id.toLowerCase()}.html`), 'utf8');
    expect(page).toContain(`SPANROW.${id}(`);
  });

  it('takes ranges whole: whatever is not a word or one value is a matrix of any cell', () => {
    const scalars = ['quantity', 'sense', 'give', 'part', 'at', 'points', 'limit'];
    for (const one of parameters) {
      if (scalars.includes(one.name)) expect(one.dimensionality).toBeUndefined();
      else expect([one.dimensionality, one.type]).toEqual(['matrix', 'any']);
    }
  });
});

describe('words for autocompletion', () => {
  const words = Object.fromEntries(
    METADATA.enums.map((one) => [one.id, one.values.map((value) => value.stringValue)]),
  );

  it('are those of the contract', () => {
    expect(words).toEqual({
      Quantity: ['deflection', 'slope', 'moment', 'shear'],
      Effect: ['deflection', 'slope', 'moment', 'shear', 'reaction', 'couple'],
      Sense: ['largest', 'highest', 'lowest'],
      Give: ['value', 'position'],
      GiveRolling: ['value', 'position', 'section'],
      Part: ['force', 'couple'],
    });
  });

  it('stand at every parameter that takes words', () => {
    for (const { id, parameters } of METADATA.functions) {
      for (const { name, customEnumId } of parameters) {
        const wanted = ['quantity', 'sense', 'give', 'part'].includes(name);
        expect([id, name, customEnumId !== undefined]).toEqual([id, name, wanted]);
      }
    }
  });
});
