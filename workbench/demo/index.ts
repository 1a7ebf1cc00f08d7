/** The demo workbook: an invented covered market. Values are computed by the script that writes it, never typed here. */
import type { IWorkbookData } from '@univerjs/core';
import { scheduleSheet, templateReference, templateSheet, TEMPLATE_NAME } from './joists';
import { bracket, canopy, dock, gallery, purlin } from './members';
import { memberSheet } from './member';
import { Paper } from './paper';

function readMe(): Paper {
  const paper = new Paper('read-me', 'Read me', [18, 170, 620]);
  paper.put(0, 1, 'Covered market, member calculations', 'title');
  paper.height(0, 30);
  paper.put(1, 1, 'A demonstration with invented members, loads and names of halls.', 'note');
  const lines: readonly (readonly [string, string])[] = [
    [
      'How it works',
      'A beam is a few rows of cells; an answer is a formula that reads them. Change a straw-coloured cell and every result follows.',
    ],
    [
      'Try this',
      'On "Canopy beam", change the snow from 6 to 12 and watch the limits used. Select a result to see its beam in the side pane.',
    ],
    [
      'Ask for more',
      'In any empty cell: =SPANROW.DEFLECTION(beam rows, x). Typing =SPANROW. lists the functions with a word on each.',
    ],
    [
      'Fill down',
      '"Joist schedule" asks one template sixty times: one formula a column, filled down, with the values of each row.',
    ],
    [
      'When it is wrong',
      'A row that is not understood gives an error with a sentence: hold the pointer over the cell, or read it in the line below.',
    ],
    [
      'Signs',
      'Downward loads and deflections are positive; sagging moments are positive; reactions are positive when they push up.',
    ],
    [
      'Cautions',
      'Linear elastic theory with small deflections, for review by a qualified engineer. Local codes and licensed practice decide limits, loads and combinations.',
    ],
  ];
  lines.forEach(([head, words], index) => {
    paper.put(3 + index, 1, head, 'wrapped');
    paper.put(3 + index, 2, words, 'wrapped');
    paper.height(3 + index, 42);
  });
  const after = 4 + lines.length;
  paper.put(after, 1, 'Straw', 'input');
  paper.put(after, 2, 'input, to be changed', 'soft');
  paper.put(after + 1, 1, 'Green', 'result');
  paper.put(after + 1, 2, 'result, computed', 'soft');
  paper.put(after + 3, 1, 'Functions', 'plain');
  paper.put(after + 3, 2, '=SPANROW.VERSION()', 'soft');
  return paper;
}

/** The workbook without values: open it in the embedded spreadsheet to compute them. */
export function demoWorkbook(): IWorkbookData {
  const sheets = [
    readMe(),
    ...[canopy, purlin, bracket, gallery].map(memberSheet),
    templateSheet(),
    scheduleSheet(),
    memberSheet(dock),
  ];
  return {
    id: 'covered-market',
    name: 'covered-market.xlsx',
    appVersion: '',
    locale: 'enUS' as IWorkbookData['locale'],
    styles: {},
    sheetOrder: sheets.map(({ id }) => id),
    sheets: Object.fromEntries(sheets.map((paper) => [paper.id, paper.data()])),
    resources: [
      {
        name: 'SHEET_DEFINED_NAME_PLUGIN',
        data: JSON.stringify({
          joistRows: {
            id: 'joistRows',
            name: TEMPLATE_NAME,
            formulaOrRefString: templateReference,
            localSheetId: 'AllDefaultWorkbook',
          },
        }),
      },
    ],
  };
}
