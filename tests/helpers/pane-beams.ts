/** Beams to draw: each shows something the others do not. Headerless rows, invented numbers. */
export interface DrawnBeam {
  readonly rows: readonly (readonly unknown[])[];
  readonly combination?: string;
}

const METRIC = ['units', 'kN', 'm', 'mm'];
const steel = [
  ['E', null, null, 210, null, 'GPa'],
  ['I', null, null, 8400, null, 'cm4'],
];

export const BEAMS: Readonly<Record<string, DrawnBeam>> = {
  'simple span': { rows: [METRIC, ['pin', 0], ['roller', 6], ...steel, ['uniform', 0, 6, 12, null, 'kN/m']] },
  'three spans': {
    combination: '1.35 G + 1.5 Q + 0 W',
    rows: [
      METRIC,
      ['pin', 0],
      ['roller', 5],
      ['roller', 11],
      ['roller', 15],
      ['E', null, null, 210, null, 'GPa'],
      ['I', 0, 5, 3892, null, 'cm4'],
      ['I', 5, 11, 8356, null, 'cm4'],
      ['I', 11, 17, 3892, null, 'cm4'],
      ['uniform', 0, 17, 4.2, null, 'kN/m', 'G'],
      ['uniform', 5, 11, 7.5, null, 'kN/m', 'Q'],
      ['point', 2.5, null, 18, null, 'kN', 'Q'],
      ['point', 17, null, 6, null, 'kN', 'W'],
      ['couple', 13, null, 9.5, null, 'kN·m', 'W'],
      ['hinge', 9.6],
    ],
  },
  'every symbol': {
    rows: [
      ['units', 'kip', 'ft', 'in'],
      ['axis', 'up'],
      ['fixed', 0],
      ['spring', 20, null, 40, null, 'kip/in'],
      ['rotational spring', 20, null, 900, null, 'kip-ft/rad'],
      ['roller', 32],
      ['guided', 50],
      ['EI', 0, 20, 2.2e6, 1.1e6, 'kip·in²'],
      ['EI', 20, 50, '2.2e6*(1+x/100)', null, 'kip·in²'],
      ['varying', 0, 20, -0.5, -2, 'klf', 'S'],
      ['varying', 20, 50, '-1.2*sin(pi*(x-20)/30)', null, 'klf', 'L'],
      ['point', 8, null, -12, null, 'kip', 'L'],
      ['point', 9, null, -9, null, 'kip', 'L'],
      ['point', 26, null, 7, null, 'kip', 'Wind'],
      ['settlement', 32, null, -0.25, null, 'in'],
      ['curvature', 0, 20, 0.0001, null, '1/ft', 'T'],
      ['axial', null, null, -30, null, 'kip', 'N'],
      ['camber', 20, 32, 0.5, null, 'in'],
      ['foundation', 35, 48, 4, null, 'ksf'],
    ],
  },
  'many loads': {
    rows: [
      METRIC,
      ...Array.from({ length: 11 }, (_, i) => [i === 0 ? 'pin' : 'roller', 6 * i]),
      ...steel,
      ...Array.from({ length: 10 }, (_, i) => [
        ['uniform', 6 * i, 6 * i + 6, 3 + (i % 3), null, 'kN/m', 'G'],
        ['uniform', 6 * i, 6 * i + 6, 5, null, 'kN/m', i % 2 === 0 ? 'Q1' : 'Q2'],
        ['point', 6 * i + 2, null, 10 + i, null, 'kN', 'Q1'],
        ['point', 6 * i + 4, null, 12, null, 'kN', 'Q2'],
      ]).flat(),
    ],
  },
};
