/**
 * The record of a beam as cells: what was given, how it was read, what came out, how, and under which cautions. Plain values with
 * the date and the version, so that the sheet says tomorrow what it says today.
 */
import { ask, BeamProblem, unitOf, VERSION } from '../engine';
import { addressFrom } from '../address';
import { DIAGRAMS } from '../drawing/frame';
import type { CellInput } from '../port';
import type { Reviewed } from '../review';
import { texts } from '../texts';
import { basicOf } from '../values';

export interface Record {
  readonly cells: CellInput[][];
  /** 0-based row before which the drawing goes, and how many rows are kept free for it */
  readonly drawingRow: number;
}

/** Rows kept free for the drawing: the host's standard row is 15 points high. */
export const DRAWING_ROWS = 34;

type Line = readonly CellInput[];

function plain(raw: unknown): CellInput {
  const value = basicOf(raw);
  return typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean' ? value : null;
}

const section = (title: string, lines: readonly Line[]): Line[] =>
  lines.length === 0 ? [] : [[title], ...lines, []];

/** CHECK where the beam has a limit; no lines otherwise. */
function checks(reviewed: Reviewed): Line[] {
  if (!reviewed.open || reviewed.checks.length === 0) return [];
  try {
    return ask.check(reviewed.open, reviewed.subject.limit);
  } catch (problem) {
    if (problem instanceof BeamProblem) return [];
    throw problem;
  }
}

function extremes(reviewed: Reviewed): Line[] {
  const { open } = reviewed;
  if (!open) return [];
  const { model, response } = open;
  const words = texts.record;
  const lines = DIAGRAMS.map((quantity): Line => {
    const a = response.peak(quantity, 'highest');
    const b = response.peak(quantity, 'lowest');
    const turned = open.show(quantity, a.value) < open.show(quantity, b.value);
    const [high, low] = turned ? [b, a] : [a, b];
    return [
      texts.quantity[quantity],
      unitOf(model, quantity),
      open.show(quantity, low.value),
      low.at,
      open.show(quantity, high.value),
      high.at,
    ];
  });
  return [[words.quantity, words.unit, words.lowest, words.at, words.highest, words.at], ...lines];
}

/** Null when there is no answer to record. */
export function makeRecord(reviewed: Reviewed, today: string, withDrawing: boolean): Record | null {
  const { open, subject } = reviewed;
  if (!open) return null;
  const words = texts.record;
  const call = subject.calls[subject.index];
  const lines: Line[] = [
    [words.title],
    [words.beam, subject.source ? addressFrom(subject.source, null) : (call?.beamText ?? '')],
    [words.askedIn, subject.calls.length > 0 ? addressFrom(subject.cell, null) : ''],
    [words.combination, open.combination?.text ?? texts.head.everything],
    [words.date, today],
    [words.version, VERSION],
    [],
  ];
  lines.push(
    ...section(
      words.rows,
      subject.cells.map((row) => row.map(plain)),
    ),
  );
  lines.push(...section(words.read, ask.readback({ ...subject.args, beam: subject.cells })));
  const drawingRow = lines.length;
  if (withDrawing) {
    lines.push([words.drawing]);
    for (let i = 0; i < DRAWING_ROWS; i++) lines.push([]);
  }
  lines.push(...section(words.reactions, ask.reactions(open)));
  lines.push(...section(words.extremes, extremes(reviewed)));
  lines.push(...section(words.checks, checks(reviewed)));
  lines.push(...section(words.working, ask.regions(open)));
  lines.push([texts.standing]);
  const width = Math.max(...lines.map((line) => line.length));
  return {
    cells: lines.map((line) =>
      Array.from({ length: width }, (_, i) => {
        const cell = line[i] ?? null;
        return cell === '' ? null : cell;
      }),
    ),
    drawingRow: drawingRow + 1,
  };
}
