/** READBACK: one sentence per row, how it was read. */
import type { BeamModel } from '../beam/model';
import type { Evaluated } from './build';

export interface Reading {
  readonly row: number;
  readonly text: string;
}

export function readingsOf(beam: Evaluated, _model: BeamModel): Reading[] {
  return beam.plan.placed.map((row) => ({ row: row.row, text: row.item }));
}
