/**
 * The only door of the engine: functions/, taskpane/ and workbench/ import from here and from nowhere else in src/.
 */
export * as ask from './ask';
export { cautionsOf } from './ask/readback';
export { spansOf, spanName, type Span } from './ask/spans';
export { namedPositions } from './ask/profile';
export { supportName } from './ask/reactions';
export { regionsOf, type RegionWork } from './ask/regions';
export { conditionsOf, type Condition } from './ask/conditions';
export type { Fit } from './ask/equation';
export { EFFECTS, PARTS, QUANTITIES, SENSES, STANDARD_POINTS, type Effect } from './ask/words';
export { heading, unitOf, write } from './ask/units';
export type {
  BeamModel,
  Combination,
  Foundation,
  Law,
  Limit,
  LimitRow,
  Load,
  ModelUnits,
  Release,
  SectionStretch,
  Support,
} from './beam/model';
export { BeamProblem, type Issue } from './issue';
export { clearMemo, MEMO_BOUNDS, memoSize, openBeam, reviewBeam } from './open';
export type { BeamArguments, OpenBeam, Review } from './open';
export { say, sayAll } from './messages';
export {
  compileTable,
  normaliseCell,
  readBindings,
  readCombination,
  readLimit,
  readPosition,
  type Bindings,
  type Cell,
  type ColumnName,
  type CompiledTable,
  type Reading,
  type RowInfo,
} from './rows';
export { verify } from './published/verify';
export { SIGNS, shownFactor } from './signs';
export type { Peak, Piece, Quantity, Reaction, Residuals, Response, Sense, Side, Solution } from './solution';
export { VERSION } from './version';
