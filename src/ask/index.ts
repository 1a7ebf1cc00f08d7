/** Every question of the worksheet, in the reader's signs and units. Each throws BeamProblem and never returns a number that is not finite. */
export { check, used } from './check';
export { envelope } from './envelope';
export { frequency } from './frequency';
export { influence } from './influence';
export { maxDeflection, peak } from './peak';
export { profile } from './profile';
export { reaction, reactions } from './reactions';
export { readback } from './readback';
export { regions } from './regions';
export { rolling } from './rolling';
export { requiredI, stiffnessFactor } from './stiffness';
export { value } from './value';
