/** Cautions that the table's own numbers give (contract 4). */
import type { BeamModel } from '../beam/model';
import type { Issue } from '../issue';
import type { Evaluated } from './build';

export function numericCautions(_beam: Evaluated, _model: BeamModel): Issue[] {
  return [];
}
